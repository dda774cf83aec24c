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

  async owedJobs(ids: number[]): Promise<void> {
    await this.add(ids, (owedJobId) =>
      this.work.add(
        { owedJobId },
        { ...JOB_OPTIONS, jobId: `owed-${owedJobId}`, removeOnComplete: true, removeOnFail: true },
      ),
    );
  }

  async mails(ids: number[]): Promise<void> {
    await this.add(ids, (outboxId) =>
      this.mail.add(
        SEND_MAIL_JOB,
        { outboxId },
        { jobId: `mail-${outboxId}`, removeOnComplete: true, removeOnFail: true },
      ),
    );
  }

  private async add(ids: number[], add: (id: number) => Promise<unknown>): Promise<void> {
    try {
      for (const id of ids) await add(id);
    } catch (error) {
      this.logger.warn(`Could not queue what is owed now, the timer will: ${String(error)}`);
    }
  }
}
