import { rows, type Transaction } from './database';
import type { IntakeRow } from './intakes';

export interface WithdrawnHold {
  id: number;
  lotId: number;
  lotNumber: string;
}

/**
 * Ends, without a decision, the open holds to which only scoring this intake led, and those of lots of which no reading is left. Mails
 * about its holds that nobody is sending yet are taken back.
 */
export async function withdrawHolds(tx: Transaction, intake: IntakeRow, at: Date): Promise<WithdrawnHold[]> {
  const ended = await rows<WithdrawnHold>(
    tx,
    `update holds h set state = 'withdrawn', withdrawn_at = :at, withdrawn_intake_id = :intakeId from lots l
     where l.id = h.lot_id and h.state = 'open' and (
       (exists (select 1 from hold_causes k where k.hold_id = h.id and k.intake_id = :intakeId)
         and not exists (select 1 from hold_causes k where k.hold_id = h.id and k.intake_id is distinct from :intakeId))
       or (l.withdrawn_at is not null and l.id in (select lot_id from intake_lots where intake_id = :intakeId)))
     returning h.id, h.lot_id as "lotId", l.number as "lotNumber"`,
    { intakeId: intake.id, at },
  );
  await deleteUnsentMails(tx, intake.id, at);
  return ended.sort((a, b) => a.id - b.id);
}

async function deleteUnsentMails(tx: Transaction, intakeId: number, at: Date): Promise<void> {
  await tx.raw(
    `delete from outbox where kind = 'held-lots' and event like :event and state = 'waiting' and (leased_until is null or leased_until <= :at)`,
    { event: `intake-${intakeId}-line-%`, at },
  );
}

/** The holds that ended with an intake. */
export function listWithdrawnHolds(tx: Transaction, intakeId: number): Promise<WithdrawnHold[]> {
  return rows<WithdrawnHold>(
    tx,
    `select h.id, l.id as "lotId", l.number as "lotNumber" from holds h join lots l on l.id = h.lot_id
     where h.withdrawn_intake_id = :intakeId order by l.starts_at, l.id`,
    { intakeId },
  );
}

/** Who was told, or is just being told, of holds that ended with an intake. */
export async function listToldOfWithdrawnHolds(tx: Transaction, intakeId: number): Promise<string[]> {
  const told = await rows<{ recipient: string }>(
    tx,
    `select distinct o.recipient from outbox o where o.kind = 'held-lots' and (o.event like any (
       select distinct 'intake-' || k.intake_id || '-line-%' from hold_causes k join holds h on h.id = k.hold_id
       where h.withdrawn_intake_id = :intakeId and k.intake_id is not null)) order by 1`,
    { intakeId },
  );
  return told.map(({ recipient }) => recipient);
}
