import { Inject, Injectable } from '@nestjs/common';
import { JOBS, type OwedJobSubject } from '@app/contracts';
import { type OwedJob, updateOwedJobEnded } from '@app/data';
import { CLOCK, type Clock, Dispatcher } from '@app/platform';
import type { HandlerOutcome, OwedJobHandler } from '../owed/owed-job-handler';
import { auditHolds } from './audit-holds';
import { HeldLotsMailService } from './held-lots-mail.service';
import { JudgingService } from './judging.service';

type Job = OwedJob & { subject: OwedJobSubject['score-channels'] };

/** Judges channels again when something other than readings changed: a break, an approval. */
@Injectable()
export class ScoreChannelsHandler implements OwedJobHandler<'score-channels'> {
  readonly jobName = JOBS.scoreChannels;

  constructor(
    @Inject(CLOCK) private readonly clock: Clock,
    private readonly judging: JudgingService,
    private readonly mails: HeldLotsMailService,
    private readonly dispatcher: Dispatcher,
  ) {}

  async run(job: Job): Promise<HandlerOutcome> {
    const { channelIds, reason, rejudgeFrom } = job.subject;
    const mailIds = await this.judging.judge({
      channelIds,
      intakeId: null,
      rejudgeFrom: rejudgeFrom === null ? null : new Date(rejudgeFrom).getTime() / 1000,
      finish: async (tx, recorded) => {
        const at = this.clock.now();
        await auditHolds(tx, recorded.held, at);
        const ids = await this.mails.write(tx, recorded.held, `owed-${job.id}`, `a new look after ${reason}`, at);
        await updateOwedJobEnded(tx, job.id, 'done', at);
        return ids;
      },
    });
    await this.dispatcher.mails(mailIds);
    return { done: true };
  }

  /** Its row says that it failed; the channels' verdicts stay as they were, and the next intake looks again. */
  fail(): Promise<void> {
    return Promise.resolve();
  }
}
