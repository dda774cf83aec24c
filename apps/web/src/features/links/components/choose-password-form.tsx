import { type LinkView, PASSWORD_MINIMUM } from '@app/contracts';
import { useForm } from 'react-hook-form';
import { useNavigate } from 'react-router-dom';
import { urls } from '../../../app/urls';
import { Field } from '../../../shared/forms/field';
import { NewPasswordInput } from '../../../shared/forms/new-password-input';
import { showProblem } from '../../../shared/forms/problem-fields';
import { useAuth } from '../../../shared/session/auth';
import { Action } from '../../../shared/ui/action';
import { choosePassword } from '../api/links';

/** Chooses the password that a link lets one choose, then signs in with it. */
export function ChoosePasswordForm({ token, link }: { token: string; link: LinkView }) {
  const { signIn } = useAuth();
  const navigate = useNavigate();
  const isFirst = link.purpose === 'first_administrator';
  const form = useForm({ defaultValues: { name: link.name, email: link.email, password: '' } });
  const { errors, isSubmitting } = form.formState;
  const send = form.handleSubmit(async ({ name, email, password }) => {
    try {
      const own = isFirst ? { name, email } : {};
      const answer = await choosePassword(token, { password, ...own });
      await signIn(answer.email, password).catch(() => undefined);
      await navigate(urls.desk(), { replace: true });
    } catch (error) {
      showProblem(form, ['name', 'email', 'password'], error);
    }
  });
  return (
    <form className="form" onSubmit={(event) => void send(event)} noValidate>
      {isFirst && (
        <Field label="Your name" hint="It stands under what you sign." error={errors.name?.message}>
          {(control) => <input {...control} className="input" autoComplete="name" {...form.register('name')} />}
        </Field>
      )}
      <Field label="E-mail address" error={errors.email?.message}>
        {(control) => (
          <input
            {...control}
            className="input"
            type="email"
            autoComplete="username"
            readOnly={!isFirst}
            {...form.register('email')}
          />
        )}
      </Field>
      <Field
        label="Password"
        hint={`At least ${PASSWORD_MINIMUM} characters. A few words that only you would put together are easy to remember; signs and digits are not needed.`}
        error={errors.password?.message}
      >
        {(control) => (
          <NewPasswordInput {...control} {...form.register('password', { required: 'Choose a password.' })} />
        )}
      </Field>
      {errors.root?.message !== undefined && (
        <p className="form__error" role="alert">
          {errors.root.message}
        </p>
      )}
      <div className="form__actions">
        <Action type="submit" isBusy={isSubmitting}>
          Choose this password and sign in
        </Action>
      </div>
    </form>
  );
}
