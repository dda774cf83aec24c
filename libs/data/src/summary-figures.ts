import { type Disposition, DISPOSITIONS, type Measure, NOTHING, type WeekFigures } from '@app/contracts';
import { type Queryable, rows } from './database';
import { type TwoWeeks, weekBindings, WEEKS } from './summary-weeks-sql';

/** Lots of a line and week that are of a kind; `key` is the disposition of what was decided, or the number of the age. */
export interface FigureRow {
  week: 0 | 1;
  lineId: number;
  kind: 'measured' | 'scored' | 'not_fully_scored' | 'held' | 'decided' | 'open';
  key: string;
  unit: string | null;
  lots: number;
  amount: number | null;
  value: number | null;
  lotsWithoutValue: number;
}

/** Every figure of both weeks by line, in one query. `ageLimits`: where one age ends and the next begins, h, ascending. */
export function listSummaryFigures(
  db: Queryable,
  plantId: number,
  weeks: TwoWeeks,
  ageLimits: number[],
): Promise<FigureRow[]> {
  return rows<FigureRow>(
    db,
    `with ${WEEKS},
     of_week as (
       select w.week, l.id as lot_id, s.has_score, s.lacks_score
       from weeks w join lines n on n.plant_id = :plantId
       join lots l on l.line_id = n.id and l.ends_at >= w.from_at and l.ends_at < w.to_at
       cross join lateral (
         select bool_or(v.score is not null) as has_score, bool_or(v.score is null) as lacks_score
         from lot_channels lc left join verdicts v on v.channel_id = lc.channel_id and v.lot_id = lc.lot_id and v.is_current
         where lc.lot_id = l.id and lc.first_at is not null
       ) s where s.has_score is not null
     ),
     items as (
       select week, 'measured' as kind, '' as key, lot_id, cast(null as float8) as part from of_week
       union all select week, 'scored', '', lot_id, null from of_week where has_score
       union all select week, 'not_fully_scored', '', lot_id, null from of_week where lacks_score
       union all
       select distinct w.week, 'held', '', h.lot_id, cast(null as float8)
       from weeks w join holds h on h.plant_id = :plantId and h.opened_at >= w.from_at and h.opened_at < w.to_at and h.state <> 'withdrawn'
       union all
       select w.week, 'decided', t.disposition, h.lot_id, sum(t.quantity)
       from weeks w join decisions d on d.plant_id = :plantId and d.decided_at >= w.from_at and d.decided_at < w.to_at
       join decision_parts t on t.decision_id = d.id join holds h on h.id = t.hold_id
       group by w.week, t.disposition, h.lot_id
       union all
       select w.week, 'open', cast(width_bucket(extract(epoch from w.to_at - h.opened_at) / 3600, cast(:ageLimits as numeric[])) as text), h.lot_id, null
       from weeks w join holds h on h.plant_id = :plantId and h.opened_at < w.to_at and h.state <> 'withdrawn'
       left join decision_holds dh on dh.hold_id = h.id left join decisions d on d.id = dh.decision_id
       where d.id is null or d.decided_at >= w.to_at
     )
     select i.week, l.line_id as "lineId", i.kind, i.key, case when q.amount is null then null else l.quantity_unit end as unit,
       count(*)::int as lots, sum(q.amount) as amount, sum(q.amount * p.value_per_unit) as value,
       (count(*) filter (where q.amount * p.value_per_unit is null))::int as "lotsWithoutValue"
     from items i join lots l on l.id = i.lot_id join products p on p.id = l.product_id
     cross join lateral (select coalesce(i.part, l.quantity) as amount) q
     group by 1, 2, 3, 4, 5 order by 1, 2, 3, 4, 5`,
    { plantId, ageLimits, ...weekBindings(weeks) },
  );
}

/** Rows of one kind as lots, quantities by unit, and value. */
export function measureOf(found: FigureRow[], currency: string | null): Measure {
  const sums = new Map<string, number>();
  const measure = { lots: 0, without: 0, amount: 0, lotsWithValue: 0 };
  for (const row of found) {
    measure.lots += row.lots;
    if (row.unit === null || row.amount === null) measure.without += row.lots;
    else sums.set(row.unit, (sums.get(row.unit) ?? 0) + row.amount);
    measure.amount += row.value ?? 0;
    measure.lotsWithValue += row.lots - row.lotsWithoutValue;
  }
  const hasValue = currency !== null && measure.lotsWithValue > 0;
  return {
    lots: measure.lots,
    quantities: [...sums].sort(([a], [b]) => a.localeCompare(b)).map(([unit, amount]) => ({ unit, amount })),
    lotsWithoutQuantity: measure.without,
    value: hasValue ? { amount: measure.amount, currency, lotsWithout: measure.lots - measure.lotsWithValue } : null,
  };
}

/** The figures of one week from its rows, of one line or of all. */
export function figuresOf(
  found: FigureRow[],
  { ageLimits, currency }: { ageLimits: number[]; currency: string | null },
): WeekFigures {
  const of = (kind: FigureRow['kind'], key?: string) =>
    measureOf(
      found.filter((row) => row.kind === kind && (key === undefined || row.key === key)),
      currency,
    );
  const decided = DISPOSITIONS.map((disposition: Disposition) => ({ disposition, ...of('decided', disposition) }));
  const edges = [0, ...ageLimits];
  return {
    measured: of('measured'),
    scored: of('scored'),
    notFullyScored: of('not_fully_scored').lots,
    held: of('held'),
    decided: decided.filter((measure) => measure.lots > NOTHING.lots),
    stillOpen: of('open'),
    stillOpenByAge: edges.map((fromHours, index) => ({
      fromHours,
      toHours: edges[index + 1] ?? null,
      ...of('open', String(index)),
    })),
  };
}
