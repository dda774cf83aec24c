import { type LineView, type Role, ROLE_NAMES, ROLES } from '@app/contracts';
import { useId } from 'react';
import type { UseFormReturn } from 'react-hook-form';

export interface RolesValues {
  roles: Role[];
  lineIds: string[];
}

/** Which roles, and on which lines. Check boxes of one name: the form holds the list of those that are checked. */
export function RolesFields<T extends RolesValues>({ form, lines }: { form: UseFormReturn<T>; lines: LineView[] }) {
  const id = useId();
  const own = form as unknown as UseFormReturn<RolesValues>;
  const { errors } = own.formState;
  const rolesError = errors.roles?.message;
  const linesError = errors.lineIds?.message;
  return (
    <>
      <fieldset className="people__choices" aria-describedby={rolesError && `${id}-roles`}>
        <legend className="field__label">Roles</legend>
        {ROLES.map((role) => (
          <label key={role} className="choice">
            <input type="checkbox" value={role} {...own.register('roles')} />
            {ROLE_NAMES[role]}
          </label>
        ))}
        {rolesError !== undefined && (
          <span className="field__error" id={`${id}-roles`}>
            {rolesError}
          </span>
        )}
      </fieldset>
      {lines.length > 0 && (
        <fieldset className="people__choices" aria-describedby={linesError && `${id}-lines`}>
          <legend className="field__label">Lines</legend>
          {lines.map((line) => (
            <label key={line.id} className="choice">
              <input type="checkbox" value={String(line.id)} {...own.register('lineIds')} />
              {line.name}
            </label>
          ))}
          {linesError !== undefined && (
            <span className="field__error" id={`${id}-lines`}>
              {linesError}
            </span>
          )}
        </fieldset>
      )}
    </>
  );
}
