import { findRow, type Queryable } from './database';

export interface FailureRules {
  /** From this many wrong passwords in a row on, the next try has to wait. */
  allowed: number;
  firstDelaySeconds: number;
  longestDelaySeconds: number;
  /** A row of failures ends after this long without one. */
  forgottenAfterSeconds: number;
}

/** When the next try of any of the subjects counts; undefined when it does now. */
export async function findBlockedUntil(db: Queryable, subjects: string[], now: Date): Promise<Date | undefined> {
  const found = await findRow<{ until: Date | null }>(
    db,
    `select max(blocked_until) as until from sign_in_failures where subject = any(:subjects) and blocked_until > :now`,
    { subjects, now },
  );
  return found?.until ?? undefined;
}

/**
 * Counts a try as failed unless the subject is blocked, and says whether it was counted. The wait doubles with every failure
 * beyond those allowed. One statement, so that tries at the same time are counted one after the other.
 */
export async function upsertFailure(db: Queryable, subject: string, now: Date, rules: FailureRules): Promise<boolean> {
  const counted = await findRow(
    db,
    `insert into sign_in_failures as f (subject, failures, blocked_until, last_failed_at)
     values (:subject, 1, null, :now)
     on conflict (subject) do update set
       failures = case when f.last_failed_at < :forgottenBefore then 1 else f.failures + 1 end,
       blocked_until = case when f.last_failed_at >= :forgottenBefore and f.failures + 1 >= :allowed
         then cast(:now as timestamptz) + make_interval(secs =>
           least(cast(:longest as float8), cast(:first as float8) * 2.0 ^ least(f.failures + 1 - :allowed, 30)))
         else null end,
       last_failed_at = :now
     where f.blocked_until is null or f.blocked_until <= :now
     returning 1`,
    {
      subject,
      now,
      forgottenBefore: new Date(now.getTime() - rules.forgottenAfterSeconds * 1000),
      allowed: rules.allowed,
      first: rules.firstDelaySeconds,
      longest: rules.longestDelaySeconds,
    },
  );
  return counted !== undefined;
}

/** The right password ends the row of wrong ones. */
export async function deleteFailures(db: Queryable, subject: string): Promise<void> {
  await db('sign_in_failures').where({ subject }).delete();
}

export async function deleteFailuresBefore(db: Queryable, at: Date): Promise<void> {
  await db('sign_in_failures').where('last_failed_at', '<', at).delete();
}
