import { formatValue, type SummaryGauge, type SummaryView } from '@app/contracts';
import { Link } from 'react-router-dom';
import { urls } from '../../../app/urls';
import { EmptyNote } from '../../../shared/ui/empty-note';
import { Sheet } from '../../../shared/ui/sheet';
import { allowanceWords } from '../summary-words';

/** The bar reaches this far; the allowance's end stands at 1. */
const BAR_END = 1.25;

/** How far each gauge's channel has moved within its allowance. */
export function Allowances({ summary }: { summary: SummaryView }) {
  return (
    <Sheet
      title="Slow movement within its allowance"
      margin={
        <p>
          The bar is what the slow movement has used of its allowance; the tall tick is the allowance’s end, the short
          one where it was last week. Without gauge checks nobody can say whether gauge or process moved.
        </p>
      }
    >
      {summary.gauges.length === 0 ? (
        <EmptyNote>No channel was fitted in this week.</EmptyNote>
      ) : (
        <ul className="allowances">
          {summary.gauges.map((gauge) => (
            <Allowance key={gauge.channel.id} gauge={gauge} />
          ))}
        </ul>
      )}
    </Sheet>
  );
}

function Allowance({ gauge }: { gauge: SummaryGauge }) {
  const { channel, line, gaugeAssetNumber, movement } = gauge;
  return (
    <li className="allowance">
      <span className="allowance__name">
        <Link to={urls.channel(channel.id)}>{channel.name}</Link>, {line.name}
        <span className="summary__before">{gaugeAssetNumber === null ? 'no gauge' : `gauge ${gaugeAssetNumber}`}</span>
      </span>
      <Bar gauge={gauge} />
      <span className="allowance__words">
        {allowanceWords(gauge)} <span className="soft number">({formatValue(movement, gauge)} moved)</span>
      </span>
    </li>
  );
}

const percent = (share: number) => `${(Math.min(share, BAR_END) / BAR_END) * 100}%`;

/** Says nothing that the words beside it do not say. */
function Bar({ gauge: { share, lastWeekShare } }: { gauge: SummaryGauge }) {
  if (share === null) return <span className="allowance__bar allowance__bar--none" aria-hidden />;
  return (
    <span className="allowance__bar" aria-hidden>
      <span className="allowance__used" style={{ width: percent(share) }} />
      {lastWeekShare !== null && <span className="allowance__before" style={{ left: percent(lastWeekShare) }} />}
      <span className="allowance__end" style={{ left: percent(1) }} />
    </span>
  );
}
