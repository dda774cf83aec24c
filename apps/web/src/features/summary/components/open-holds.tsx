import {
  ageInWords,
  ageSpanInWords,
  formatQuantity,
  measureInWords,
  type SummaryOpenHold,
  type SummaryView,
} from '@app/contracts';
import { Link } from 'react-router-dom';
import { urls } from '../../../app/urls';
import { EmptyNote } from '../../../shared/ui/empty-note';
import { FoldingTable } from '../../../shared/ui/folding-table';
import { FATE_WORDS } from '../../../shared/ui/mark-words';
import { Sheet } from '../../../shared/ui/sheet';
import { cutSentence } from '../summary-words';

/** What was held and undecided at the week's end, by age. */
export function OpenHolds({ summary }: { summary: SummaryView }) {
  const { stillOpenByAge, stillOpen } = summary.total.week;
  const { holds, count } = summary.openHolds;
  const cut = cutSentence(holds.length, count);
  return (
    <div id="open-holds" className="summary__anchor">
      <Sheet
        title={`Held and undecided at the week’s end: ${measureInWords(stillOpen)}`}
        isFlush={holds.length > 0}
        margin={
          <p>
            Quality managers are reminded when a hold is older than {ageInWords(summary.reminderHours.manager)}, the
            director when it is older than {ageInWords(summary.reminderHours.director)}.
          </p>
        }
      >
        {holds.length === 0 ? (
          <EmptyNote>Nothing was waiting for a decision.</EmptyNote>
        ) : (
          <>
            <ul className="summary__ages">
              {stillOpenByAge
                .filter(({ lots }) => lots > 0)
                .map((measure) => (
                  <li key={measure.fromHours}>
                    {ageSpanInWords(measure)}: {measureInWords(measure)}
                  </li>
                ))}
            </ul>
            <HoldTable holds={holds} currency={summary.plant.currency} />
            {cut !== null && <p className="summary__cut soft">{cut}</p>}
          </>
        )}
      </Sheet>
    </div>
  );
}

function HoldTable({ holds, currency }: { holds: SummaryOpenHold[]; currency: string | null }) {
  return (
    <FoldingTable
      caption="Lots held and undecided, oldest first"
      items={holds}
      keyOf={(hold) => hold.holdId}
      columns={[
        { name: 'Lot', isLead: true, cell: (hold) => <Link to={urls.hold(hold.holdId)}>{hold.lot.number}</Link> },
        { name: 'Line', cell: (hold) => <span className="number">{hold.line.name}</span> },
        { name: 'Open for', cell: (hold) => <span className="number">{ageInWords(hold.ageHours)}</span> },
        { name: 'Quantity', isNumber: true, cell: (hold) => riskWords(hold, currency) },
        { name: 'Why', cell: (hold) => hold.sentence },
        { name: 'State', cell: stateWords },
      ]}
    />
  );
}

function riskWords({ quantity, quantityUnit, value }: SummaryOpenHold, currency: string | null): string {
  if (quantity === null) return 'not stated';
  const amount = formatQuantity(quantity, quantityUnit ?? '').trim();
  return value === null || currency === null ? amount : `${amount}, ${formatQuantity(Math.round(value), currency)}`;
}

function stateWords({ decidedSince, isSetAside }: SummaryOpenHold): string {
  if (decidedSince !== null) return `${FATE_WORDS[decidedSince]} since`;
  return isSetAside ? 'set aside' : 'not set aside';
}
