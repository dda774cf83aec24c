import type { Client } from 'pg';
import type { Database, Transaction } from './database';
import { type StagedReading, StagedReadingWriter } from './staged-readings';

/** The connection that a transaction runs on, for COPY. */
async function connectionOf(tx: Transaction): Promise<Client> {
  return (await (tx.client as { acquireConnection(): Promise<Client> }).acquireConnection()) as Client;
}

/**
 * Stages an intake's readings by COPY and records what `read` found, all in one transaction: `read` hands over batches, `record` writes
 * the outcome. When either throws, nothing is staged.
 */
export async function stageIntake<R>(
  db: Database,
  intake: { id: number; plantId: number },
  read: (write: (batch: StagedReading[]) => Promise<void>) => Promise<R>,
  record: (tx: Transaction, report: R) => Promise<void>,
): Promise<R> {
  return db.transaction(async (tx) => {
    await tx('staged_readings').where({ intake_id: intake.id }).delete();
    const writer = new StagedReadingWriter(await connectionOf(tx), intake.plantId, intake.id);
    let report: R;
    try {
      report = await read((batch) => writer.write(batch));
    } catch (error) {
      await writer.abort();
      throw error;
    }
    await writer.end();
    await record(tx, report);
    return report;
  });
}
