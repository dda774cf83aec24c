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
] as const;
export const HELD_FILTERS = ['open', 'decided', 'ever', 'never'] as const;
export const LOT_SORTS = ['startsAt', '-startsAt', 'number', '-number', 'score', '-score'] as const;

export interface LotFilter {
  plantIds: number[];
  lineId?: number;
  state?: (typeof LOT_STATE_FILTERS)[number];
  held?: (typeof HELD_FILTERS)[number];
  /** Lots that start at or after, and before. */
  from?: Date;
  to?: Date;
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
const EVER_HELD = `exists (select 1 from holds h where h.lot_id = l.id)`;

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
};
const HELD_CONDITIONS: Record<(typeof HELD_FILTERS)[number], string> = {
  open: HOLD_OPEN,
  decided: `${EVER_HELD} and not ${HOLD_OPEN}`,
  ever: EVER_HELD,
  never: `not ${EVER_HELD}`,
};

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
  const conditions = ['l.plant_id = any(:plantIds)'];
  const bindings: Record<string, unknown> = { plantIds: filter.plantIds };
  const add = (name: string, value: unknown, condition: string) => {
    if (value === undefined) return;
    conditions.push(condition);
    bindings[name] = value;
  };
  add('lineId', filter.lineId, 'l.line_id = :lineId');
  add('from', filter.from, 'l.starts_at >= :from');
  add('to', filter.to, 'l.starts_at < :to');
  const text = filter.text?.trim();
  if (text)
    add(
      'text',
      `%${text.replaceAll(/[\\%_]/g, '\\$&')}%`,
      '(l.number ilike :text or p.code ilike :text or p.name ilike :text)',
    );
  if (filter.state) conditions.push(STATE_CONDITIONS[filter.state]);
  if (filter.held) conditions.push(HELD_CONDITIONS[filter.held]);
  return { sql: conditions.join(' and '), bindings };
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
       select distinct on (lot_id) lot_id, id, state, opened_at from holds where lot_id in (select id from page)
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
