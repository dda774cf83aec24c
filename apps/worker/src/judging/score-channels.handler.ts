import { Inject, Injectable } from '@nestjs/common';
import { JOBS, type OwedJobSubject } from '@app/contracts';
import { insertAuditEntry, lockOwedJob, type OwedJob, type Transaction, updateOwedJobEnded } from '@app/data';
import { CLOCK, type Clock, Dispatcher } from '@app/platform';
import { type HandlerOutcome, NoLongerOwedError, type OwedJobHandler } from '../owed/owed-job-handler';
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
        if (!(await lockOwedJob(tx, job.id))) throw new NoLongerOwedError(job.id);
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

  /** Says so in each channel's history. Their verdicts stay as they were, and the next intake looks again. */
  async fail(tx: Transaction, job: Job, sentence: string, at: Date): Promise<void> {
    for (const channelId of job.subject.channelIds)
      await insertAuditEntry(tx, {
        plantId: job.plantId,
        at,
        actor: null,
        action: 'fail',
        thingKind: 'channel',
        thingId: channelId,
        sentence: `Ebbline could not judge the channel again after ${job.subject.reason}; its verdicts stay as they were until the next intake. ${sentence}`,
      });
  }
}
