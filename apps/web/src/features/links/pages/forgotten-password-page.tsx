import { useState } from 'react';
import { useForm } from 'react-hook-form';
import { urls } from '../../../app/urls';
import { Field } from '../../../shared/forms/field';
import { showProblem } from '../../../shared/forms/problem-fields';
import { Action, ActionLink } from '../../../shared/ui/action';
import { PageHeading } from '../../../shared/ui/page-heading';
import { Sheet } from '../../../shared/ui/sheet';
import { askForReset } from '../api/links';

/** Asks for a link to choose a new password; what it says is the same whoever has the address. */
export function ForgottenPasswordPage() {
  const [asked, setAsked] = useState<string | null>(null);
  const form = useForm({ defaultValues: { email: '' } });
  const { errors, isSubmitting } = form.formState;
  const send = form.handleSubmit(async ({ email }) => {
    try {
      await askForReset(email.trim());
      setAsked(email.trim());
    } catch (error) {
      showProblem(form, ['email'], error);
    }
  });
  return (
    <main className="page">
      <PageHeading
        title="Forgotten your password?"
        lead="Enter the e-mail address that you sign in with. A link to choose a new password is mailed to it; it works once, for an hour."
      />
      <Sheet>
        {asked === null ? (
          <form className="form" onSubmit={(event) => void send(event)} noValidate>
            <Field label="E-mail address" error={errors.email?.message}>
              {(control) => (
                <input
                  {...control}
                  className="input"
                  type="email"
                  autoComplete="username"
                  {...form.register('email', { required: 'Enter your e-mail address.' })}
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
                Send me a link
              </Action>
              <ActionLink kind="plain" to={urls.signIn()}>
                Back to the sign-in
              </ActionLink>
            </div>
          </form>
        ) : (
          <div className="form" role="status">
            <p>
              If somebody signs in with {asked}, the mail is on its way. When none comes, look among unwanted mail, or
              ask an administrator of your plant.
            </p>
            <div className="form__actions">
              <ActionLink to={urls.signIn()}>Back to the sign-in</ActionLink>
            </div>
          </div>
        )}
      </Sheet>
    </main>
  );
}
