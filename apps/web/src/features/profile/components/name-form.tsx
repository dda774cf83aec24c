import { useForm } from 'react-hook-form';
import { Field } from '../../../shared/forms/field';
import { showProblem } from '../../../shared/forms/problem-fields';
import { useAuth } from '../../../shared/session/auth';
import { Action } from '../../../shared/ui/action';
import { useToast } from '../../../shared/ui/toast';
import { changeProfile } from '../api/profile';

export function NameForm({ name, email }: { name: string; email: string }) {
  const { readMeAgain } = useAuth();
  const { done } = useToast();
  const form = useForm({ defaultValues: { name } });
  const { errors, isSubmitting } = form.formState;
  const send = form.handleSubmit(async (values) => {
    try {
      await changeProfile(values);
      await readMeAgain();
      done('Your name is changed.');
    } catch (error) {
      showProblem(form, ['name'], error);
    }
  });
  return (
    <form className="form" onSubmit={(event) => void send(event)} noValidate>
      <p className="soft">You sign in as {email}.</p>
      <Field label="Name" hint="It stands under what you sign from now on." error={errors.name?.message}>
        {(control) => <input {...control} className="input" autoComplete="name" {...form.register('name')} />}
      </Field>
      {errors.root?.message !== undefined && (
        <p className="form__error" role="alert">
          {errors.root.message}
        </p>
      )}
      <div className="form__actions">
        <Action type="submit" kind="quiet" isBusy={isSubmitting}>
          Change your name
        </Action>
      </div>
    </form>
  );
}
