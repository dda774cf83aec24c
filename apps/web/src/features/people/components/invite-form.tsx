import type { LineView } from '@app/contracts';
import { useForm } from 'react-hook-form';
import { Field } from '../../../shared/forms/field';
import { showProblem } from '../../../shared/forms/problem-fields';
import { Action } from '../../../shared/ui/action';
import { useToast } from '../../../shared/ui/toast';
import { useInvite } from '../api/people';
import { RolesFields, type RolesValues } from './roles-fields';

interface Values extends RolesValues {
  name: string;
  email: string;
}

export function InviteForm({ plantId, lines }: { plantId: number; lines: LineView[] }) {
  const invite = useInvite(plantId);
  const { done } = useToast();
  const form = useForm<Values>({ defaultValues: { name: '', email: '', roles: [], lineIds: [] } });
  const { errors, isSubmitting } = form.formState;
  const send = form.handleSubmit(async ({ name, email, roles, lineIds }) => {
    try {
      const person = await invite.mutateAsync({ name, email: email.trim(), roles, lineIds: lineIds.map(Number) });
      form.reset();
      done(`A mail to ${person.email} is on its way.`);
    } catch (error) {
      showProblem(form, ['name', 'email', 'roles', 'lineIds'], error);
    }
  });
  return (
    <form className="form" onSubmit={(event) => void send(event)} noValidate>
      <Field label="Name" hint="As it stands under what the person signs." error={errors.name?.message}>
        {(control) => <input {...control} className="input" autoComplete="off" {...form.register('name')} />}
      </Field>
      <Field label="E-mail address" error={errors.email?.message}>
        {(control) => (
          <input {...control} className="input" type="email" autoComplete="off" {...form.register('email')} />
        )}
      </Field>
      <RolesFields form={form} lines={lines} />
      {errors.root?.message !== undefined && (
        <p className="form__error" role="alert">
          {errors.root.message}
        </p>
      )}
      <div className="form__actions">
        <Action type="submit" isBusy={isSubmitting}>
          Send the invitation
        </Action>
      </div>
    </form>
  );
}
