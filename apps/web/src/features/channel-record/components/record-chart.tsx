import type { RecordLot, RecordView } from '@app/contracts';
import { useMemo, useState } from 'react';
import { useNavigate } from 'react-router-dom';
import { urls } from '../../../app/urls';
import { nearestAt } from '../../../shared/chart/nearest';
import { PaneStack } from '../../../shared/chart/pane-stack';
import { RangeBrush } from '../../../shared/chart/range-brush';
import type { TimeRange } from '../../../shared/chart/range';
import { useLiveRange } from '../../../shared/chart/use-live-range';
import { useSession } from '../../../shared/session/session';
import { formatInstant } from '../../../shared/time/plant-time';
import { useChannelRecord } from '../../../shared/record/use-channel-record';
import { LotReadout } from './lot-readout';
import { recordPanes } from './record-panes';

interface RecordChartProps {
  record: RecordView;
  range: TimeRange;
  home: TimeRange;
  bounds: TimeRange;
  onRange: (range: TimeRange) => void;
}

const HEIGHT = 560;
const OVERVIEW_COLUMNS = 800;
/** A pointer this share of the range away from a lot does not mean it. */
const REACH = 0.02;

/** Three panes on one time axis, the figures under the pointer above them, the whole record below them. */
export function RecordChart({ record, range, home, bounds, onRange }: RecordChartProps) {
  const { plant } = useSession();
  const navigate = useNavigate();
  const [live, follow] = useLiveRange(range, onRange);
  const [shown, setShown] = useState<RecordLot | null>(null);
  const overview = useChannelRecord(record.channel.id, bounds, OVERVIEW_COLUMNS);
  const panes = useMemo(() => recordPanes(record, shown), [record, shown]);

  const lotAt = (at: number) => {
    const lot = nearestAt(record.lots, at);
    if (lot === undefined) return null;
    const reach = REACH * (live.to - live.from);
    return at >= lot.startsAt - reach && at <= lot.endsAt + reach ? lot : null;
  };
  const pick = (at: number, isTouch: boolean) => {
    const lot = lotAt(at);
    if (isTouch) setShown(lot);
    else if (lot !== null) void navigate(urls.lot(lot.id));
  };
  const instant = (at: number) => formatInstant(at, plant.timeZone, 'short');
  const { characteristic, name } = record.channel;
  return (
    <div className="record-chart">
      <LotReadout lot={shown} characteristic={characteristic} />
      <PaneStack
        panes={panes}
        range={live}
        bounds={bounds}
        home={home}
        zone={plant.timeZone}
        height={HEIGHT}
        label={`Record of ${name} from ${instant(live.from)} until ${instant(live.to)}; the table below has the same figures`}
        onRange={follow}
        onCursor={(at) => setShown(at === null ? null : lotAt(at))}
        onPick={pick}
      />
      <RangeBrush
        range={live}
        bounds={bounds}
        columns={overview.data?.readings ?? null}
        breaks={record.breaks.map((item) => Date.parse(item.at))}
        format={instant}
        onRange={follow}
      />
    </div>
  );
}
