import type { JobName, OwedJobSubject } from '@app/contracts';
import { findRow, type Queryable, rows, type Transaction } from './database';

export interface OwedJob {
  id: number;
  plantId: number;
  name: JobName;
  subject: OwedJobSubject[JobName];
  /** With the one under way. */
  attempts: number;
}

/** Owes a job, in the transaction of what makes it necessary. The same job owed twice is one. */
export async function insertOwedJob<N extends JobName>(
  tx: Transaction,
  job: { plantId: number; name: N; subject: OwedJobSubject[N]; at: Date },
): Promise<number> {
  const [row] = await rows<{ id: number }>(
    tx,
    `insert into owed_jobs (plant_id, name, subject, owed_since) values (:plantId, :name, :subject, :at)
     on conflict (name, subject) where state = 'owed' do update set owed_since = owed_jobs.owed_since returning id`,
    { ...job, subject: JSON.stringify(job.subject) },
  );
  return row.id;
}

/**
 * Takes the job for one attempt, counted at its begin, so that work that ends its process is counted too; undefined when it is no
 * longer owed. Waits while another worker writes its outcome.
 */
export async function beginOwedJob(db: Queryable, id: number): Promise<OwedJob | undefined> {
  return findRow<OwedJob>(
    db,
    `update owed_jobs set attempts = attempts + 1 where id = :id and state = 'owed'
     returning id, plant_id as "plantId", name, subject, attempts`,
    { id },
  );
}

/** Takes the job for the transaction that writes its outcome; false when it was ended meanwhile: nothing may be written then. */
export async function lockOwedJob(tx: Transaction, id: number): Promise<boolean> {
  const job = await findRow(tx, `select id from owed_jobs where id = :id and state = 'owed' for update`, { id });
  return job !== undefined;
}

/** Ids of all that is owed, oldest first. */
export async function listOwedJobIds(db: Queryable): Promise<number[]> {
  return (await rows<{ id: number }>(db, `select id from owed_jobs where state = 'owed' order by id`)).map(
    (row) => row.id,
  );
}

/** Ends a job, in the transaction that wrote its outcome where there is one. */
export async function updateOwedJobEnded(
  db: Queryable,
  id: number,
  state: 'done' | 'failed',
  at: Date,
  error?: string,
): Promise<void> {
  await db('owed_jobs')
    .where({ id, state: 'owed' })
    .update({ state, ended_at: at, last_error: error ?? null });
}

/** Says why the attempt under way failed. */
export async function updateOwedJobError(db: Queryable, id: number, error: string): Promise<void> {
  await db('owed_jobs').where({ id, state: 'owed' }).update({ last_error: error });
}

/** An attempt that a stop of the program cut short does not count. */
export async function updateOwedJobInterrupted(db: Queryable, id: number): Promise<void> {
  await db('owed_jobs')
    .where({ id, state: 'owed' })
    .update({ attempts: db.raw('attempts - 1') });
}
