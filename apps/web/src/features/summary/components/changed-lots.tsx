import type { ChangedLot, ChangedLots as Changed, SummaryView } from '@app/contracts';
import { Link } from 'react-router-dom';
import { urls } from '../../../app/urls';
import { FoldingTable } from '../../../shared/ui/folding-table';
import { Sheet } from '../../../shared/ui/sheet';
import { When } from '../../../shared/ui/when';
import { changedFate, countBeside, cutSentence, fatesSentence } from '../summary-words';

/** What removing the slow movement changed: both ways in which the limits differ. */
export function ChangedByBaseline({ summary }: { summary: SummaryView }) {
  const { onlyUnadjusted, onlyPlan } = summary.changedByBaseline;
  return (
    <Sheet
      title="What removing the slow movement changed"
      margin={
        <p>
          The same lots were judged twice: against their baseline, as the plans say, and against constant limits on the
          lot means as measured. What became of them later shows which was right.
        </p>
      }
    >
      <Direction
        changed={onlyUnadjusted}
        sentence="that limits on unadjusted lot means would have held, and the plans did not"
      />
      <Direction
        changed={onlyPlan}
        sentence="that the plans found outside their control limits, and limits on unadjusted lot means would have let through"
      />
    </Sheet>
  );
}

function Direction({ changed, sentence }: { changed: Changed; sentence: string }) {
  const cut = cutSentence(changed.lots.length, changed.count);
  return (
    <div className="summary__direction">
      <p>
        <b>{countBeside(changed.count, changed.lastWeekCount)}</b> {sentence}. {fatesSentence(changed)}
      </p>
      {changed.lots.length > 0 && (
        <details className="summary__details">
          <summary>The lots</summary>
          <ChangedTable lots={changed.lots} caption={`Lots ${sentence}`} />
          {cut !== null && <p className="soft">{cut}</p>}
        </details>
      )}
    </div>
  );
}

function ChangedTable({ lots, caption }: { lots: ChangedLot[]; caption: string }) {
  return (
    <FoldingTable
      caption={caption}
      items={lots}
      keyOf={({ lot }) => lot.id}
      columns={[
        { name: 'Lot', isLead: true, cell: ({ lot }) => <Link to={urls.lot(lot.id)}>{lot.number}</Link> },
        { name: 'Line', cell: ({ line }) => line.name },
        { name: 'Ended', cell: ({ endsAt }) => <When at={endsAt} form="short" /> },
        { name: 'Differs in', cell: ({ channels }) => channels.join(', ') },
        { name: 'What became of it', cell: (lot) => <Fate lot={lot} /> },
      ]}
    />
  );
}

const Fate = ({ lot }: { lot: ChangedLot }) =>
  lot.hold === null ? <>{changedFate(lot)}</> : <Link to={urls.hold(lot.hold.id)}>{changedFate(lot)}</Link>;
