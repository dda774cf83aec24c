import type { IntakeView } from '@app/contracts';
import { useForm } from 'react-hook-form';
import { useState } from 'react';
import { Field } from '../../../shared/forms/field';
import { showProblem } from '../../../shared/forms/problem-fields';
import { Action } from '../../../shared/ui/action';
import { useWithdrawIntake } from '../api/use-intakes';

/** Takes an intake back, with a reason. */
export function Withdraw({ intake }: { intake: IntakeView }) {
  const [isOpen, setIsOpen] = useState(false);
  const withdraw = useWithdrawIntake(intake.id);
  const form = useForm<{ reason: string }>({ defaultValues: { reason: '' } });
  const { errors, isSubmitting } = form.formState;
  const send = form.handleSubmit(async ({ reason }) => {
    try {
      await withdraw.mutateAsync({ reason: reason.trim() });
    } catch (error) {
      showProblem(form, ['reason'], error);
    }
  });
  if (!isOpen)
    return (
      <Action kind="plain" onPress={() => setIsOpen(true)}>
        Withdraw this intake
      </Action>
    );
  return (
    <form className="form withdraw" onSubmit={(event) => void send(event)} noValidate>
      <p>
        What it brought is taken out again, its channels are judged as if it had not come, and holds that came from it
        alone end. Nothing is erased: the workbook and its readings stay on record as withdrawn.
      </p>
      <Field label="Why" error={errors.reason?.message}>
        {(control) => (
          <textarea
            {...control}
            autoFocus
            rows={2}
            maxLength={500}
            {...form.register('reason', {
              validate: (value) => value.trim() !== '' || 'Say why: the reason stands on the record.',
            })}
          />
        )}
      </Field>
      {errors.root && <p className="field__error">{errors.root.message}</p>}
      <p className="intake-actions">
        <Action type="submit" isBusy={isSubmitting}>
          Withdraw {intake.fileName}
        </Action>
        <Action kind="plain" onPress={() => setIsOpen(false)}>
          Keep it
        </Action>
      </p>
    </form>
  );
}
