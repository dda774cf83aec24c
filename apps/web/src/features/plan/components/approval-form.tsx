import type { PlanView } from '@app/contracts';
import { useForm } from 'react-hook-form';
import { Field } from '../../../shared/forms/field';
import { showProblem } from '../../../shared/forms/problem-fields';
import { useSession } from '../../../shared/session/session';
import { Action } from '../../../shared/ui/action';
import { useToast } from '../../../shared/ui/toast';
import { useApprove } from '../api/use-plans';

export function ApprovalForm({ plan }: { plan: PlanView }) {
  const { me } = useSession();
  const toast = useToast();
  const approve = useApprove(plan.id);
  const form = useForm({ defaultValues: { password: '' } });
  const { errors, isSubmitting } = form.formState;
  const send = form.handleSubmit(async (body) => {
    try {
      await approve.mutateAsync(body);
      toast.done(`Revision ${plan.revision} is in force. ${plan.channelName} is being judged by it.`);
    } catch (error) {
      form.resetField('password');
      showProblem(form, ['password'], error);
    }
  });
  return (
    <form className="form" onSubmit={(event) => void send(event)} noValidate>
      <p>From then on every lot of this channel is judged by these numbers; approval freezes them.</p>
      <Field label="Your password again" error={errors.password?.message}>
        {(control) => (
          <input
            {...control}
            className="input"
            type="password"
            autoComplete="current-password"
            {...form.register('password', { required: 'Your password stands for your signature.' })}
          />
        )}
      </Field>
      {errors.root?.message !== undefined && (
        <p className="form__error" role="alert">
          {errors.root.message}
        </p>
      )}
      <p>
        Signed by <b>{me.name}</b>: “approved”.
      </p>
      <div className="form__actions">
        <Action type="submit" isBusy={isSubmitting}>
          Approve revision {plan.revision}
        </Action>
      </div>
    </form>
  );
}
