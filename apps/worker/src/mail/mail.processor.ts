import { Process, Processor } from '@nestjs/bull';
import type { Job } from 'bull';
import { MAIL_QUEUE, type MailJobPayload, SEND_MAIL_JOB } from '@app/contracts';
import { RunningWork } from '../owed/running-work';
import { MailSendingService, type SendOutcome } from './mail-sending.service';

@Processor(MAIL_QUEUE)
export class MailProcessor {
  constructor(
    private readonly sending: MailSendingService,
    private readonly running: RunningWork,
  ) {}

  @Process({ name: SEND_MAIL_JOB, concurrency: 4 })
  send({ data }: Job<MailJobPayload>): Promise<SendOutcome> {
    return this.running.track(this.sending.send(data.outboxId));
  }
}
