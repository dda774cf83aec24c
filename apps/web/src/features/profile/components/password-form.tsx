import { PASSWORD_MINIMUM } from '@app/contracts';
import { useForm } from 'react-hook-form';
import { Field } from '../../../shared/forms/field';
import { NewPasswordInput } from '../../../shared/forms/new-password-input';
import { showProblem } from '../../../shared/forms/problem-fields';
import { useAuth } from '../../../shared/session/auth';
import { Action } from '../../../shared/ui/action';
import { useToast } from '../../../shared/ui/toast';
import { changePassword, signOutEverywhere } from '../api/profile';

export function PasswordForm() {
  const { signOut } = useAuth();
  const { done, failed } = useToast();
  const form = useForm({ defaultValues: { current: '', next: '' } });
  const { errors, isSubmitting } = form.formState;
  const send = form.handleSubmit(async (values) => {
    try {
      await changePassword(values);
      form.reset();
      done('Your password is changed; every other session has ended.');
    } catch (error) {
      showProblem(form, ['current', 'next'], error);
    }
  });
  const leave = async () => {
    try {
      await signOutEverywhere();
      await signOut();
    } catch (error) {
      failed(error);
    }
  };
  return (
    <form className="form" onSubmit={(event) => void send(event)} noValidate>
      <Field label="Password now" error={errors.current?.message}>
        {(control) => (
          <input
            {...control}
            className="input"
            type="password"
            autoComplete="current-password"
            {...form.register('current', { required: 'Enter the password that you have now.' })}
          />
        )}
      </Field>
      <Field
        label="New password"
        hint={`At least ${PASSWORD_MINIMUM} characters; a few words that only you would put together do.`}
        error={errors.next?.message}
      >
        {(control) => <NewPasswordInput {...control} {...form.register('next', { required: 'Choose a password.' })} />}
      </Field>
      {errors.root?.message !== undefined && (
        <p className="form__error" role="alert">
          {errors.root.message}
        </p>
      )}
      <div className="form__actions">
        <Action type="submit" kind="quiet" isBusy={isSubmitting}>
          Change your password
        </Action>
        <Action kind="plain" onPress={() => void leave()}>
          Sign out everywhere
        </Action>
      </div>
    </form>
  );
}
