import { asProblem } from '../api/problem';
import { Action } from './action';

interface ProblemNoticeProps {
  problem: unknown;
  /** What could not be done: "The lots could not be loaded." */
  what?: string;
  onRetry?: () => void;
}

/** What failed, why, what now; the reference number small below. */
export function ProblemNotice({ problem, what, onRetry }: ProblemNoticeProps) {
  const { detail, correlationId, status } = asProblem(problem);
  const mayPass = status === 0 || status === 429 || status >= 500;
  return (
    <div className="problem" role="alert">
      {what !== undefined && <p className="problem__what">{what}</p>}
      <p className="problem__why">{detail}</p>
      {onRetry !== undefined && mayPass && (
        <Action kind="quiet" onPress={onRetry}>
          Try again
        </Action>
      )}
      {correlationId !== null && <p className="problem__reference">Reference {correlationId}</p>}
    </div>
  );
}
