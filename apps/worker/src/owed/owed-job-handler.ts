import type { JobName, OwedJobSubject } from '@app/contracts';
import type { OwedJob, Transaction } from '@app/data';

/** What a handler answers: the work is done now, or there was none left to do. */
export type HandlerOutcome = { done: true } | { done: false; reason: string };

/**
 * Does one kind of owed job. It takes (`lockOwedJob`) and ends the job's row in the transaction that writes the outcome, and may be
 * run again for the same row at any time, also by two workers at once. A DomainError is final; anything else is tried again.
 */
export interface OwedJobHandler<N extends JobName = JobName> {
  readonly jobName: N;
  run(job: OwedJob & { subject: OwedJobSubject[N] }): Promise<HandlerOutcome>;
  /** Makes the failure visible to a person, in the transaction that ends the job's row: it will not be tried again. */
  fail(tx: Transaction, job: OwedJob & { subject: OwedJobSubject[N] }, sentence: string, at: Date): Promise<void>;
}

/** Thrown inside the outcome's transaction when another worker has ended the job meanwhile: nothing of it may be written. */
export class NoLongerOwedError extends Error {
  constructor(owedJobId: number) {
    super(`job ${owedJobId} is no longer owed`);
    this.name = 'NoLongerOwedError';
  }
}

export const OWED_JOB_HANDLERS = Symbol('OwedJobHandlers');
