import type { LinkPurpose, LinkView } from '@app/contracts';
import { useParams } from 'react-router-dom';
import { urls } from '../../../app/urls';
import { asProblem } from '../../../shared/api/problem';
import { ActionLink } from '../../../shared/ui/action';
import { PageHeading } from '../../../shared/ui/page-heading';
import { ProblemNotice } from '../../../shared/ui/problem-notice';
import { Sheet } from '../../../shared/ui/sheet';
import { Skeleton } from '../../../shared/ui/skeleton';
import { useLink } from '../api/links';
import { ChoosePasswordForm } from '../components/choose-password-form';

const TITLES: Record<LinkPurpose, string> = {
  invitation: 'Welcome to Ebbline',
  password_reset: 'Choose a new password',
  first_administrator: 'Begin with Ebbline',
};

const leadOf = ({ purpose, name }: LinkView) =>
  ({
    invitation: `You are invited, ${name}. Choose a password, and you are in.`,
    password_reset: `For ${name}. Every session that is open with the old password ends.`,
    first_administrator:
      'You are the first here: say who you are and choose a password. Then you set up the first plant.',
  })[purpose];

/** What a mailed or printed link leads to. */
export function LinkPage() {
  const token = useParams().token ?? '';
  const link = useLink(token);
  return (
    <main className="page">
      {link.isPending && <Skeleton lines={4} label="Looking at the link" />}
      {link.isError && <NoLink problem={link.error} onRetry={() => void link.refetch()} />}
      {link.data !== undefined && (
        <>
          <PageHeading title={TITLES[link.data.purpose]} lead={leadOf(link.data)} />
          <Sheet>
            <ChoosePasswordForm token={token} link={link.data} />
          </Sheet>
        </>
      )}
    </main>
  );
}

function NoLink({ problem, onRetry }: { problem: Error; onRetry: () => void }) {
  const { status, detail } = asProblem(problem);
  if (status !== 404 && status !== 410) return <ProblemNotice problem={problem} onRetry={onRetry} />;
  return (
    <>
      <PageHeading title="This link does not work" lead={detail} />
      <div className="form__actions">
        <ActionLink to={urls.signIn()}>To the sign-in</ActionLink>
        <ActionLink kind="quiet" to={urls.forgottenPassword()}>
          Forgotten your password?
        </ActionLink>
      </div>
    </>
  );
}
