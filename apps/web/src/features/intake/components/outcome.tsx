import type { IntakeView } from '@app/contracts';
import { Link } from 'react-router-dom';
import { urls } from '../../../app/urls';
import { When } from '../../../shared/ui/when';
import { counted } from './intake-words';

/** What came of a scored intake: the holds as sentences. */
export function Outcome({ intake }: { intake: IntakeView }) {
  const { outcome, scoredAt } = intake;
  if (outcome === null) return <p>The intake is scored.</p>;
  const { lotsHeld, lotsScored } = outcome;
  return (
    <>
      <p>
        {counted(lotsScored, 'lot')} scored
        {scoredAt !== null && (
          <>
            {' '}
            on <When at={scoredAt} form="short" />
          </>
        )}
        ; {lotsHeld.length === 0 ? 'none is held.' : `${counted(lotsHeld.length, 'is', 'are')} held:`}
      </p>
      <ul className="outcome">
        {lotsHeld.map((held) => (
          <li key={held.holdId}>
            {held.sentence} <Link to={urls.hold(held.holdId)}>Open the hold of lot {held.lotNumber}</Link>
          </li>
        ))}
      </ul>
      <p className="soft">
        {counted(intake.readingsStored, 'reading')} stored, {intake.readingsAlreadyThere.toLocaleString('en-GB')} were
        there already and changed nothing.
      </p>
    </>
  );
}
