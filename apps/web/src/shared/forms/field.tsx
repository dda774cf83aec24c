import { useId, type ReactNode } from 'react';

interface FieldProps {
  label: string;
  /** A sentence below the label. */
  hint?: ReactNode;
  error?: string;
  /** Gets the attributes that tie the control to its label, hint and error. */
  children: (control: ControlProps) => ReactNode;
}

export interface ControlProps {
  id: string;
  'aria-invalid': boolean;
  'aria-describedby': string | undefined;
}

export function Field({ label, hint, error, children }: FieldProps) {
  const id = useId();
  const described = [hint !== undefined && `${id}-hint`, error !== undefined && `${id}-error`]
    .filter(Boolean)
    .join(' ');
  return (
    <div className="field">
      <label className="field__label" htmlFor={id}>
        {label}
      </label>
      {hint !== undefined && (
        <span className="field__hint" id={`${id}-hint`}>
          {hint}
        </span>
      )}
      {children({
        id,
        'aria-invalid': error !== undefined,
        'aria-describedby': described === '' ? undefined : described,
      })}
      {error !== undefined && (
        <span className="field__error" id={`${id}-error`}>
          {error}
        </span>
      )}
    </div>
  );
}
