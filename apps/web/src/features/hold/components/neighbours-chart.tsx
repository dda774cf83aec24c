import type { HoldView, RecordView, VerdictView } from '@app/contracts';
import { useMemo } from 'react';
import { Link } from 'react-router-dom';
import { urls } from '../../../app/urls';
import { PaneStack } from '../../../shared/chart/pane-stack';
import { highlight } from '../../../shared/chart/plugins/highlight';
import type { TimeRange } from '../../../shared/chart/range';
import { scorePlugins } from '../../../shared/record/score-plugins';
import { useChannelRecord } from '../../../shared/record/use-channel-record';
import { useSession } from '../../../shared/session/session';
import { Loaded } from '../../../shared/ui/loaded';
import { Skeleton } from '../../../shared/ui/skeleton';

const DAY_MS = 86_400_000;
const COLUMNS = 400;
const HEIGHT = 190;

/** The lot amid its neighbours: scores on one channel from three days before it until a day after it. */
export function NeighboursChart({ hold, verdict }: { hold: HoldView; verdict: VerdictView }) {
  const { channel } = verdict;
  const lot = useMemo(
    () => ({ from: Date.parse(hold.lotStartsAt), to: Date.parse(hold.lotEndsAt) }),
    [hold.lotStartsAt, hold.lotEndsAt],
  );
  const range = useMemo(() => ({ from: lot.from - 3 * DAY_MS, to: lot.to + DAY_MS }), [lot]);
  const query = useChannelRecord(channel.id, range, COLUMNS);
  return (
    <figure className="neighbours">
      <figcaption>
        Lot {hold.lot.number} (shaded) amid its neighbours in {channel.name.toLowerCase()}.{' '}
        <Link to={urls.channel(channel.id, range)}>Open the record there</Link>
      </figcaption>
      <Loaded
        query={query}
        failure="The neighbouring lots could not be loaded."
        skeleton={
          <div style={{ height: HEIGHT }}>
            <Skeleton lines={5} label="Loading the neighbouring lots" />
          </div>
        }
      >
        {(record) => <Scores record={record} lot={lot} range={range} lotNumber={hold.lot.number} />}
      </Loaded>
    </figure>
  );
}

interface ScoresProps {
  record: RecordView;
  lot: TimeRange;
  range: TimeRange;
  lotNumber: string;
}

function Scores({ record, lot, range, lotNumber }: ScoresProps) {
  const { plant } = useSession();
  const panes = useMemo(
    () => [
      {
        key: 'scores',
        unit: 'Scores, σ',
        share: 1,
        leastHeight: 4,
        plugins: [highlight(lot.from, lot.to), ...scorePlugins(record)],
      },
    ],
    [record, lot],
  );
  return (
    <PaneStack
      panes={panes}
      range={range}
      bounds={range}
      home={range}
      zone={plant.timeZone}
      height={HEIGHT}
      isStill
      label={`Scores of ${record.lots.length} lots about lot ${lotNumber} on ${record.channel.name}`}
    />
  );
}
