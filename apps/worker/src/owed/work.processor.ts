import { Process, Processor } from '@nestjs/bull';
import { Inject, Logger } from '@nestjs/common';
import type { Job } from 'bull';
import { DomainError, JOBS, type JobName, type OwedJobPayload, WORK_QUEUE } from '@app/contracts';
import { type Database, findOwedJob, updateOwedJobAttempt, updateOwedJobEnded } from '@app/data';
import { CLOCK, type Clock, DATABASE } from '@app/platform';
import { type HandlerOutcome, OWED_JOB_HANDLERS, type OwedJobHandler } from './owed-job-handler';

/** Tries over all queues and restarts, after which a person must look. */
const MAX_ATTEMPTS = 12;

@Processor(WORK_QUEUE)
export class WorkProcessor {
  private readonly logger = new Logger(WorkProcessor.name);
  private readonly handlers: Map<JobName, OwedJobHandler>;

  constructor(
    @Inject(OWED_JOB_HANDLERS) handlers: OwedJobHandler[],
    @Inject(DATABASE) private readonly database: Database,
    @Inject(CLOCK) private readonly clock: Clock,
  ) {
    this.handlers = new Map(handlers.map((handler) => [handler.jobName, handler]));
    const missing = Object.values(JOBS).filter((name) => !this.handlers.has(name));
    if (missing.length > 0) throw new Error(`No handler for ${missing.join(', ')}`);
    if (this.handlers.size !== handlers.length) throw new Error('A job has two handlers');
  }

  @Process({ concurrency: 2 })
  async work({ data }: Job<OwedJobPayload>): Promise<HandlerOutcome> {
    return this.runOwed(data.owedJobId);
  }

  /** Does the owed job if it is still owed. */
  async runOwed(owedJobId: number): Promise<HandlerOutcome> {
    const job = await findOwedJob(this.database, owedJobId);
    if (!job) return { done: false, reason: 'no longer owed' };
    const handler = this.handlers.get(job.name) as OwedJobHandler;
    try {
      return await handler.run(job);
    } catch (error) {
      await updateOwedJobAttempt(this.database, job.id, String(error));
      const isFinal = error instanceof DomainError || job.attempts + 1 >= MAX_ATTEMPTS;
      if (!isFinal) throw error;
      const sentence =
        error instanceof DomainError
          ? error.detail
          : 'Ebbline could not do this work; the administrator can see why in the log.';
      this.logger.error(
        `${job.name} ${job.id} failed for good: ${error instanceof Error ? (error.stack ?? error.message) : String(error)}`,
      );
      await handler.fail(job, sentence);
      await updateOwedJobEnded(this.database, job.id, 'failed', this.clock.now(), String(error));
      return { done: false, reason: sentence };
    }
  }
}
