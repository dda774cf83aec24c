import { Inject, Injectable } from '@nestjs/common';
import { JOBS, type OwedJobSubject } from '@app/contracts';
import {
  type Database,
  findIntake,
  insertAuditEntry,
  type IntakeRow,
  listAskedChannelIds,
  lockOwedJob,
  type OwedJob,
  type Transaction,
  updateOwedJobEnded,
} from '@app/data';
import { CLOCK, type Clock, DATABASE, Dispatcher } from '@app/platform';
import { type HandlerOutcome, NoLongerOwedError, type OwedJobHandler } from '../owed/owed-job-handler';
import { auditHolds } from './audit-holds';
import { HeldLotsMailService } from './held-lots-mail.service';
import { JudgingService } from './judging.service';

type Job = OwedJob & { subject: OwedJobSubject['rejudge-settled'] };

/** Judges again the settled verdicts that an intake's readings would change, as a person asked. */
@Injectable()
export class RejudgeSettledHandler implements OwedJobHandler<'rejudge-settled'> {
  readonly jobName = JOBS.rejudgeSettled;

  constructor(
    @Inject(DATABASE) private readonly database: Database,
    @Inject(CLOCK) private readonly clock: Clock,
    private readonly judging: JudgingService,
    private readonly mails: HeldLotsMailService,
    private readonly dispatcher: Dispatcher,
  ) {}

  async run(job: Job): Promise<HandlerOutcome> {
    const intake = (await findIntake(this.database, job.subject.intakeId)) as IntakeRow;
    const mailIds = await this.judging.judge({
      channelIds: await listAskedChannelIds(this.database, intake.id),
      intakeId: intake.id,
      rejudgeFrom: null,
      finish: async (tx, recorded) => {
        if (!(await lockOwedJob(tx, job.id))) throw new NoLongerOwedError(job.id);
        const at = this.clock.now();
        await auditHolds(tx, recorded.held, at);
        const occasion = `a new look at settled verdicts after the intake of ${intake.fileName}`;
        const ids = await this.mails.write(tx, recorded.held, `owed-${job.id}`, occasion, at);
        await updateOwedJobEnded(tx, job.id, 'done', at);
        return ids;
      },
    });
    await this.dispatcher.mails(mailIds);
    return { done: true };
  }

  /** Says so in the intake's history; the verdicts stay as they were, and the next intake looks again. */
  async fail(tx: Transaction, job: Job, sentence: string, at: Date): Promise<void> {
    await insertAuditEntry(tx, {
      plantId: job.plantId,
      at,
      actor: null,
      action: 'fail',
      thingKind: 'intake',
      thingId: job.subject.intakeId,
      sentence: `Ebbline could not judge the settled verdicts again; they stay as they were until the next intake. ${sentence}`,
    });
  }
}
