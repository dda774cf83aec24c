import type { Disposition, HoldState } from '@app/contracts';
import { findRow, type Queryable, rows } from './database';

export const LOT_STATE_FILTERS = [
  'all',
  'held',
  'outside',
  'not_scored',
  'released',
  'scrapped',
  'outside_control_limits',
  'within_control_limits',
  'outside_specification',
  'measured',
  'scored',
  'not_fully_scored',
] as const;
/** What must lie in the time that is asked for; `open`: held and undecided at its end. */
export const LOT_TIMES = ['started', 'ended', 'held', 'decided', 'open'] as const;
export const HELD_FILTERS = ['open', 'decided', 'ever', 'never'] as const;
export const LOT_SORTS = ['startsAt', '-startsAt', 'number', '-number', 'score', '-score'] as const;

export interface LotFilter {
  plantIds: number[];
  lineId?: number;
  state?: (typeof LOT_STATE_FILTERS)[number];
  held?: (typeof HELD_FILTERS)[number];
  /** [from, to): what of a lot must lie in it is said by `by`, its start without. */
  from?: Date;
  to?: Date;
  by?: (typeof LOT_TIMES)[number];
  /** Decided so, in whole or in part; in the time that is asked for when that goes by decisions. */
  disposition?: Disposition;
  /** Measured on this channel without a score there. */
  notScoredOn?: number;
  /** …for this reason; `not_judged` without any verdict. */
  notScoredFor?: string;
  /** Part of the lot's number or of its product's code or name. */
  text?: string;
}

export interface LotListRow {
  id: number;
  number: string;
  lineId: number;
  lineName: string;
  product: string;
  quantity: number | null;
  quantityUnit: string | null;
  startsAt: Date;
  endsAt: Date;
  farthestChannelId: number | null;
  farthestChannelName: string | null;
  farthestScore: number | null;
  holdId: number | null;
  holdState: HoldState | null;
  holdOpenedAt: Date | null;
}

const current = (condition: string) =>
  `exists (select 1 from verdicts v where v.lot_id = l.id and v.is_current and ${condition})`;
const OUTSIDE = current(`v.control_state = 'outside_control_limits'`);
const NOT_SCORED = current(`v.control_state = 'not_scored'`);
const lastDisposition = (disposition: Disposition) =>
  `(select p.disposition from holds h join decision_parts p on p.hold_id = h.id where h.lot_id = l.id
    order by p.decision_id desc, p.id limit 1) = '${disposition}'`;
const HOLD_OPEN = `exists (select 1 from holds h where h.lot_id = l.id and h.state = 'open')`;
const EVER_HELD = `exists (select 1 from holds h where h.lot_id = l.id and h.state <> 'withdrawn')`;

/** On one of the channels on which the lot was measured. */
const onChannel = (condition: string) =>
  `exists (select 1 from lot_channels lc left join verdicts v on v.channel_id = lc.channel_id and v.lot_id = lc.lot_id and v.is_current
    where lc.lot_id = l.id and lc.first_at is not null and ${condition})`;

const STATE_CONDITIONS: Record<(typeof LOT_STATE_FILTERS)[number], string> = {
  all: 'true',
  held: HOLD_OPEN,
  outside: OUTSIDE,
  not_scored: NOT_SCORED,
  released: lastDisposition('release'),
  scrapped: lastDisposition('scrap'),
  outside_control_limits: OUTSIDE,
  within_control_limits: `not ${OUTSIDE} and not ${NOT_SCORED} and ${current(`v.control_state = 'within_control_limits'`)}`,
  outside_specification: current(`v.specification_state = 'outside_specification'`),
  measured: onChannel('true'),
  scored: onChannel('v.score is not null'),
  not_fully_scored: onChannel('v.score is null'),
};
const HELD_CONDITIONS: Record<(typeof HELD_FILTERS)[number], string> = {
  open: HOLD_OPEN,
  decided: `${EVER_HELD} and not ${HOLD_OPEN}`,
  ever: EVER_HELD,
  never: `not ${EVER_HELD}`,
};

const NOT_SCORED_ON = `v.score is null and lc.channel_id = :notScoredOn
  and (coalesce(v.not_scored_reason, 'not_judged') = :notScoredFor or cast(:notScoredFor as text) is null)`;

/** What of the lot lies in the time, given bounds on an instant. */
const TIME_CONDITIONS: Record<(typeof LOT_TIMES)[number], (within: (instant: string) => string) => string> = {
  started: (within) => within('l.starts_at'),
  ended: (within) => within('l.ends_at'),
  held: (within) =>
    `exists (select 1 from holds h where h.lot_id = l.id and h.state <> 'withdrawn' and ${within('h.opened_at')})`,
  decided: (within) => decidedWhere(within('d.decided_at')),
  open: () => `exists (select 1 from holds h left join decision_holds dh on dh.hold_id = h.id left join decisions d on d.id = dh.decision_id
    where h.lot_id = l.id and h.state <> 'withdrawn' and (h.opened_at < :to or cast(:to as timestamptz) is null) and (d.id is null or d.decided_at >= :to))`,
};
const decidedWhere = (condition: string) =>
  `exists (select 1 from holds h join decision_parts t on t.hold_id = h.id join decisions d on d.id = t.decision_id
    where h.lot_id = l.id and (t.disposition = :disposition or cast(:disposition as text) is null) and ${condition})`;

/** Joined only when it is sorted by; one pass over the current verdicts instead of a look-up a lot. */
const SCORES = `left join (select v.lot_id, max(abs(v.score)) as score from verdicts v where v.is_current group by v.lot_id) z
  on z.lot_id = l.id`;
const ORDERS: Record<(typeof LOT_SORTS)[number], string> = {
  startsAt: 'l.starts_at, l.id',
  '-startsAt': 'l.starts_at desc, l.id desc',
  number: 'l.number, l.run, l.id',
  '-number': 'l.number desc, l.run desc, l.id desc',
  score: 'z.score nulls first, l.id',
  '-score': 'z.score desc nulls last, l.id desc',
};

function where(filter: LotFilter): { sql: string; bindings: Record<string, unknown> } {
  const { by = 'started', from, to, disposition } = filter;
  const text = filter.text?.trim();
  const bounds = (instant: string) =>
    [from && `${instant} >= :from`, to && `${instant} < :to`].filter(Boolean).join(' and ') || 'true';
  const isTimed = from !== undefined || to !== undefined || by !== 'started';
  const conditions = [
    'l.plant_id = any(:plantIds)',
    'l.withdrawn_at is null',
    filter.lineId !== undefined && 'l.line_id = :lineId',
    isTimed && TIME_CONDITIONS[by](bounds),
    disposition !== undefined && by !== 'decided' && decidedWhere('true'),
    filter.notScoredOn !== undefined && onChannel(NOT_SCORED_ON),
    text && '(l.number ilike :text or p.code ilike :text or p.name ilike :text)',
    filter.state && STATE_CONDITIONS[filter.state],
    filter.held && HELD_CONDITIONS[filter.held],
  ];
  const bindings = {
    plantIds: filter.plantIds,
    lineId: filter.lineId,
    from,
    to: to ?? null,
    disposition: disposition ?? null,
    notScoredOn: filter.notScoredOn,
    notScoredFor: filter.notScoredFor ?? null,
    text: text && `%${text.replaceAll(/[\\%_]/g, '\\$&')}%`,
  };
  return { sql: conditions.filter(Boolean).join(' and '), bindings };
}

export async function getLotCount(db: Queryable, filter: LotFilter): Promise<number> {
  const { sql, bindings } = where(filter);
  const row = await findRow<{ total: number }>(
    db,
    `select count(*) as total from lots l join products p on p.id = l.product_id where ${sql}`,
    bindings,
  );
  return row?.total ?? 0;
}

/** One page of the lots, with the channel on which each stands out most and its newest hold; marks come from mapLotMarks. */
export function listLots(
  db: Queryable,
  filter: LotFilter,
  page: { sort: (typeof LOT_SORTS)[number]; limit: number; offset: number },
): Promise<LotListRow[]> {
  const { sql, bindings } = where(filter);
  return rows<LotListRow>(
    db,
    `with page as (
       select l.id, row_number() over (order by ${ORDERS[page.sort]}) as place
       from lots l join products p on p.id = l.product_id ${page.sort.endsWith('score') ? SCORES : ''} where ${sql}
       order by place limit :limit offset :offset
     ), farthest as (
       select distinct on (v.lot_id) v.lot_id, c.id, c.name, v.score from verdicts v join channels c on c.id = v.channel_id
       where v.is_current and v.score is not null and v.lot_id in (select id from page) order by v.lot_id, abs(v.score) desc, c.id
     ), held as (
       select distinct on (lot_id) lot_id, id, state, opened_at from holds where lot_id in (select id from page) and state <> 'withdrawn'
       order by lot_id, state = 'open' desc, id desc
     )
     select l.id, l.number, n.id as "lineId", n.name as "lineName", p.code as product, l.quantity, l.quantity_unit as "quantityUnit",
       l.starts_at as "startsAt", l.ends_at as "endsAt", f.id as "farthestChannelId", f.name as "farthestChannelName",
       f.score as "farthestScore", h.id as "holdId", h.state as "holdState",
       h.opened_at as "holdOpenedAt"
     from page g join lots l on l.id = g.id join lines n on n.id = l.line_id join products p on p.id = l.product_id
     left join farthest f on f.lot_id = l.id left join held h on h.lot_id = l.id order by g.place`,
    { ...bindings, limit: page.limit, offset: page.offset },
  );
}
