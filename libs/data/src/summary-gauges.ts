import { GETTING_WORSE_BY, type SummaryGauge } from '@app/contracts';
import { type Queryable, rows } from './database';
import { ofWeek, type TwoWeeks, weekBindings, WEEKS } from './summary-weeks-sql';

interface MovementRow {
  week: 0 | 1;
  channelId: number;
  channelName: string;
  lineId: number;
  lineName: string;
  gaugeAssetNumber: string | null;
  unit: string;
  resolution: number;
  movement: number | null;
  cap: number | null;
}

/**
 * How far each channel's slow movement had gone by the newest fit of the week, against the allowance of the plan that judged, and the week
 * before. A channel whose newest segment has no baseline yet is not told.
 */
export async function listSummaryGauges(db: Queryable, plantId: number, weeks: TwoWeeks): Promise<SummaryGauge[]> {
  const found = await rows<MovementRow>(
    db,
    `with ${WEEKS}
     select w.week, c.id as "channelId", c.name as "channelName", n.id as "lineId", n.name as "lineName", g.asset_number as "gaugeAssetNumber",
       x.unit, x.resolution, abs(f.movement) as movement, cast(r.parameters ->> 'allowanceCap' as float8) as cap
     from weeks w join channels c on c.plant_id = :plantId join lines n on n.id = c.line_id join characteristics x on x.id = c.characteristic_id
     cross join lateral (
       select movement, plan_revision_id from fits where channel_id = c.id and judged_at >= w.from_at and judged_at < w.to_at
       order by judged_at desc, segment_starts_at desc nulls last, id desc limit 1
     ) f
     left join plan_revisions r on r.id = f.plan_revision_id
     left join channel_gauges s on s.channel_id = c.id and s.served @> w.to_at - interval '1 millisecond' left join gauges g on g.id = s.gauge_id
     order by n.name, c.name, c.id`,
    { plantId, ...weekBindings(weeks) },
  );
  const before = new Map(ofWeek(found, 1).map((row) => [row.channelId, shareOf(row)]));
  return ofWeek(found, 0)
    .flatMap((row) => (row.movement === null ? [] : [gauge({ ...row, movement: row.movement }, before)]))
    .sort((a, b) => (b.share ?? -1) - (a.share ?? -1));
}

const shareOf = ({ movement, cap }: Pick<MovementRow, 'movement' | 'cap'>): number | null =>
  movement === null || cap === null || !(cap > 0) ? null : movement / cap;

function gauge(row: MovementRow & { movement: number }, before: Map<number, number | null>): SummaryGauge {
  const share = shareOf(row);
  const lastWeekShare = before.get(row.channelId) ?? null;
  return {
    channel: { id: row.channelId, name: row.channelName },
    line: { id: row.lineId, name: row.lineName },
    gaugeAssetNumber: row.gaugeAssetNumber,
    unit: row.unit,
    resolution: row.resolution,
    movement: row.movement,
    cap: row.cap,
    share,
    lastWeekShare,
    isGettingWorse: share !== null && lastWeekShare !== null && share - lastWeekShare >= GETTING_WORSE_BY,
  };
}
