import type { ShiftCalendarBody, ShiftSpan } from '@app/contracts';
import { useEffect, useRef } from 'react';
import { useFieldArray, useForm, useWatch } from 'react-hook-form';
import { Field } from '../../../shared/forms/field';
import { showProblem } from '../../../shared/forms/problem-fields';
import { Action } from '../../../shared/ui/action';
import { useSend } from '../api/use-send';
import { coverageWords } from '../shift-words';
import { isDay, isTime, NOT_A_DAY, NOT_A_TIME } from '../typed-values';

interface ShiftFormProps {
  plantId: number;
  validFrom: string;
  shifts: ShiftSpan[];
  hint: string;
  onDone: () => void;
}

const PARTS = [
  ['name', 'Name', (text: string) => text.trim() !== '' || 'Name the shift.'],
  ['startsAt', 'From', (text: string) => isTime(text.trim()) || NOT_A_TIME],
  ['endsAt', 'Until', (text: string) => isTime(text.trim()) || NOT_A_TIME],
] as const;

/** A whole calendar from a day on, a line of fields a shift. */
export function ShiftForm({ plantId, validFrom, shifts, hint, onDone }: ShiftFormProps) {
  const send = useSend(plantId);
  const element = useRef<HTMLFormElement>(null);
  const form = useForm<ShiftCalendarBody>({ defaultValues: { validFrom, shifts } });
  const { fields, append, remove } = useFieldArray({ control: form.control, name: 'shifts' });
  const typed = useWatch({ control: form.control, name: 'shifts' });
  const { errors, isSubmitting } = form.formState;
  useEffect(() => element.current?.querySelector('input')?.focus(), []);

  const submit = form.handleSubmit(async (calendar) => {
    const trimmed = calendar.shifts.map((shift) => ({
      name: shift.name.trim(),
      startsAt: shift.startsAt.trim(),
      endsAt: shift.endsAt.trim(),
    }));
    try {
      await send('PUT', `/plants/${plantId}/set-up/shifts`, {
        validFrom: calendar.validFrom.trim(),
        shifts: trimmed,
      } satisfies ShiftCalendarBody);
      onDone();
    } catch (error) {
      const ofShifts = trimmed.flatMap((_, index) => PARTS.map(([part]) => `shifts.${index}.${part}` as const));
      showProblem(form, ['validFrom', ...ofShifts], error);
    }
  });
  const areTimes = typed.every(({ startsAt, endsAt }) => isTime(startsAt.trim()) && isTime(endsAt.trim()));
  return (
    <form
      className="inline-form"
      ref={element}
      noValidate
      onSubmit={(event) => void submit(event)}
      onKeyDown={(event) => event.key === 'Escape' && onDone()}
    >
      <div className="inline-form__fields">
        <div className="inline-field">
          <Field label="From which day on" hint={hint} error={errors.validFrom?.message}>
            {(control) => (
              <input
                {...control}
                className="input"
                autoComplete="off"
                {...form.register('validFrom', { validate: (text) => isDay(text.trim()) || NOT_A_DAY })}
              />
            )}
          </Field>
        </div>
      </div>
      {fields.map((field, index) => (
        <fieldset key={field.id} className="inline-form__fields shift-row">
          <legend className="visually-hidden">Shift {index + 1}</legend>
          {PARTS.map(([part, label, validate]) => (
            <div key={part} className={part === 'name' ? 'inline-field' : 'inline-field inline-field--short'}>
              <Field label={label} error={errors.shifts?.[index]?.[part]?.message}>
                {(control) => (
                  <input
                    {...control}
                    className="input"
                    autoComplete="off"
                    {...form.register(`shifts.${index}.${part}`, { validate })}
                  />
                )}
              </Field>
            </div>
          ))}
          {fields.length > 1 && (
            <Action kind="plain" label={`Leave shift ${index + 1} out`} onPress={() => remove(index)}>
              Leave out
            </Action>
          )}
        </fieldset>
      ))}
      {areTimes && <p className="inline-form__note soft">{coverageWords(typed)}</p>}
      {errors.root?.message !== undefined && (
        <p className="form__error" role="alert">
          {errors.root.message}
        </p>
      )}
      <div className="form__actions">
        <Action type="submit" isBusy={isSubmitting}>
          State these shifts
        </Action>
        <Action
          kind="quiet"
          onPress={() =>
            append({ name: '', startsAt: typed.at(-1)?.endsAt ?? '', endsAt: typed.at(0)?.startsAt ?? '' })
          }
        >
          One more shift
        </Action>
        <Action kind="plain" onPress={onDone}>
          Leave it
        </Action>
      </div>
    </form>
  );
}
