import {
  createDatabase,
  findIntake,
  getIntakeBytes,
  getLineContext,
  insertAuditEntry,
  insertIntakeProblems,
  lockOwedJob,
  notifyProgress,
  stageIntake,
  updateIntakeRead,
  updateOwedJobEnded,
} from '@app/data';
import { readWorkbook, WorkbookRefusedError } from '@app/workbook';

export interface ReadIntakeTask {
  databaseUrl: string;
  intakeId: number;
  owedJobId: number;
  /** Epoch ms. */
  now: number;
}

export type ReadIntakeOutcome = { status: 'read' } | { status: 'refused'; sentence: string } | { status: 'skipped' };

const PROGRESS_EVERY_MS = 300;

/** Reads a stored workbook, stages its readings by COPY and records what was recognised, all in one transaction. */
export default async function readIntake(task: ReadIntakeTask): Promise<ReadIntakeOutcome> {
  const db = createDatabase(task.databaseUrl, { min: 0, max: 2 });
  try {
    const intake = await findIntake(db, task.intakeId);
    if (intake?.state !== 'received') return { status: 'skipped' };
    const context = { ...(await getLineContext(db, intake.lineId)), now: task.now };
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
    const isRead = await stageIntake(db, intake, {
      take: (tx) => lockOwedJob(tx, task.owedJobId),
      read: (write) => readWorkbook(bytes, context, write, { onProgress: tell }),
      record: async (tx, report) => {
        const { problems, ...rest } = report;
        await insertIntakeProblems(tx, intake.plantId, intake.id, problems);
        await updateIntakeRead(tx, intake.id, {
          report: rest,
          rowsRead: report.rowsRead,
          rowsNotUsed: report.rowsNotUsed,
          at,
        });
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
    return { status: isRead ? 'read' : 'skipped' };
  } catch (error) {
    if (error instanceof WorkbookRefusedError) return { status: 'refused', sentence: error.detail };
    throw error;
  } finally {
    await db.destroy();
  }
}
