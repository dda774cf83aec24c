import { Inject, Injectable } from '@nestjs/common';
import { JOBS, type OwedJobSubject, verdictPhrase, type SaidVerdict } from '@app/contracts';
import {
  type AffectedChannel,
  type Database,
  type FoundChange,
  insertAuditEntry,
  listAffectedChannels,
  listSettledVerdicts,
  lockOwedJob,
  type OwedJob,
  type Transaction,
  updateOwedJobEnded,
  updateSettledChanges,
} from '@app/data';
import { CLOCK, type Clock, DATABASE } from '@app/platform';
import { type HandlerOutcome, NoLongerOwedError, type OwedJobHandler } from '../owed/owed-job-handler';
import { JudgingService } from './judging.service';

type Job = OwedJob & { subject: OwedJobSubject['compare-settled'] };

/** Judges on trial what an intake's late readings may have changed of settled verdicts, and lists which would be said otherwise. */
@Injectable()
export class CompareSettledHandler implements OwedJobHandler<'compare-settled'> {
  readonly jobName = JOBS.compareSettled;

  constructor(
    @Inject(DATABASE) private readonly database: Database,
    @Inject(CLOCK) private readonly clock: Clock,
    private readonly judging: JudgingService,
  ) {}

  async run(job: Job): Promise<HandlerOutcome> {
    const { intakeId } = job.subject;
    const changes: FoundChange[] = [];
    for (const channel of await listAffectedChannels(this.database, intakeId))
      changes.push(...(await this.changesOf(channel, intakeId)));
    await this.database.transaction(async (tx) => {
      if (!(await lockOwedJob(tx, job.id))) throw new NoLongerOwedError(job.id);
      await updateSettledChanges(tx, intakeId, changes);
      await updateOwedJobEnded(tx, job.id, 'done', this.clock.now());
    });
    return { done: true };
  }

  /** Says so in the intake's history; nothing but the list is missing. */
  async fail(tx: Transaction, job: Job, sentence: string, at: Date): Promise<void> {
    await insertAuditEntry(tx, {
      plantId: job.plantId,
      at,
      actor: null,
      action: 'fail',
      thingKind: 'intake',
      thingId: job.subject.intakeId,
      sentence: `Ebbline could not find out which settled verdicts its readings would change. ${sentence}`,
    });
  }

  private async changesOf(channel: AffectedChannel, intakeId: number): Promise<FoundChange[]> {
    const { channelId, from } = channel;
    const settled = await listSettledVerdicts(this.database, channel, intakeId);
    const judged = await this.judging.onTrial(channelId, from);
    const wouldBe = new Map(
      judged.segments.flatMap(({ judgement }) => judgement.lots.map((lot) => [lot.lotId, lot] as const)),
    );
    return settled.flatMap(({ id, lotId, ...verdict }) => {
      const lot = wouldBe.get(lotId);
      if (!lot) return [];
      const now = verdictPhrase(verdict as SaidVerdict);
      const would = verdictPhrase(lot);
      return now === would ? [] : [{ channelId, lotId, verdictId: id, now, would }];
    });
  }
}
