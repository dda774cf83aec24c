import { type SummaryUnderWay, weekInWords } from '@app/contracts';
import { When } from '../../../shared/ui/when';

interface NotMadeProps {
  failed: SummaryUnderWay;
  /** What to press to ask again; null for who may not. */
  askAgain: string | null;
}

/** That a summary could not be made, why, and what now. */
export function NotMade({ failed, askAgain }: NotMadeProps) {
  return (
    <p className="summary__failed" role="alert">
      <b>The summary of the week of {weekInWords(failed.weekStartsOn)} could not be made</b> (
      <When at={failed.since} form="short" />
      ). {failed.sentence}{' '}
      {askAgain === null ? 'A quality manager can ask for it again.' : `To ask for it again, press “${askAgain}”.`}
    </p>
  );
}
