import { Inject, Injectable } from '@nestjs/common';
import { JOBS, type OwedJobSubject, type SummaryContent, weekInWords } from '@app/contracts';
import {
  type Database,
  findPerson,
  findSummaryPlant,
  getSummaryContent,
  getSummaryVersion,
  insertAuditEntry,
  insertSummary,
  lockOwedJob,
  type OwedJob,
  type OutboxAttachment,
  type Transaction,
  updateOwedJobEnded,
  weekStartingOn,
} from '@app/data';
import { CLOCK, type Clock, DATABASE, Dispatcher } from '@app/platform';
import { type HandlerOutcome, NoLongerOwedError, type OwedJobHandler } from '../owed/owed-job-handler';
import { SummaryMailService } from './summary-mail.service';

type Job = OwedJob & { subject: OwedJobSubject['weekly-summary'] };

/** Freezes a plant's week as a new version of its summary, and mails it. One that is due is made only for a week without any. */
@Injectable()
export class WeeklySummaryHandler implements OwedJobHandler<'weekly-summary'> {
  readonly jobName = JOBS.weeklySummary;

  constructor(
    @Inject(DATABASE) private readonly database: Database,
    @Inject(CLOCK) private readonly clock: Clock,
    private readonly mails: SummaryMailService,
    private readonly dispatcher: Dispatcher,
  ) {}

  async run(job: Job): Promise<HandlerOutcome> {
    const { plantId, weekStartsOn, isSent, askedBy } = job.subject;
    const version = (await getSummaryVersion(this.database, plantId, weekStartsOn)) + 1;
    if (askedBy === null && version > 1) {
      await updateOwedJobEnded(this.database, job.id, 'done', this.clock.now());
      return { done: false, reason: 'the week has its summary' };
    }
    const content = await this.gather(plantId, weekStartsOn);
    const attachments = isSent ? await this.mails.attachments(content) : [];
    const mailIds = await this.database.transaction((tx) => this.record(tx, job, { version, content, attachments }));
    await this.dispatcher.mails(mailIds);
    return { done: true };
  }

  /** Says so where people look for what was done: they may ask for it again. */
  async fail(tx: Transaction, job: Job, sentence: string, at: Date): Promise<void> {
    await insertAuditEntry(tx, {
      plantId: job.plantId,
      at,
      actor: null,
      action: 'fail-summary',
      thingKind: 'plant',
      thingId: job.plantId,
      sentence: `Ebbline could not make the summary of the week of ${weekInWords(job.subject.weekStartsOn)}. ${sentence}`,
    });
  }

  /** One view of the database for all of it. */
  private gather(plantId: number, weekStartsOn: string): Promise<SummaryContent> {
    return this.database.transaction(
      async (tx) => {
        const plant = await findSummaryPlant(tx, plantId);
        if (!plant) throw new Error(`no plant ${plantId}`);
        return getSummaryContent(tx, plant, weekStartingOn(weekStartsOn, plant.timeZone));
      },
      { isolationLevel: 'repeatable read', readOnly: true },
    );
  }

  private async record(
    tx: Transaction,
    job: Job,
    { version, content, attachments }: { version: number; content: SummaryContent; attachments: OutboxAttachment[] },
  ): Promise<number[]> {
    if (!(await lockOwedJob(tx, job.id))) throw new NoLongerOwedError(job.id);
    const { plantId, weekStartsOn, isSent, askedBy } = job.subject;
    const at = this.clock.now();
    const id = await insertSummary(tx, { plantId, weekStartsOn, version, content, madeAt: at });
    const mailIds = isSent ? await this.mails.write(tx, { id, plantId, version, content }, attachments, at) : [];
    const actor = askedBy === null ? null : ((await findPerson(tx, askedBy)) ?? null);
    const sent = isSent ? ` and mailed it to ${mailIds.length === 1 ? '1 person' : `${mailIds.length} people`}` : '';
    await insertAuditEntry(tx, {
      plantId,
      at,
      actor: null,
      action: 'make-summary',
      thingKind: 'summary',
      thingId: id,
      sentence: `Ebbline made version ${version} of the summary of the week of ${weekInWords(weekStartsOn)}${actor === null ? '' : ` asked for by ${actor.name}`}${sent}.`,
      after: { weekStartsOn, version, isSent },
    });
    await updateOwedJobEnded(tx, job.id, 'done', at);
    return mailIds;
  }
}
