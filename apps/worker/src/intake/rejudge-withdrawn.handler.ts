import { Inject, Injectable } from '@nestjs/common';
import { JOBS, type OwedJobSubject } from '@app/contracts';
import {
  type Database,
  findIntake,
  getLinePlace,
  insertAuditEntry,
  insertMails,
  type IntakeRow,
  listToldOfWithdrawnHolds,
  listWithdrawnHolds,
  lockOwedJob,
  type OwedJob,
  type Transaction,
  updateOwedJobEnded,
} from '@app/data';
import { withdrawnIntakeMail, zonedText } from '@app/mail';
import { CLOCK, type Clock, CONFIG, type Config, DATABASE, Dispatcher } from '@app/platform';
import { auditHolds } from '../judging/audit-holds';
import { HeldLotsMailService } from '../judging/held-lots-mail.service';
import { JudgingService } from '../judging/judging.service';
import { type HandlerOutcome, NoLongerOwedError, type OwedJobHandler } from '../owed/owed-job-handler';

type Job = OwedJob & { subject: OwedJobSubject['rejudge-withdrawn'] };

/** Judges the channels of a withdrawn intake again without it, and tells those who were told of its holds that they ended. */
@Injectable()
export class RejudgeWithdrawnHandler implements OwedJobHandler<'rejudge-withdrawn'> {
  readonly jobName = JOBS.rejudgeWithdrawn;

  constructor(
    @Inject(DATABASE) private readonly database: Database,
    @Inject(CONFIG) private readonly config: Config,
    @Inject(CLOCK) private readonly clock: Clock,
    private readonly judging: JudgingService,
    private readonly mails: HeldLotsMailService,
    private readonly dispatcher: Dispatcher,
  ) {}

  async run(job: Job): Promise<HandlerOutcome> {
    const intake = (await findIntake(this.database, job.subject.intakeId)) as IntakeRow;
    const mailIds = await this.judging.judge({
      channelIds: intake.channelIds ?? [],
      intakeId: null,
      rejudgeFrom: null,
      finish: async (tx, recorded) => {
        if (!(await lockOwedJob(tx, job.id))) throw new NoLongerOwedError(job.id);
        const at = this.clock.now();
        await auditHolds(tx, recorded.held, at);
        const told = await this.tellEnded(tx, intake, at);
        const occasion = `a new look after the intake of ${intake.fileName} was withdrawn`;
        const held = await this.mails.write(tx, recorded.held, `owed-${job.id}`, occasion, at);
        await updateOwedJobEnded(tx, job.id, 'done', at);
        return [...told, ...held];
      },
    });
    await this.dispatcher.mails(mailIds);
    return { done: true };
  }

  /** Says so in the intake's history; its readings stay withdrawn, and the next intake looks again. */
  async fail(tx: Transaction, job: Job, sentence: string, at: Date): Promise<void> {
    await insertAuditEntry(tx, {
      plantId: job.plantId,
      at,
      actor: null,
      action: 'fail',
      thingKind: 'intake',
      thingId: job.subject.intakeId,
      sentence: `Ebbline could not judge again without the withdrawn intake; verdicts stay as they were until the next intake. ${sentence}`,
    });
  }

  private async tellEnded(tx: Transaction, intake: IntakeRow, at: Date): Promise<number[]> {
    const [holds, recipients] = await Promise.all([
      listWithdrawnHolds(tx, intake.id),
      listToldOfWithdrawnHolds(tx, intake.id),
    ]);
    if (holds.length === 0) return [];
    const place = await getLinePlace(tx, intake.lineId);
    const mail = withdrawnIntakeMail({
      plantName: place.plantName,
      lineName: place.lineName,
      fileName: intake.fileName,
      by: intake.withdrawnByName as string,
      at: zonedText(intake.withdrawnAt as Date, place.timeZone),
      reason: intake.withdrawalReason as string,
      lotNumbers: holds.map(({ lotNumber }) => lotNumber),
      url: `${this.config.publicUrl}/intakes/${intake.id}`,
    });
    const event = `withdrawal-${intake.id}`;
    const mails = recipients.map((recipient) => ({ event, kind: 'withdrawn-intake', recipient, ...mail }));
    return insertMails(tx, intake.plantId, mails, at);
  }
}
