import type { IntakeComparison, IntakeState, WorkbookAnswers } from '@app/contracts';
import { findRow, type Queryable, rows, type Transaction } from './database';

export interface IntakeRow {
  id: number;
  plantId: number;
  lineId: number;
  lineName: string;
  state: IntakeState;
  fileName: string;
  byteCount: number;
  sha256: Buffer;
  report: unknown;
  failure: string | null;
  rowsRead: number;
  rowsUsed: number;
  rowsAlreadyThere: number;
  rowsNotUsed: number;
  readingsStored: number;
  readingsAlreadyThere: number;
  receivedBy: number;
  receivedByName: string;
  receivedAt: Date;
  confirmedBy: number | null;
  confirmedByName: string | null;
  confirmedAt: Date | null;
  readingsStoredAt: Date | null;
  channelIds: number[] | null;
  scoredAt: Date | null;
  /** What a person answered about how it is to be read. */
  answers: WorkbookAnswers;
  /** It is confirmed for its receiver as soon as it is read, if nothing is left to say. */
  confirmsItself: boolean;
  /** Held against what was stored when it was read or last looked at; null before that. */
  comparison: IntakeComparison | null;
  /** Where a stored reading has another value: it stands, or the workbook's supersedes it. */
  differing: 'keep' | 'supersede';
  rowsSuperseding: number;
  /** A part of `readingsStored`. */
  readingsSuperseding: number;
  withdrawnBy: number | null;
  withdrawnByName: string | null;
  withdrawnAt: Date | null;
  withdrawalReason: string | null;
}

export interface IntakeProblemRow {
  sheet: string;
  row: number | null;
  column: string | null;
  code: string;
  detail: string;
  severity: 'blocking' | 'row_not_used' | 'cell_not_used' | 'notice';
}

const COLUMNS = `
  i.id, i.plant_id as "plantId", i.line_id as "lineId", l.name as "lineName", i.state, i.file_name as "fileName",
  i.byte_count as "byteCount", i.sha256, i.report, i.failure, i.rows_read as "rowsRead", i.rows_used as "rowsUsed",
  i.rows_already_there as "rowsAlreadyThere", i.rows_not_used as "rowsNotUsed", i.readings_stored as "readingsStored",
  i.readings_already_there as "readingsAlreadyThere", i.received_by as "receivedBy", r.name as "receivedByName",
  i.received_at as "receivedAt", i.confirmed_by as "confirmedBy", c.name as "confirmedByName", i.confirmed_at as "confirmedAt",
  i.readings_stored_at as "readingsStoredAt", i.channel_ids::text[]::float8[] as "channelIds", i.scored_at as "scoredAt",
  i.answers, i.confirms_itself as "confirmsItself", i.comparison - 'seen' as comparison, i.differing,
  i.rows_superseding as "rowsSuperseding", i.readings_superseding as "readingsSuperseding", i.withdrawn_by as "withdrawnBy",
  w.name as "withdrawnByName", i.withdrawn_at as "withdrawnAt", i.withdrawal_reason as "withdrawalReason"`;
const SOURCE = `from intakes i join lines l on l.id = i.line_id join people r on r.id = i.received_by
  left join people c on c.id = i.confirmed_by left join people w on w.id = i.withdrawn_by`;

/** Stores the workbook whole: row, hash and bytes in the caller's transaction. */
export async function insertIntake(
  tx: Transaction,
  intake: {
    plantId: number;
    lineId: number;
    fileName: string;
    bytes: Buffer;
    sha256: Buffer;
    receivedBy: number;
    receivedAt: Date;
    confirmsItself?: boolean;
  },
): Promise<number> {
  const [row] = await rows<{ id: number }>(
    tx,
    `insert into intakes (plant_id, line_id, state, file_name, byte_count, sha256, received_by, received_at, confirms_itself)
     values (:plantId, :lineId, 'received', :fileName, :byteCount, :sha256, :receivedBy, :receivedAt, :confirmsItself) returning id`,
    {
      plantId: intake.plantId,
      lineId: intake.lineId,
      fileName: intake.fileName,
      byteCount: intake.bytes.length,
      sha256: intake.sha256,
      receivedBy: intake.receivedBy,
      receivedAt: intake.receivedAt,
      confirmsItself: intake.confirmsItself ?? false,
    },
  );
  await tx('intake_bytes').insert({ intake_id: row.id, plant_id: intake.plantId, bytes: intake.bytes });
  return row.id;
}

export async function findIntake(db: Queryable, id: number): Promise<IntakeRow | undefined> {
  return findRow<IntakeRow>(db, `select ${COLUMNS} ${SOURCE} where i.id = :id`, { id });
}

/** The intake, locked until the transaction ends. */
export async function lockIntake(tx: Transaction, id: number): Promise<IntakeRow | undefined> {
  await tx.raw('select 1 from intakes where id = ? for update', [id]);
  return findIntake(tx, id);
}

export async function listIntakes(
  db: Queryable,
  lineId: number,
  page: number,
  pageSize: number,
): Promise<{ items: IntakeRow[]; total: number }> {
  const items = await rows<IntakeRow>(
    db,
    `select ${COLUMNS} ${SOURCE} where i.line_id = :lineId order by i.received_at desc, i.id desc limit :limit offset :offset`,
    { lineId, limit: pageSize, offset: (page - 1) * pageSize },
  );
  const count = await findRow<{ total: number }>(db, 'select count(*) as total from intakes where line_id = :lineId', {
    lineId,
  });
  return { items, total: count?.total ?? 0 };
}

/** The earliest other intake of the same bytes at the plant. */
export async function findSameFile(db: Queryable, intake: IntakeRow): Promise<IntakeRow | undefined> {
  return findRow<IntakeRow>(
    db,
    `select ${COLUMNS} ${SOURCE} where i.plant_id = :plantId and i.sha256 = :sha256 and i.id < :id order by i.id limit 1`,
    { plantId: intake.plantId, sha256: intake.sha256, id: intake.id },
  );
}

export async function getIntakeBytes(db: Queryable, id: number): Promise<Buffer> {
  const row = await findRow<{ bytes: Buffer }>(db, 'select bytes from intake_bytes where intake_id = :id', { id });
  if (!row) throw new Error(`intake ${id} has no bytes`);
  return row.bytes;
}

export async function updateIntakeRead(
  tx: Transaction,
  id: number,
  read: { report: unknown; rowsRead: number; rowsNotUsed: number; at: Date },
): Promise<void> {
  await tx('intakes')
    .where({ id, state: 'received' })
    .update({
      state: 'needs_attention',
      report: JSON.stringify(read.report),
      rows_read: read.rowsRead,
      rows_not_used: read.rowsNotUsed,
      read_at: read.at,
    });
}

/** Puts a workbook that was read back to its reading, with what was answered; what was staged and found goes. */
export async function updateIntakeReadAgain(tx: Transaction, id: number, answers: WorkbookAnswers): Promise<void> {
  await tx('staged_readings').where({ intake_id: id }).delete();
  await tx('intake_problems').where({ intake_id: id }).delete();
  await tx('intakes')
    .where({ id, state: 'needs_attention' })
    .update({
      state: 'received',
      answers: JSON.stringify(answers),
      report: null,
      comparison: null,
      rows_read: 0,
      rows_not_used: 0,
    });
}

export async function updateIntakeRefused(tx: Transaction, id: number, failure: string): Promise<void> {
  await tx('intakes')
    .where({ id })
    .whereIn('state', ['received', 'needs_attention', 'queued', 'working'])
    .update({ state: 'refused', failure });
}

export async function updateIntakeConfirmed(
  tx: Transaction,
  id: number,
  { by, at, differing = 'keep' }: { by: number; at: Date; differing?: IntakeRow['differing'] },
): Promise<void> {
  await tx('intakes').where({ id }).update({ state: 'queued', confirmed_by: by, confirmed_at: at, differing });
}

/** Records, in the transaction that stored them, what became of a confirmed intake's rows. */
export async function updateIntakeStored(
  tx: Transaction,
  id: number,
  stored: {
    channelIds: number[];
    lotIds: number[];
    rowsUsed: number;
    rowsAlreadyThere: number;
    rowsSuperseding: number;
    rowsNotUsed: number;
    readingsStored: number;
    readingsAlreadyThere: number;
    readingsSuperseding: number;
    at: Date;
  },
): Promise<void> {
  await tx('intakes').where({ id }).update({
    state: 'working',
    channel_ids: stored.channelIds,
    lot_ids: stored.lotIds,
    rows_used: stored.rowsUsed,
    rows_already_there: stored.rowsAlreadyThere,
    rows_superseding: stored.rowsSuperseding,
    rows_not_used: stored.rowsNotUsed,
    readings_stored: stored.readingsStored,
    readings_already_there: stored.readingsAlreadyThere,
    readings_superseding: stored.readingsSuperseding,
    readings_stored_at: stored.at,
  });
}

export async function updateIntakeScored(tx: Transaction, id: number, at: Date): Promise<void> {
  await tx.raw(
    `update intakes set state = 'scored', scored_at = :at, lots_scored = (
       select count(distinct v.lot_id) from verdicts v
       where v.lot_id = any(intakes.lot_ids) and v.is_current and v.control_state <> 'not_scored')
     where id = :id`,
    { id, at },
  );
}

export async function insertIntakeProblems(
  tx: Transaction,
  plantId: number,
  intakeId: number,
  problems: IntakeProblemRow[],
): Promise<void> {
  if (problems.length === 0) return;
  await tx.raw(
    `insert into intake_problems (plant_id, intake_id, sheet, "row", "column", code, detail, severity)
     select :plantId, :intakeId, p.sheet, p."row", p."column", p.code, p.detail, p.severity
     from jsonb_to_recordset(:problems) as p(sheet text, "row" integer, "column" text, code text, detail text, severity text)`,
    { plantId, intakeId, problems: JSON.stringify(problems) },
  );
}

export async function listIntakeProblems(db: Queryable, intakeId: number, limit: number): Promise<IntakeProblemRow[]> {
  return rows<IntakeProblemRow>(
    db,
    `select sheet, "row", "column", code, detail, severity from intake_problems where intake_id = :intakeId order by id limit :limit`,
    { intakeId, limit },
  );
}

/** Lots scored by an intake and the holds that its scoring gave causes for. */
export async function getIntakeOutcome(
  db: Queryable,
  intakeId: number,
): Promise<{ lotsScored: number; held: { holdId: number; lotNumber: string; sentences: string[] }[] }> {
  const scored = await findRow<{ lots: number | null }>(
    db,
    'select lots_scored as lots from intakes where id = :intakeId',
    { intakeId },
  );
  const held = await rows<{ holdId: number; lotNumber: string; sentences: string[] }>(
    db,
    `select h.id as "holdId", l.number as "lotNumber", array_agg(c.sentence order by c.id) as sentences
     from hold_causes c join holds h on h.id = c.hold_id join lots l on l.id = h.lot_id
     where c.intake_id = :intakeId group by h.id, l.number, l.starts_at order by l.starts_at, h.id`,
    { intakeId },
  );
  return { lotsScored: scored?.lots ?? 0, held };
}
