import { InjectQueue } from '@nestjs/bull';
import { Injectable, Logger } from '@nestjs/common';
import type { Queue } from 'bull';
import {
  JOB_OPTIONS,
  MAIL_QUEUE,
  type MailJobPayload,
  type OwedJobPayload,
  SEND_MAIL_JOB,
  WORK_QUEUE,
} from '@app/contracts';
import { within } from '../within';

/** A request waits no longer than this for a queue that is away. */
const PATIENCE_MS = 3_000;

/**
 * Puts what is owed on the queues, after its transaction has committed. A failure here loses nothing: the timer finds the row.
 */
@Injectable()
export class Dispatcher {
  private readonly logger = new Logger(Dispatcher.name);

  constructor(
    @InjectQueue(WORK_QUEUE) private readonly work: Queue<OwedJobPayload>,
    @InjectQueue(MAIL_QUEUE) private readonly mail: Queue<MailJobPayload>,
  ) {}

  /** For whoever must go on soon: a queue that is away or fails is only said. */
  async owedJobs(ids: number[]): Promise<void> {
    await this.soon(this.queueOwedJobs(ids));
  }

  async mails(ids: number[]): Promise<void> {
    await this.soon(this.queueMails(ids));
  }

  /** For the timer: waits as long as it takes, throws what goes wrong. */
  async queueOwedJobs(ids: number[]): Promise<void> {
    for (const owedJobId of ids)
      await this.work.add(
        { owedJobId },
        { ...JOB_OPTIONS, jobId: `owed-${owedJobId}`, removeOnComplete: true, removeOnFail: true },
      );
  }

  async queueMails(ids: number[]): Promise<void> {
    for (const outboxId of ids)
      await this.mail.add(
        SEND_MAIL_JOB,
        { outboxId },
        { jobId: `mail-${outboxId}`, removeOnComplete: true, removeOnFail: true },
      );
  }

  private async soon(adding: Promise<void>): Promise<void> {
    try {
      if (!(await within(PATIENCE_MS, adding))) this.logger.warn('The queue does not answer; the timer will queue it.');
    } catch (error) {
      this.logger.warn(`Could not queue what is owed now, the timer will: ${String(error)}`);
    }
  }
}
