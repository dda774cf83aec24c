import type { JobName, OwedJobSubject } from '@app/contracts';
import { type Queryable, rows, type Transaction } from './database';

export interface OwedJob {
  id: number;
  plantId: number;
  name: JobName;
  subject: OwedJobSubject[JobName];
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

/** The job if it is still owed. */
export async function findOwedJob(db: Queryable, id: number): Promise<OwedJob | undefined> {
  const [row] = await rows<OwedJob>(
    db,
    `select id, plant_id as "plantId", name, subject, attempts from owed_jobs where id = :id and state = 'owed'`,
    { id },
  );
  return row;
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

export async function updateOwedJobAttempt(db: Queryable, id: number, error: string | null): Promise<void> {
  await db('owed_jobs')
    .where({ id })
    .update({ attempts: db.raw('attempts + 1'), last_error: error });
}
