import type { JobName, OwedJobSubject } from '@app/contracts';
import type { OwedJob } from '@app/data';

/** What a handler answers: the work is done now, or there was none left to do. */
export type HandlerOutcome = { done: true } | { done: false; reason: string };

/**
 * Does one kind of owed job. It ends the job's row itself, in the transaction that writes the outcome, and may be run again for the
 * same row at any time. A DomainError is final; anything else is tried again.
 */
export interface OwedJobHandler<N extends JobName = JobName> {
  readonly jobName: N;
  run(job: OwedJob & { subject: OwedJobSubject[N] }): Promise<HandlerOutcome>;
  /** Makes the failure visible to a person: the job will not be tried again. */
  fail(job: OwedJob & { subject: OwedJobSubject[N] }, sentence: string): Promise<void>;
}

export const OWED_JOB_HANDLERS = Symbol('OwedJobHandlers');
