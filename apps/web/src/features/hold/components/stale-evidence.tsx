import { Action } from '../../../shared/ui/action';

/** The evidence was judged again while the decider had the page open. */
export function StaleEvidence({ onReadAgain }: { onReadAgain: () => void }) {
  return (
    <div className="form__error decision__stale" role="alert">
      <p>
        The evidence changed since you read it: the lot was judged again. Nothing is decided yet, and what you wrote is
        kept.
      </p>
      <Action kind="quiet" onPress={onReadAgain}>
        Read the evidence again
      </Action>
    </div>
  );
}
