import type { Disposition, HoldState } from '@app/contracts';
import { findRow, type Queryable, rows, type Transaction } from './database';

export interface HoldForDecision {
  id: number;
  plantId: number;
  lineId: number;
  lineName: string;
  lotId: number;
  lotNumber: string;
  quantity: number | null;
  quantityUnit: string | null;
  state: HoldState;
  evidenceVersion: number;
  engineerMayRelease: boolean;
  isForControlLimitsAlone: boolean;
  /** People who confirmed an intake that a cause came from. */
  confirmerIds: number[];
  isSetAside: boolean;
  sentences: string[];
}

const SELECT = `
  select h.id, h.plant_id as "plantId", h.line_id as "lineId", n.name as "lineName", h.lot_id as "lotId", l.number as "lotNumber",
    l.quantity, l.quantity_unit as "quantityUnit", h.state, h.evidence_version as "evidenceVersion", p.engineer_may_release as "engineerMayRelease",
    not exists (select 1 from hold_causes c where c.hold_id = h.id and c.signal <> 'lot_mean') as "isForControlLimitsAlone",
    array(select distinct i.confirmed_by from hold_causes c join intakes i on i.id = c.intake_id
      where c.hold_id = h.id and i.confirmed_by is not null) as "confirmerIds",
    exists (select 1 from set_asides s where s.hold_id = h.id) as "isSetAside",
    array(select c.sentence from hold_causes c where c.hold_id = h.id order by c.id) as sentences
  from holds h join lots l on l.id = h.lot_id join lines n on n.id = h.line_id join plants p on p.id = h.plant_id where h.id = :id`;

export async function findHoldForDecision(db: Queryable, id: number): Promise<HoldForDecision | undefined> {
  const hold = await findRow<HoldForDecision>(db, SELECT, { id });
  return hold && { ...hold, confirmerIds: hold.confirmerIds.map(Number) };
}

/**
 * The hold as it is now, locked until the transaction ends. The lot's channels are locked before it, as recording verdicts does, so
 * that a decision and a scoring never wait for each other in a circle.
 */
export async function lockHold(tx: Transaction, id: number): Promise<HoldForDecision | undefined> {
  await tx.raw(
    `select 1 from channels where id in (select lc.channel_id from holds h join lot_channels lc on lc.lot_id = h.lot_id where h.id = ?)
     order by id for update`,
    [id],
  );
  await tx.raw('select 1 from holds where id = ? for update', [id]);
  return findHoldForDecision(tx, id);
}

export async function insertSetAside(
  tx: Transaction,
  setAside: { holdId: number; plantId: number; place: string | null; by: number; at: Date },
): Promise<void> {
  await tx('set_asides').insert({
    hold_id: setAside.holdId,
    plant_id: setAside.plantId,
    place: setAside.place,
    confirmed_by: setAside.by,
    confirmed_at: setAside.at,
  });
}

/** Ends a hold with one disposition for the whole lot: the signature, what it covers, and the part. */
export async function insertDecision(
  tx: Transaction,
  hold: HoldForDecision,
  decision: {
    disposition: Disposition;
    reason: string;
    note: string | null;
    by: { id: number; name: string };
    meaning: string;
    at: Date;
  },
): Promise<number> {
  const [row] = await rows<{ id: number }>(
    tx,
    `insert into decisions (plant_id, reason, note, decided_by, printed_name, meaning, decided_at)
     values (:plantId, :reason, :note, :by, :name, :meaning, :at) returning id`,
    {
      plantId: hold.plantId,
      reason: decision.reason,
      note: decision.note,
      by: decision.by.id,
      name: decision.by.name,
      meaning: decision.meaning,
      at: decision.at,
    },
  );
  await tx('decision_holds').insert({
    plant_id: hold.plantId,
    decision_id: row.id,
    hold_id: hold.id,
    evidence_version: hold.evidenceVersion,
  });
  await tx('decision_parts').insert({
    plant_id: hold.plantId,
    decision_id: row.id,
    hold_id: hold.id,
    disposition: decision.disposition,
    quantity: hold.quantity,
  });
  await tx('holds').where({ id: hold.id }).update({ state: 'decided' });
  return row.id;
}

/** The plant's open holds, oldest first. */
export async function listOpenHolds(
  db: Queryable,
  plantId: number,
): Promise<{ id: number; lotNumber: string; evidenceVersion: number }[]> {
  return rows<{ id: number; lotNumber: string; evidenceVersion: number }>(
    db,
    `select h.id, l.number as "lotNumber", h.evidence_version as "evidenceVersion" from holds h join lots l on l.id = h.lot_id
     where h.plant_id = :plantId and h.state = 'open' order by h.opened_at, h.id`,
    { plantId },
  );
}
