import { DomainError, JOBS } from '@app/contracts';
import { insertAuditEntry } from './audit';
import { updateInputsChanged } from './breaks';
import { type Queryable, rows, type Transaction } from './database';
import { lockLineReadings } from './incoming-readings';
import type { IntakeRow } from './intakes';
import { insertOwedJob } from './owed-jobs';
import type { Person } from './people';
import { undoReadings } from './undo-readings';
import { withdrawHolds } from './withdraw-holds';

const MOST_NAMED = 5;

/**
 * Withdraws an intake: what it brought counts for nothing any more, what it superseded is in force again, holds that came of it alone end
 * without a decision, and its channels are owed a new judging. Nothing is deleted but mails about it that nobody was sent.
 * @param intake locked by the caller, who has seen that the person may
 * @returns ids of the jobs that are owed
 * @throws DomainError when it cannot be undone (see `findWithdrawalObstacle`)
 */
export async function withdrawIntake(
  tx: Transaction,
  { intake, person, reason, at }: { intake: IntakeRow; person: Person; reason: string; at: Date },
): Promise<number[]> {
  const isStored = intake.readingsStoredAt !== null;
  if (isStored) {
    await lockLineReadings(tx, intake.lineId);
    await lockChannels(tx, intake);
  }
  const obstacle = await findWithdrawalObstacle(tx, intake);
  if (obstacle) throw obstacle;
  await tx('staged_readings').where({ intake_id: intake.id }).delete();
  await tx('intakes').where({ id: intake.id }).update({
    state: 'withdrawn',
    withdrawn_by: person.id,
    withdrawn_at: at,
    withdrawal_reason: reason,
    settled_changes: null,
  });
  const gone = isStored ? await undoReadings(tx, intake, at) : { readings: 0, lots: [] };
  const holds = isStored ? await withdrawHolds(tx, intake, at) : [];
  if (isStored) await updateInputsChanged(tx, intake.channelIds ?? []);
  await insertAuditEntry(tx, {
    plantId: intake.plantId,
    at,
    actor: person,
    action: 'withdraw',
    thingKind: 'intake',
    thingId: intake.id,
    sentence: `${person.name} withdrew the intake of ${intake.fileName} for ${intake.lineName}, because: ${reason}`,
    before: { state: intake.state },
    after: {
      state: 'withdrawn',
      reason,
      readingsWithdrawn: gone.readings,
      lots: gone.lots.length,
      holds: holds.length,
    },
  });
  for (const lot of gone.lots)
    await insertAuditEntry(tx, {
      plantId: intake.plantId,
      at,
      actor: person,
      action: 'withdraw-readings',
      thingKind: 'lot',
      thingId: lot.id,
      sentence: lot.isWithdrawn
        ? `Lot ${lot.number} was withdrawn with the intake of ${intake.fileName}, which alone had brought readings of it.`
        : `${lot.readings} readings of lot ${lot.number} were withdrawn with the intake of ${intake.fileName}.`,
      after: { intakeId: intake.id, readingsWithdrawn: lot.readings },
    });
  for (const hold of holds)
    await insertAuditEntry(tx, {
      plantId: intake.plantId,
      at,
      actor: null,
      action: 'withdraw',
      thingKind: 'hold',
      thingId: hold.id,
      sentence: `Ebbline ended the hold of lot ${hold.lotNumber} without a decision: the intake of ${intake.fileName} that led to it was withdrawn by ${person.name}.`,
      before: { state: 'open' },
      after: { state: 'withdrawn', intakeId: intake.id },
    });
  if (!isStored || (intake.channelIds ?? []).length === 0) return [];
  const subject = { intakeId: intake.id };
  return [await insertOwedJob(tx, { plantId: intake.plantId, name: JOBS.rejudgeWithdrawn, subject, at })];
}

/** Why the intake cannot be withdrawn now; undefined when it can. */
export async function findWithdrawalObstacle(db: Queryable, intake: IntakeRow): Promise<DomainError | undefined> {
  const { state } = intake;
  const conflict = (code: string, detail: string) => new DomainError('conflict', code, detail);
  if (state === 'withdrawn') return conflict('withdrawn-already', 'This intake was withdrawn already.');
  if (state === 'received')
    return conflict('still-being-read', 'The workbook is still being read. Withdraw it when it is.');
  if (state === 'queued' || state === 'working')
    return conflict('being-scored', 'This intake is being stored and scored. Withdraw it when that is done.');
  if (state === 'refused' && intake.readingsStoredAt === null)
    return conflict('nothing-to-withdraw', 'This intake was refused, so there is nothing of it to withdraw.');
  if (state === 'needs_attention') return undefined;
  const decided = await listLotsDecidedSince(db, intake);
  if (decided.length > 0)
    return conflict(
      'lots-decided',
      `${named('Lot', decided)} ${decided.length === 1 ? 'was' : 'were'} decided on readings of this intake, so it stays. If a reading is wrong, upload the corrected workbook; it supersedes them.`,
    );
  const [later] = await listRelyingIntakes(db, intake.id);
  if (later)
    return conflict(
      'relied-on',
      `${later.readings} of its readings stand for those of ${later.fileName} too, which ${later.receivedBy} uploaded later. Withdraw that intake first, then this one, and upload what is right again.`,
    );
  return undefined;
}

function named(what: string, numbers: string[]): string {
  const shown = numbers.slice(0, MOST_NAMED).join(', ');
  return `${what}${numbers.length === 1 ? '' : 's'} ${shown}${numbers.length > MOST_NAMED ? ` and ${numbers.length - MOST_NAMED} more` : ''}`;
}

/** Channels of all that is changed, before any hold, as deciding and recording verdicts do. */
async function lockChannels(tx: Transaction, intake: IntakeRow): Promise<void> {
  await tx.raw(
    `select 1 from channels where id in (
       select lc.channel_id from lot_channels lc where lc.lot_id in (
         select lot_id from intake_lots where intake_id = :intakeId
         union select h.lot_id from hold_causes k join holds h on h.id = k.hold_id where k.intake_id = :intakeId))
     order by id for update`,
    { intakeId: intake.id },
  );
}

async function listLotsDecidedSince(db: Queryable, intake: IntakeRow): Promise<string[]> {
  const found = await rows<{ number: string }>(
    db,
    `select distinct l.number from intake_lots b join lots l on l.id = b.lot_id join holds h on h.lot_id = l.id
     join decision_holds dh on dh.hold_id = h.id join decisions d on d.id = dh.decision_id
     where b.intake_id = :id and d.decided_at >= :since order by l.number`,
    { id: intake.id, since: intake.readingsStoredAt },
  );
  return found.map(({ number }) => number);
}

function listRelyingIntakes(
  db: Queryable,
  id: number,
): Promise<{ readings: number; fileName: string; receivedBy: string }[]> {
  return rows(
    db,
    `select r.readings, i.file_name as "fileName", p.name as "receivedBy" from intake_reliances r join intakes i on i.id = r.intake_id
     join people p on p.id = i.received_by where r.earlier_intake_id = :id and i.state <> 'withdrawn' order by i.id desc`,
    { id },
  );
}
