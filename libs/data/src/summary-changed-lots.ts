import { type ChangedLot, type ChangedLots, type Disposition, type HoldState, MOST_LISTED } from '@app/contracts';
import { type Queryable, rows } from './database';
import { ofWeek, type TwoWeeks, weekBindings, WEEKS } from './summary-weeks-sql';

interface ChangedRow {
  week: 0 | 1;
  isOnlyPlan: boolean;
  lotId: number;
  lotNumber: string;
  lineId: number;
  lineName: string;
  product: string;
  quantity: number | null;
  quantityUnit: string | null;
  endsAt: Date;
  channels: string[];
  holdId: number | null;
  holdState: HoldState | null;
  dispositions: Disposition[];
}

/**
 * Lots that stand outside their control limits by the plan on one of their channels and by limits on unadjusted lot means on none, and
 * the reverse. Channels on which either says nothing are not compared. With the lot's newest hold, for whatever cause.
 */
export async function listSummaryChangedLots(
  db: Queryable,
  plantId: number,
  weeks: TwoWeeks,
  hasLastWeek: boolean,
): Promise<{ onlyUnadjusted: ChangedLots; onlyPlan: ChangedLots }> {
  const found = await rows<ChangedRow>(
    db,
    `with ${WEEKS},
     compared as (
       select w.week, l.id as lot_id, bool_or(v.control_state = 'outside_control_limits') as by_plan,
         bool_or(v.constant_state = 'outside_control_limits') as by_constant,
         array_agg(c.name order by c.name) filter (where v.control_state <> v.constant_state) as channels
       from weeks w join lines n on n.plant_id = :plantId
       join lots l on l.line_id = n.id and l.ends_at >= w.from_at and l.ends_at < w.to_at
       join verdicts v on v.lot_id = l.id and v.is_current and v.control_state <> 'not_scored' and v.constant_state <> 'not_scored'
       join channels c on c.id = v.channel_id group by w.week, l.id
     )
     select x.week, x.by_plan as "isOnlyPlan", l.id as "lotId", l.number as "lotNumber", n.id as "lineId", n.name as "lineName", p.code as product,
       l.quantity, l.quantity_unit as "quantityUnit", l.ends_at as "endsAt", x.channels, h.id as "holdId", h.state as "holdState",
       array(select distinct t.disposition from decision_parts t where t.hold_id = h.id order by 1) as dispositions
     from compared x join lots l on l.id = x.lot_id join lines n on n.id = l.line_id join products p on p.id = l.product_id
     left join lateral (select id, state from holds where lot_id = l.id and state <> 'withdrawn' order by opened_at desc, id desc limit 1) h on true
     where x.by_plan <> x.by_constant order by l.ends_at desc, l.id desc`,
    { plantId, ...weekBindings(weeks) },
  );
  const of = (isOnlyPlan: boolean) =>
    changedLots(
      found.filter((row) => row.isOnlyPlan === isOnlyPlan),
      hasLastWeek,
    );
  return { onlyUnadjusted: of(false), onlyPlan: of(true) };
}

function changedLots(found: ChangedRow[], hasLastWeek: boolean): ChangedLots {
  const now = ofWeek(found, 0);
  const fates = new Map<ChangedLots['fates'][number]['fate'], number>();
  for (const row of now) {
    const own =
      row.holdId === null ? ['moved_on' as const] : row.holdState === 'open' ? ['held' as const] : row.dispositions;
    for (const fate of own) fates.set(fate, (fates.get(fate) ?? 0) + 1);
  }
  return {
    count: now.length,
    lots: now.slice(0, MOST_LISTED).map(changedLot),
    fates: [...fates].sort(([, a], [, b]) => b - a).map(([fate, lots]) => ({ fate, lots })),
    lastWeekCount: hasLastWeek ? ofWeek(found, 1).length : null,
  };
}

const changedLot = (row: ChangedRow): ChangedLot => ({
  lot: { id: row.lotId, number: row.lotNumber },
  line: { id: row.lineId, name: row.lineName },
  product: row.product,
  quantity: row.quantity,
  quantityUnit: row.quantityUnit,
  endsAt: row.endsAt.toISOString(),
  channels: row.channels,
  hold:
    row.holdId === null || row.holdState === null
      ? null
      : { id: row.holdId, state: row.holdState, dispositions: row.dispositions },
});
