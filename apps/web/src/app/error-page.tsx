import { useRouteError } from 'react-router-dom';
import { ProblemNotice } from '../shared/ui/problem-notice';
import { PageHeading } from '../shared/ui/page-heading';
import { Sheet } from '../shared/ui/sheet';

/** In place of a page that failed to draw. */
export function ErrorPage() {
  const error = useRouteError();
  return (
    <>
      <PageHeading
        title="This page failed"
        lead="Nothing was changed by it. Load it again, or go to the desk and come back."
      />
      <Sheet>
        <ProblemNotice problem={error} onRetry={() => window.location.reload()} />
      </Sheet>
    </>
  );
}
