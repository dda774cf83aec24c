import { InputText } from 'primereact/inputtext';
import { useForm } from 'react-hook-form';
import { Field } from '../../../shared/forms/field';
import { showProblem } from '../../../shared/forms/problem-fields';
import { useAuth } from '../../../shared/session/auth';
import { Action } from '../../../shared/ui/action';

interface Credentials {
  email: string;
  password: string;
}

export function SignInForm() {
  const { signIn } = useAuth();
  const form = useForm<Credentials>({ defaultValues: { email: '', password: '' } });
  const { errors, isSubmitting } = form.formState;

  const submit = form.handleSubmit(async ({ email, password }) => {
    try {
      await signIn(email.trim(), password);
    } catch (error) {
      form.setValue('password', '');
      showProblem(form, ['email', 'password'], error);
      if (form.getFieldState('email').error === undefined) form.setFocus('password');
    }
  });

  return (
    <form className="form" onSubmit={(event) => void submit(event)} noValidate>
      <Field label="E-mail address" error={errors.email?.message}>
        {(control) => (
          <InputText
            {...control}
            {...form.register('email', { required: 'Enter your e-mail address.' })}
            type="email"
            autoComplete="username"
            autoFocus
          />
        )}
      </Field>
      <Field label="Password" error={errors.password?.message}>
        {(control) => (
          <InputText
            {...control}
            {...form.register('password', { required: 'Enter your password.' })}
            type="password"
            autoComplete="current-password"
          />
        )}
      </Field>
      {errors.root?.message !== undefined && (
        <p className="form__error" role="alert">
          {errors.root.message}
        </p>
      )}
      <div className="form__actions">
        <Action type="submit" isBusy={isSubmitting}>
          Sign in
        </Action>
      </div>
    </form>
  );
}
