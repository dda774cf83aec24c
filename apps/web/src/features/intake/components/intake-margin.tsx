import type { IntakeView } from '@app/contracts';
import { Link } from 'react-router-dom';
import { urls } from '../../../app/urls';
import { useSession } from '../../../shared/session/session';
import { When } from '../../../shared/ui/when';
import { sizeWords } from './intake-words';

/** Where the file came from, and what to mind before confirming it. */
export function IntakeMargin({ intake }: { intake: IntakeView }) {
  const { plant } = useSession();
  const { sameFileAs } = intake;
  return (
    <>
      {sameFileAs !== null && (
        <p className="intake-same">
          The same file came in before: <Link to={urls.intake(sameFileAs.id)}>intake {sameFileAs.id}</Link>, by{' '}
          {sameFileAs.receivedBy} on <When at={sameFileAs.receivedAt} form="short" />. Readings that are there already
          change nothing.
        </p>
      )}
      {intake.confirmedBy !== null && intake.confirmedAt !== null && (
        <p>
          Confirmed by {intake.confirmedBy} on <When at={intake.confirmedAt} form="short" />.
        </p>
      )}
      {intake.state !== 'refused' && (
        <>
          <p>
            Times without a zone are read in the plant’s: {plant.timeZone}. Compare the first rows with the workbook.
          </p>
          <p>Who confirms an intake decides none of the holds that come from it.</p>
        </>
      )}
      <p>
        {sizeWords(intake.byteCount)}, SHA-256 <code title={intake.sha256}>{intake.sha256.slice(0, 12)}…</code>
      </p>
    </>
  );
}
