import {
  compareIntake,
  confirmIntake,
  createDatabase,
  type Database,
  findIntake,
  getIntakeBytes,
  getLineContext,
  insertAuditEntry,
  insertIntakeProblems,
  type IntakeRow,
  listLayouts,
  listLotNumbers,
  lockOwedJob,
  notifyProgress,
  stageIntake,
  type Transaction,
  updateIntakeRead,
  updateOwedJobEnded,
} from '@app/data';
import type { IntakeComparison } from '@app/contracts';
import { type LineContext, readWorkbook, type WorkbookReport, WorkbookRefusedError } from '@app/workbook';

export interface ReadIntakeTask {
  databaseUrl: string;
  intakeId: number;
  owedJobId: number;
  /** Epoch ms. */
  now: number;
}

export type ReadIntakeOutcome =
  | { status: 'read'; /** What it made necessary. */ owedJobIds: number[] }
  | { status: 'refused'; sentence: string }
  | { status: 'skipped' };

const PROGRESS_EVERY_MS = 300;

/** Reads a stored workbook, stages its readings by COPY and records what was recognised, all in one transaction. */
export default async function readIntake(task: ReadIntakeTask): Promise<ReadIntakeOutcome> {
  const db = createDatabase(task.databaseUrl, { min: 0, max: 2 });
  try {
    const intake = await findIntake(db, task.intakeId);
    if (intake?.state !== 'received') return { status: 'skipped' };
    const context = await readingContext(db, intake, task.now);
    const bytes = await getIntakeBytes(db, intake.id);
    let toldAt = 0;
    const tell = (rowsRead: number) => {
      if (performance.now() - toldAt < PROGRESS_EVERY_MS) return;
      toldAt = performance.now();
      void notifyProgress(db, {
        intakeId: intake.id,
        stage: 'reading',
        rowsRead,
        channelsScored: 0,
        channelsTotal: 0,
        sentence: `Reading the workbook: ${rowsRead} rows so far.`,
      }).catch(() => undefined);
    };
    const at = new Date(task.now);
    const owedJobIds: number[] = [];
    const isRead = await stageIntake(db, intake, {
      take: (tx) => lockOwedJob(tx, task.owedJobId),
      read: (write) => readWorkbook(bytes, context, write, { onProgress: tell, answers: intake.answers }),
      record: async (tx, report) => {
        const { problems, ...rest } = report;
        await insertIntakeProblems(tx, intake.plantId, intake.id, problems);
        await updateIntakeRead(tx, intake.id, {
          report: rest,
          rowsRead: report.rowsRead,
          rowsNotUsed: report.rowsNotUsed,
          at,
        });
        const comparison = await compareIntake(tx, { ...intake, rowsRead: report.rowsRead }, at);
        await insertAuditEntry(tx, {
          plantId: intake.plantId,
          at,
          actor: null,
          action: 'read',
          thingKind: 'intake',
          thingId: intake.id,
          sentence: `Ebbline read ${report.rowsRead} rows of ${intake.fileName}, ${report.rowsNotUsed} of them not used.`,
          before: { state: 'received' },
          after: { state: 'needs_attention' },
        });
        if (intake.confirmsItself && leavesNothingToSay(report) && storesAllAsItIs(comparison))
          owedJobIds.push(await confirmForReceiver(tx, intake, at));
        await updateOwedJobEnded(tx, task.owedJobId, 'done', at);
        await notifyProgress(tx, {
          intakeId: intake.id,
          stage: 'read',
          rowsRead: report.rowsRead,
          channelsScored: 0,
          channelsTotal: 0,
          sentence: `Read ${report.rowsRead} rows. Look at what was recognised, then confirm.`,
        });
      },
    });
    return isRead ? { status: 'read', owedJobIds } : { status: 'skipped' };
  } catch (error) {
    if (error instanceof WorkbookRefusedError) return { status: 'refused', sentence: error.detail };
    throw error;
  } finally {
    await db.destroy();
  }
}

/** What is known of the line: its channels and products, the layouts that were confirmed on it, the numbers of its lots. */
async function readingContext(db: Database, { lineId }: IntakeRow, now: number): Promise<LineContext> {
  const [context, remembered, lots] = await Promise.all([
    getLineContext(db, lineId),
    listLayouts(db, lineId),
    listLotNumbers(db, lineId),
  ]);
  return { ...context, now, remembered, lots };
}

/** Every layout is known, no row or cell is left out, nothing is asked. */
function leavesNothingToSay({ isBlocked, questions, grids, problemCounts, readingsParsed }: WorkbookReport): boolean {
  const isKnown = grids.every(({ isRemembered, headerRow }) => isRemembered || headerRow === null);
  const isWhole = problemCounts.every(({ severity }) => severity === 'notice');
  return readingsParsed > 0 && !isBlocked && questions.length === 0 && isKnown && isWhole;
}

/** No reading differs from a stored one or cannot be placed. */
const storesAllAsItIs = ({ readingsDiffering, rowsNotUsed }: IntakeComparison) =>
  readingsDiffering === 0 && rowsNotUsed === 0;

/** As who sent it had asked. Gives the id of the scoring that is owed now. */
async function confirmForReceiver(
  tx: Transaction,
  { id, receivedBy, receivedByName }: IntakeRow,
  at: Date,
): Promise<number> {
  const intake = (await findIntake(tx, id)) as IntakeRow;
  return confirmIntake(tx, { intake, person: { id: receivedBy, name: receivedByName, email: '' }, at });
}
