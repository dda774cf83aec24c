import { Fragment } from 'react';
import { useForm, type DefaultValues, type FieldPath, type UseFormReturn } from 'react-hook-form';
import { ApiProblem } from '../../../shared/api/client';
import { Field } from '../../../shared/forms/field';
import { showProblem } from '../../../shared/forms/problem-fields';
import { Action } from '../../../shared/ui/action';
import { isDay, isTime, NOT_A_DAY, NOT_A_NUMBER, NOT_A_TIME, readNumber } from '../typed-values';

export type FieldKind = 'text' | 'number' | 'day' | 'time' | 'password' | 'choice' | 'check';
type Values = Record<string, string | boolean>;

export interface FieldSpec<F extends Values> {
  name: keyof F & string;
  label: string;
  hint?: string;
  kind?: FieldKind;
  /** What is said when it is left empty; without it, it may be. */
  missing?: string;
  /** Of a choice. */
  options?: readonly { value: string | number; label: string }[];
  /** Known values that the field offers, and takes others. */
  offers?: readonly string[];
  size?: 'short' | 'long';
  /** Begins a new line of fields. */
  isFirst?: boolean;
  /** Shown, and not to be changed. */
  isFixed?: boolean;
  placeholder?: string;
  /** The request's pointer, where it is not the field's own name: several fields may make one value. */
  pointer?: string;
}

interface InlineFormProps<F extends Values> {
  fields: readonly FieldSpec<F>[];
  values: F;
  /** The button's words. */
  sends: string;
  send: (values: F) => Promise<void>;
  /** Without it the form stays: there is nothing to go back to. */
  onLeave?: () => void;
  tone?: 'main' | 'quiet';
  note?: string;
}

/** A short form in a row: fields side by side, the server's words at each field. */
export function InlineForm<F extends Values>(props: InlineFormProps<F>) {
  const { fields, values, sends, send, onLeave, tone = 'main', note } = props;
  const form = useForm<F>({ defaultValues: values as DefaultValues<F> });
  const { errors, isSubmitting } = form.formState;

  const submit = form.handleSubmit(async (typed) => {
    try {
      await send(typed);
    } catch (error) {
      for (const field of fields) if (field.kind === 'password') form.resetField(field.name as unknown as FieldPath<F>);
      showProblem(form, fields.map(({ name }) => name) as FieldPath<F>[], atOwnFields(error, fields));
    }
  });
  return (
    <form className="inline-form" onSubmit={(event) => void submit(event)} noValidate>
      {note !== undefined && <p className="inline-form__note">{note}</p>}
      <div className="inline-form__fields">
        {fields.map((field) => (
          <Fragment key={field.name}>
            {field.isFirst === true && <span className="inline-form__break" />}
            <InlineField form={form} field={field} />
          </Fragment>
        ))}
      </div>
      {errors.root?.message !== undefined && (
        <p className="form__error" role="alert">
          {errors.root.message}
        </p>
      )}
      <div className="form__actions">
        <Action type="submit" kind={tone} isBusy={isSubmitting}>
          {sends}
        </Action>
        {onLeave !== undefined && (
          <Action kind="plain" onPress={onLeave}>
            Leave it
          </Action>
        )}
      </div>
    </form>
  );
}

function InlineField<F extends Values>({ form, field }: { form: UseFormReturn<F>; field: FieldSpec<F> }) {
  const { name, label, hint, kind = 'text', options, offers, placeholder, size, isFixed } = field;
  const path = name as unknown as FieldPath<F>;
  const error = (form.formState.errors as Record<string, { message?: string } | undefined>)[name]?.message;
  const registered = form.register(path, { validate: (value) => flawOf(field, value) ?? true });
  if (kind === 'check') {
    return (
      <div className="inline-field inline-field--check">
        <label className="choice">
          <input type="checkbox" {...registered} />
          <span>{label}</span>
        </label>
        {error !== undefined && <span className="field__error">{error}</span>}
      </div>
    );
  }
  const width = size ?? (kind === 'text' || kind === 'choice' || kind === 'password' ? undefined : 'short');
  return (
    <div className={`inline-field${width === undefined ? '' : ` inline-field--${width}`}`}>
      <Field label={label} hint={hint} error={error}>
        {(control) =>
          kind === 'choice' ? (
            <select {...control} className="input" {...registered}>
              {options?.map(({ value, label: words }) => (
                <option key={value} value={value}>
                  {words}
                </option>
              ))}
            </select>
          ) : (
            <>
              <input
                {...control}
                className="input"
                type={kind === 'password' ? 'password' : 'text'}
                inputMode={kind === 'number' ? 'decimal' : undefined}
                autoComplete={kind === 'password' ? 'current-password' : 'off'}
                list={offers === undefined ? undefined : `${control.id}-offers`}
                placeholder={placeholder}
                readOnly={isFixed}
                {...registered}
              />
              {offers !== undefined && (
                <datalist id={`${control.id}-offers`}>
                  {offers.map((offer) => (
                    <option key={offer} value={offer} />
                  ))}
                </datalist>
              )}
            </>
          )
        }
      </Field>
    </div>
  );
}

/** What is wrong with a typed value before it is sent; the server judges the rest. */
function flawOf<F extends Values>({ kind, missing }: FieldSpec<F>, value: string | boolean): string | undefined {
  if (typeof value !== 'string') return undefined;
  if (value.trim() === '') return missing;
  if (kind === 'number' && Number.isNaN(readNumber(value))) return NOT_A_NUMBER;
  if (kind === 'day' && !isDay(value.trim())) return NOT_A_DAY;
  if (kind === 'time' && !isTime(value.trim())) return NOT_A_TIME;
  return undefined;
}

/** Puts the request's pointers onto the fields that make their values. */
function atOwnFields<F extends Values>(error: unknown, fields: readonly FieldSpec<F>[]): unknown {
  if (!(error instanceof ApiProblem)) return error;
  const errors = error.errors.map((item) => {
    const field = fields.find(({ pointer }) => pointer === item.pointer);
    return field === undefined ? item : { ...item, pointer: `/${field.name}` };
  });
  return new ApiProblem({
    status: error.status,
    code: error.code,
    detail: error.detail,
    correlationId: error.correlationId ?? undefined,
    errors,
  });
}
