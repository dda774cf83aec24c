import type { Disposition, HoldReminder, HoldState, SignalName } from '@app/contracts';
import { findRow, type Queryable, rows } from './database';
import { REMINDERS_OF_HOLD } from './hold-reminders';

export interface HoldCauseRow {
  channelId: number;
  channelName: string;
  signal: SignalName;
  sentence: string;
}

export interface HoldDecisionRow {
  disposition: Disposition;
  reason: string;
  note: string | null;
  by: string;
  at: string;
  meaning: string;
}

export interface HoldRow {
  id: number;
  plantId: number;
  state: HoldState;
  lotId: number;
  lotNumber: string;
  lineId: number;
  lineName: string;
  product: string;
  quantity: number | null;
  quantityUnit: string | null;
  lotStartsAt: Date;
  lotEndsAt: Date;
  openedAt: Date;
  isLate: boolean;
  evidenceVersion: number;
  reminders: HoldReminder[];
  causes: HoldCauseRow[];
  setAsideBy: string | null;
  setAsideAt: Date | null;
  setAsidePlace: string | null;
  decision: HoldDecisionRow | null;
}

const SELECT = `
  select h.id, h.plant_id as "plantId", h.state, l.id as "lotId", l.number as "lotNumber", n.id as "lineId", n.name as "lineName",
    p.code as product, l.quantity, l.quantity_unit as "quantityUnit", l.starts_at as "lotStartsAt", l.ends_at as "lotEndsAt",
    h.opened_at as "openedAt", h.is_late as "isLate", h.evidence_version as "evidenceVersion",
    ${REMINDERS_OF_HOLD} as reminders,
    coalesce((select json_agg(json_build_object('channelId', c.id, 'channelName', c.name, 'signal', k.signal, 'sentence', k.sentence)
      order by k.id) from hold_causes k join channels c on c.id = k.channel_id where k.hold_id = h.id), '[]') as causes,
    w.name as "setAsideBy", s.confirmed_at as "setAsideAt", s.place as "setAsidePlace",
    (select json_build_object('disposition', (select t.disposition from decision_parts t where t.decision_id = d.id and t.hold_id = h.id
        order by t.id limit 1), 'reason', d.reason, 'note', d.note, 'by', d.printed_name, 'at', d.decided_at, 'meaning', d.meaning)
      from decision_holds dh join decisions d on d.id = dh.decision_id where dh.hold_id = h.id) as decision
  from holds h join lots l on l.id = h.lot_id join lines n on n.id = h.line_id join products p on p.id = l.product_id
  left join set_asides s on s.hold_id = h.id left join people w on w.id = s.confirmed_by`;

export interface HoldFilter {
  plantIds: number[];
  lineId?: number;
  state?: HoldState;
}

/** Open holds oldest first, since they wait; others newest first. */
export function listHolds(
  db: Queryable,
  filter: HoldFilter,
  page: { limit: number; offset: number },
): Promise<HoldRow[]> {
  const direction = filter.state === 'open' ? 'asc' : 'desc';
  return rows<HoldRow>(
    db,
    `${SELECT} where ${conditions(filter)} order by h.opened_at ${direction}, h.id ${direction} limit :limit offset :offset`,
    { ...filter, ...page },
  );
}

export async function getHoldCount(db: Queryable, filter: HoldFilter): Promise<number> {
  const row = await findRow<{ total: number }>(
    db,
    `select count(*) as total from holds h where ${conditions(filter)}`,
    { ...filter },
  );
  return row?.total ?? 0;
}

function conditions({ lineId, state }: HoldFilter): string {
  return ['h.plant_id = any(:plantIds)', lineId && 'h.line_id = :lineId', state && 'h.state = :state']
    .filter(Boolean)
    .join(' and ');
}

export function findHold(db: Queryable, id: number): Promise<HoldRow | undefined> {
  return findRow<HoldRow>(db, `${SELECT} where h.id = :id`, { id });
}

export interface SimilarHoldRow {
  holdId: number;
  lotNumber: string;
  sentence: string;
  disposition: Disposition;
  decidedAt: Date;
}

/** Decided holds with a cause on the same channel by the same signal as one of this hold's, newest decision first. */
export function listSimilarHolds(db: Queryable, holdId: number, most: number): Promise<SimilarHoldRow[]> {
  return rows<SimilarHoldRow>(
    db,
    `select * from (
       select distinct on (o.id) o.id as "holdId", l.number as "lotNumber", k.sentence, t.disposition, d.decided_at as "decidedAt"
       from hold_causes own join hold_causes k on k.channel_id = own.channel_id and k.signal = own.signal and k.hold_id <> own.hold_id
       join holds o on o.id = k.hold_id join lots l on l.id = o.lot_id
       join decision_holds dh on dh.hold_id = o.id join decisions d on d.id = dh.decision_id
       join decision_parts t on t.decision_id = d.id and t.hold_id = o.id
       where own.hold_id = :holdId order by o.id, k.id, t.id
     ) found order by "decidedAt" desc, "holdId" desc limit :most`,
    { holdId, most },
  );
}
