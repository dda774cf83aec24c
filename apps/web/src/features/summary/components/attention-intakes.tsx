import type { SummaryView } from '@app/contracts';
import { Link } from 'react-router-dom';
import { urls } from '../../../app/urls';
import { EmptyNote } from '../../../shared/ui/empty-note';
import { Sheet } from '../../../shared/ui/sheet';
import { When } from '../../../shared/ui/when';
import { cutSentence } from '../summary-words';

/** Workbooks that did not go in. */
export function AttentionIntakes({ summary }: { summary: SummaryView }) {
  const { intakes, count } = summary.intakes;
  const cut = cutSentence(intakes.length, count);
  return (
    <Sheet title="Intakes that need attention">
      {intakes.length === 0 && <EmptyNote>Every workbook went in.</EmptyNote>}
      <ul className="summary__questions">
        {intakes.map((intake) => (
          <li key={intake.id}>
            <Link to={urls.intake(intake.id)}>{intake.fileName}</Link>, {intake.line.name},{' '}
            {intake.state === 'refused' ? 'refused' : 'needs attention'}: {intake.sentence}{' '}
            <span className="soft">
              {intake.receivedBy}, <When at={intake.receivedAt} form="short" />
            </span>
          </li>
        ))}
      </ul>
      {cut !== null && <p className="soft">{cut}</p>}
    </Sheet>
  );
}
