import { Process, Processor } from '@nestjs/bull';
import { Inject, Logger } from '@nestjs/common';
import type { Job } from 'bull';
import { DomainError, JOB_OPTIONS, JOBS, type JobName, type OwedJobPayload, WORK_QUEUE } from '@app/contracts';
import {
  beginOwedJob,
  type Database,
  lockOwedJob,
  type OwedJob,
  updateOwedJobEnded,
  updateOwedJobError,
  updateOwedJobInterrupted,
} from '@app/data';
import { CLOCK, type Clock, DATABASE } from '@app/platform';
import { type HandlerOutcome, NoLongerOwedError, OWED_JOB_HANDLERS, type OwedJobHandler } from './owed-job-handler';
import { RunningWork } from './running-work';

const GIVEN_UP = 'Ebbline could not do this work; the administrator can see why in the log.';

@Processor(WORK_QUEUE)
export class WorkProcessor {
  private readonly logger = new Logger(WorkProcessor.name);
  private readonly handlers: Map<JobName, OwedJobHandler>;

  constructor(
    @Inject(OWED_JOB_HANDLERS) handlers: OwedJobHandler[],
    @Inject(DATABASE) private readonly database: Database,
    @Inject(CLOCK) private readonly clock: Clock,
    private readonly running: RunningWork,
  ) {
    this.handlers = new Map(handlers.map((handler) => [handler.jobName, handler]));
    const missing = Object.values(JOBS).filter((name) => !this.handlers.has(name));
    if (missing.length > 0) throw new Error(`No handler for ${missing.join(', ')}`);
    if (this.handlers.size !== handlers.length) throw new Error('A job has two handlers');
  }

  @Process({ concurrency: 2 })
  async work({ data }: Job<OwedJobPayload>): Promise<HandlerOutcome> {
    return this.running.track(this.runOwed(data.owedJobId));
  }

  /** Does the owed job if it is still owed. */
  async runOwed(owedJobId: number): Promise<HandlerOutcome> {
    const job = await beginOwedJob(this.database, owedJobId);
    if (!job) return { done: false, reason: 'no longer owed' };
    if (job.attempts > JOB_OPTIONS.attempts)
      return this.giveUp(job, new Error(`given up after ${JOB_OPTIONS.attempts} attempts, the last cut short`));
    try {
      return await (this.handlers.get(job.name) as OwedJobHandler).run(job);
    } catch (error) {
      if (error instanceof NoLongerOwedError) return { done: false, reason: error.message };
      if (this.running.isStopping) {
        await updateOwedJobInterrupted(this.database, job.id);
        throw error;
      }
      await updateOwedJobError(this.database, job.id, String(error));
      if (error instanceof DomainError || job.attempts >= JOB_OPTIONS.attempts) return this.giveUp(job, error);
      this.logger.warn(`${job.name} ${job.id} failed (attempt ${job.attempts}): ${describe(error)}`);
      throw error;
    }
  }

  private async giveUp(job: OwedJob, error: unknown): Promise<HandlerOutcome> {
    const sentence = error instanceof DomainError ? error.detail : GIVEN_UP;
    this.logger.error(`${job.name} ${job.id} failed for good: ${describe(error)}`);
    const at = this.clock.now();
    await this.database.transaction(async (tx) => {
      if (!(await lockOwedJob(tx, job.id))) return;
      await (this.handlers.get(job.name) as OwedJobHandler).fail(tx, job, sentence, at);
      await updateOwedJobEnded(tx, job.id, 'failed', at, String(error));
    });
    return { done: false, reason: sentence };
  }
}

const describe = (error: unknown) => (error instanceof Error ? (error.stack ?? error.message) : String(error));
