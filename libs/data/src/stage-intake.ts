import type { Client } from 'pg';
import type { Database, Transaction } from './database';
import { type StagedReading, StagedReadingWriter } from './staged-readings';

/** The connection that a transaction runs on, for COPY. */
async function connectionOf(tx: Transaction): Promise<Client> {
  return await (tx.client as { acquireConnection(): Promise<Client> }).acquireConnection();
}

export interface Staging<R> {
  /** Takes the work for this transaction; false when somebody else did it meanwhile. */
  take: (tx: Transaction) => Promise<boolean>;
  /** Hands over readings batch by batch. */
  read: (write: (batch: StagedReading[]) => Promise<void>) => Promise<R>;
  /** Writes the outcome. */
  record: (tx: Transaction, report: R) => Promise<void>;
}

/**
 * Stages an intake's readings by COPY and records what was found, all in one transaction. When anything throws, nothing is staged.
 * Answers false when the work was not there to take.
 */
export async function stageIntake<R>(
  db: Database,
  intake: { id: number; plantId: number },
  { take, read, record }: Staging<R>,
): Promise<boolean> {
  return db.transaction(async (tx) => {
    if (!(await take(tx))) return false;
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
    return true;
  });
}
