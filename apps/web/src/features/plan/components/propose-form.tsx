import { useForm } from 'react-hook-form';
import { Field } from '../../../shared/forms/field';
import { showProblem } from '../../../shared/forms/problem-fields';
import { Action } from '../../../shared/ui/action';
import { useProposeDefault } from '../api/use-plans';

/** Has the default plan worked out from the channel's own readings and proposed under the person's name. */
export function ProposeForm({ channelId }: { channelId: number }) {
  const propose = useProposeDefault(channelId);
  const form = useForm({ defaultValues: { reason: '', isRobust: false } });
  const { errors, isSubmitting } = form.formState;
  const send = form.handleSubmit(async ({ reason, isRobust }) => {
    try {
      await propose.mutateAsync({ reason: reason.trim(), isRobust });
      form.reset();
    } catch (error) {
      showProblem(form, ['reason', 'isRobust'], error);
    }
  });
  return (
    <form className="form" onSubmit={(event) => void send(event)} noValidate>
      <p>
        Smoothness, scale and control limits are worked out from this channel’s readings since its last break. Nothing
        changes until another person approves them.
      </p>
      <Field label="Reason" hint="Why the channel needs a plan, or another one." error={errors.reason?.message}>
        {(control) => (
          <input
            {...control}
            className="input"
            autoComplete="off"
            {...form.register('reason', {
              validate: (text) => text.trim() !== '' || 'Give the reason of the proposal.',
            })}
          />
        )}
      </Field>
      <label className="choice">
        <input type="checkbox" {...form.register('isRobust')} />
        <span>
          Let outlying lots pull the baseline less. Each lot is weighted by its distance from the baseline fitted
          without it; for channels where bad lots are frequent.
        </span>
      </label>
      {errors.root?.message !== undefined && (
        <p className="form__error" role="alert">
          {errors.root.message}
        </p>
      )}
      <div className="form__actions">
        <Action type="submit" kind="quiet" isBusy={isSubmitting}>
          Work out the default plan and propose it
        </Action>
      </div>
    </form>
  );
}
