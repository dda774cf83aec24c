import { Suspense } from 'react';
import { Navigate, Outlet, useLocation } from 'react-router-dom';
import { LineProvider } from '../shared/line-context/line-context';
import { useAuth } from '../shared/session/auth';
import { SessionProvider } from '../shared/session/session-provider';
import { ProblemNotice } from '../shared/ui/problem-notice';
import { Skeleton } from '../shared/ui/skeleton';
import { Frame } from './frame/frame';
import { NoPlant } from './no-plant';
import { urls } from './urls';

/** Everything behind the sign-in: the person, the plant, the line, and the frame around each page. */
export function SignedIn() {
  const { state, checkAgain } = useAuth();
  const { pathname, search } = useLocation();
  switch (state.kind) {
    case 'checking':
      return (
        <main className="page">
          <Skeleton lines={3} />
        </main>
      );
    case 'unreachable':
      return (
        <main className="page">
          <ProblemNotice problem={state.error} onRetry={checkAgain} />
        </main>
      );
    case 'signed_out':
      return <Navigate to={urls.signIn(state.how === 'left' ? undefined : pathname + search)} replace />;
    case 'signed_in':
      return (
        <SessionProvider me={state.me} nowhere={<NoPlant />}>
          <LineProvider>
            <Frame>
              <Suspense fallback={<Skeleton lines={6} />}>
                <Outlet />
              </Suspense>
            </Frame>
          </LineProvider>
        </SessionProvider>
      );
  }
}
