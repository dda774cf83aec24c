import { useSession } from '../../../shared/session/session';
import { PageHeading } from '../../../shared/ui/page-heading';
import { Sheet } from '../../../shared/ui/sheet';
import { ApiTokens } from '../components/api-tokens';
import { MailChoices } from '../components/mail-choices';
import { NameForm } from '../components/name-form';
import { PasswordForm } from '../components/password-form';
import { ThemeFields } from '../components/theme-fields';
import '../profile.css';

/** What is mine to choose? */
export function ProfilePage() {
  const { me } = useSession();
  return (
    <>
      <PageHeading title="Your profile" lead="Your name, your password, what comes by mail, and how the pages look." />
      <Sheet title="Name">
        <NameForm key={me.name} name={me.name} email={me.email} />
      </Sheet>
      <Sheet title="Theme">
        <ThemeFields />
      </Sheet>
      {me.memberships.map(({ plant }) => (
        <MailChoices key={plant.id} plant={plant} />
      ))}
      <Sheet
        title="Password"
        margin={<p>A new password ends every other session. You give it again under each decision and approval.</p>}
      >
        <PasswordForm />
      </Sheet>
      {me.memberships
        .filter(({ permissions }) => permissions.includes('upload_intake'))
        .map(({ plant }) => (
          <ApiTokens key={plant.id} plant={plant} />
        ))}
    </>
  );
}
