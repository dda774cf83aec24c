import { Inject, Injectable } from '@nestjs/common';
import { type IntakeProgress, JOBS } from '@app/contracts';
import {
  type Database,
  findIntake,
  findSupersedable,
  insertAuditEntry,
  insertOwedJob,
  type IntakeRow,
  listAffectedChannels,
  lockIntake,
  lockOwedJob,
  notifyProgress,
  type OwedJob,
  type Recorded,
  storeReadings,
  type Transaction,
  updateIntakeRefused,
  updateIntakeScored,
  updateIntakeStored,
  updateOwedJobEnded,
} from '@app/data';
import { CLOCK, type Clock, DATABASE, Dispatcher } from '@app/platform';
import { type HandlerOutcome, NoLongerOwedError, type OwedJobHandler } from '../owed/owed-job-handler';
import { auditHolds } from './audit-holds';
import { auditSuperseded } from './audit-superseded';
import { HeldLotsMailService } from './held-lots-mail.service';
import { JudgingService } from './judging.service';

type Job = OwedJob & { subject: { intakeId: number } };
/** What is to be sent and done once its outcome is committed. */
type Owed = { mailIds: number[]; owedJobIds: number[] };

/**
 * Takes a confirmed intake to its end: readings stored in one transaction, then verdicts, holds, audit and mails in another.
 * Either may be repeated after a crash; what is committed is not done again.
 */
@Injectable()
export class ScoreIntakeHandler implements OwedJobHandler<'score-intake'> {
  readonly jobName = JOBS.scoreIntake;

  constructor(
    @Inject(DATABASE) private readonly database: Database,
    @Inject(CLOCK) private readonly clock: Clock,
    private readonly judging: JudgingService,
    private readonly mails: HeldLotsMailService,
    private readonly dispatcher: Dispatcher,
  ) {}

  async run(job: Job): Promise<HandlerOutcome> {
    const intake = await this.store(job.subject.intakeId);
    if (!intake) {
      await updateOwedJobEnded(this.database, job.id, 'done', this.clock.now());
      return { done: false, reason: 'the intake is not waiting to be scored' };
    }
    const channelIds = intake.channelIds ?? [];
    const { mailIds, owedJobIds } = await this.judging.judge({
      channelIds,
      intakeId: intake.id,
      rejudgeFrom: null,
      onScored: (scored, total) =>
        this.tell(intake, 'judging', scored, total, `Judging: ${scored} of ${total} channels scored.`),
      finish: (tx, recorded) => this.finish(tx, job, intake, recorded),
    });
    await this.dispatcher.mails(mailIds);
    await this.dispatcher.owedJobs(owedJobIds);
    return { done: true };
  }

  /** Refuses the intake; readings that are stored already stay and are judged with the next intake. */
  async fail(tx: Transaction, job: Job, sentence: string, at: Date): Promise<void> {
    const intake = await lockIntake(tx, job.subject.intakeId);
    if (intake?.state !== 'queued' && intake?.state !== 'working') return;
    await updateIntakeRefused(tx, intake.id, sentence);
    await insertAuditEntry(tx, {
      plantId: job.plantId,
      at,
      actor: null,
      action: 'refuse',
      thingKind: 'intake',
      thingId: intake.id,
      sentence: `Ebbline could not score ${intake.fileName}: ${sentence}`,
      before: { state: intake.state },
      after: { state: 'refused' },
    });
    await notifyProgress(tx, this.progress(intake, 'failed', 0, 0, sentence));
  }

  /** Stores the readings unless that is done; undefined when the intake does not wait for it. */
  private async store(intakeId: number): Promise<IntakeRow | undefined> {
    await this.database.transaction(async (tx) => {
      const intake = await lockIntake(tx, intakeId);
      if (!intake || intake.state !== 'queued') return;
      await this.tellStoring(intake);
      const stored = await storeReadings(tx, intake, await findSupersedable(tx, intake));
      await updateIntakeStored(tx, intakeId, { ...stored, at: this.clock.now() });
      await insertAuditEntry(tx, {
        plantId: intake.plantId,
        at: this.clock.now(),
        actor: null,
        action: 'store',
        thingKind: 'intake',
        thingId: intake.id,
        sentence: `Ebbline stored ${stored.readingsStored} readings of ${intake.fileName}${stored.readingsSuperseding > 0 ? `, ${stored.readingsSuperseding} of them in the place of others` : ''}; ${stored.readingsAlreadyThere} were there already.`,
        before: { state: 'queued' },
        after: { state: 'working' },
      });
      await auditSuperseded(tx, intake, stored.superseded, this.clock.now());
    });
    const intake = await findIntake(this.database, intakeId);
    return intake?.state === 'working' ? intake : undefined;
  }

  private async finish(tx: Transaction, job: Job, intake: IntakeRow, recorded: Recorded): Promise<Owed> {
    if (!(await lockOwedJob(tx, job.id))) throw new NoLongerOwedError(job.id);
    const at = this.clock.now();
    await updateIntakeScored(tx, intake.id, at);
    await insertAuditEntry(tx, {
      plantId: intake.plantId,
      at,
      actor: null,
      action: 'score',
      thingKind: 'intake',
      thingId: intake.id,
      sentence: `Ebbline scored ${intake.fileName}: ${recorded.verdictCount} verdicts, ${recorded.held.length} lots held.`,
      before: { state: 'working' },
      after: { state: 'scored' },
    });
    await auditHolds(tx, recorded.held, at);
    const mailIds = await this.mails.write(
      tx,
      recorded.held,
      `intake-${intake.id}`,
      `the intake of ${intake.fileName}`,
      at,
    );
    const owedJobIds = await oweComparison(tx, intake, at);
    await updateOwedJobEnded(tx, job.id, 'done', at);
    await notifyProgress(
      tx,
      this.progress(
        intake,
        'done',
        intake.channelIds?.length ?? 0,
        intake.channelIds?.length ?? 0,
        doneSentence(recorded),
      ),
    );
    return { mailIds, owedJobIds };
  }

  private async tellStoring(intake: IntakeRow): Promise<void> {
    await notifyProgress(
      this.database,
      this.progress(intake, 'storing', 0, 0, `Storing the readings of ${intake.rowsRead} rows.`),
    );
  }

  private tell(
    intake: IntakeRow,
    stage: IntakeProgress['stage'],
    scored: number,
    total: number,
    sentence: string,
  ): void {
    void notifyProgress(this.database, this.progress(intake, stage, scored, total, sentence)).catch(() => undefined);
  }

  private progress(
    intake: IntakeRow,
    stage: IntakeProgress['stage'],
    scored: number,
    total: number,
    sentence: string,
  ): IntakeProgress {
    return {
      intakeId: intake.id,
      stage,
      rowsRead: intake.rowsRead,
      channelsScored: scored,
      channelsTotal: total,
      sentence,
    };
  }
}

/** Where its readings came late, settled verdicts of other lots may change: they are looked at on trial. */
async function oweComparison(tx: Transaction, { id, plantId }: IntakeRow, at: Date): Promise<number[]> {
  if ((await listAffectedChannels(tx, id)).length === 0) return [];
  return [await insertOwedJob(tx, { plantId, name: JOBS.compareSettled, subject: { intakeId: id }, at })];
}

function doneSentence(recorded: Recorded): string {
  const held = recorded.held.length;
  if (held === 0) return 'Scored. No lot is held.';
  return held === 1 ? `Scored. Lot ${recorded.held[0].lotNumber} is held.` : `Scored. ${held} lots are held.`;
}
