import '../sign-in.css';
import { Link, Navigate, useSearchParams } from 'react-router-dom';
import { urls } from '../../../app/urls';
import { useAuth } from '../../../shared/session/auth';
import { useDocumentTitle } from '../../../shared/ui/page-heading';
import { ProblemNotice } from '../../../shared/ui/problem-notice';
import { PenTrace } from '../components/pen-trace';
import { SignInForm } from '../components/sign-in-form';
import { safeNext } from '../safe-next';

export function SignInPage() {
  useDocumentTitle('Sign in');
  const { state, checkAgain } = useAuth();
  const [search] = useSearchParams();
  if (state.kind === 'signed_in') return <Navigate to={safeNext(search.get('next'))} replace />;
  return (
    <main className="sign-in">
      <PenTrace />
      <div className="sign-in__column">
        <h1 className="sign-in__name">Ebbline</h1>
        <p className="sign-in__lead">
          Takes the slow drift out of in-line gauge readings, scores every lot against what is left, and gets each lot
          that does not fit decided.
        </p>
        {state.kind === 'unreachable' && <ProblemNotice problem={state.error} onRetry={checkAgain} />}
        {state.kind === 'signed_out' && state.how === 'expired' && (
          <p className="sign-in__expired" role="status">
            Your session has ended. Sign in again to go on where you were.
          </p>
        )}
        <SignInForm />
        <p>
          <Link to={urls.forgottenPassword()}>Forgotten your password?</Link>
        </p>
      </div>
    </main>
  );
}
