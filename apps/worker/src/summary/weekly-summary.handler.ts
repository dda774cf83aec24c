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
  listDueSummaryWeeks,
  lockOwedJob,
  type OwedJob,
  type OutboxAttachment,
  type Transaction,
  updateOwedJobEnded,
  weekStartingOn,
} from '@app/data';
import { CLOCK, type Clock, DATABASE, Dispatcher } from '@app/platform';
import { type HandlerOutcome, NoLongerOwedError, type OwedJobHandler } from '../owed/owed-job-handler';
import { type EarlierWeek, SummaryMailService } from './summary-mail.service';

interface Made {
  version: number;
  content: SummaryContent;
  /** Weeks before it that nobody was told, oldest first. */
  missed: SummaryContent[];
  attachments: OutboxAttachment[];
}

type Job = OwedJob & { subject: OwedJobSubject['weekly-summary'] };

/**
 * Freezes a plant's week as a new version of its summary, and mails it. One that is due is made only for a week without any, together with
 * the weeks that were missed before it: a page each, and one mail that names them, in one transaction.
 */
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
    const plant = await findSummaryPlant(this.database, plantId);
    if (!plant) throw new Error(`no plant ${plantId}`);
    const version = (await getSummaryVersion(this.database, plantId, weekStartsOn)) + 1;
    const due = askedBy === null ? await listDueSummaryWeeks(this.database, plant, this.clock.now()) : [];
    if (askedBy === null && version > 1) return this.leave(job, 'the week has its summary');
    if (due.some((week) => week.startsOn > weekStartsOn)) return this.leave(job, 'a newer week is due and tells of it');
    const missed: SummaryContent[] = [];
    for (const week of due) if (week.startsOn < weekStartsOn) missed.push(await this.gather(plantId, week.startsOn));
    const content = await this.gather(plantId, weekStartsOn);
    const attachments = isSent ? await this.mails.attachments(content) : [];
    const mailIds = await this.database.transaction((tx) =>
      this.record(tx, job, { version, content, missed, attachments }),
    );
    await this.dispatcher.mails(mailIds);
    return { done: true };
  }

  private async leave(job: Job, reason: string): Promise<HandlerOutcome> {
    await updateOwedJobEnded(this.database, job.id, 'done', this.clock.now());
    return { done: false, reason };
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
      after: { weekStartsOn: job.subject.weekStartsOn, why: sentence },
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

  private async record(tx: Transaction, job: Job, made: Made): Promise<number[]> {
    if (!(await lockOwedJob(tx, job.id))) throw new NoLongerOwedError(job.id);
    const { plantId, weekStartsOn, isSent, askedBy } = job.subject;
    const { version, content, attachments } = made;
    const at = this.clock.now();
    const earlier: EarlierWeek[] = [];
    for (const missed of made.missed) earlier.push(await this.recordMissed(tx, plantId, missed, at));
    const id = await insertSummary(tx, { plantId, weekStartsOn, version, content, madeAt: at });
    const summary = { id, plantId, version, content, earlier };
    const mailIds = isSent ? await this.mails.write(tx, summary, attachments, at) : [];
    const actor = askedBy === null ? null : ((await findPerson(tx, askedBy)) ?? null);
    const sent = isSent ? ` and mailed it to ${mailIds.length === 1 ? '1 person' : `${mailIds.length} people`}` : '';
    await insertAuditEntry(tx, {
      ...entryOf(plantId, id, at),
      sentence: `Ebbline made version ${version} of the summary of the week of ${weekInWords(weekStartsOn)}${actor === null ? '' : ` asked for by ${actor.name}`}${sent}.`,
      after: { weekStartsOn, version, isSent },
    });
    await updateOwedJobEnded(tx, job.id, 'done', at);
    return mailIds;
  }

  private async recordMissed(
    tx: Transaction,
    plantId: number,
    content: SummaryContent,
    at: Date,
  ): Promise<EarlierWeek> {
    const weekStartsOn = content.week.startsOn;
    const id = await insertSummary(tx, { plantId, weekStartsOn, version: 1, content, madeAt: at });
    await insertAuditEntry(tx, {
      ...entryOf(plantId, id, at),
      sentence: `Ebbline made version 1 of the summary of the week of ${weekInWords(weekStartsOn)}, which had been missed.`,
      after: { weekStartsOn, version: 1, isSent: false },
    });
    return { id, weekStartsOn, headline: content.headline };
  }
}

const entryOf = (plantId: number, thingId: number, at: Date) => ({
  plantId,
  at,
  actor: null,
  action: 'make-summary',
  thingKind: 'summary',
  thingId,
});
