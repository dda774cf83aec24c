import { Inject, Injectable } from '@nestjs/common';
import {
  DomainError,
  JOBS,
  permissionsOf,
  type Role,
  type SummaryListView,
  type SummaryRequested,
  type SummaryView,
  weekInWords,
} from '@app/contracts';
import {
  type Database,
  findFirstReadingAt,
  findSummary,
  findSummaryPlant,
  getSummaryVersion,
  insertAuditEntry,
  insertOwedJob,
  lastCompleteWeek,
  listSummaries,
  listSummariesUnderWay,
  listSummaryVersions,
  type Person,
  type SummaryRow,
  toldAt,
  weekStartingOn,
} from '@app/data';
import { CLOCK, type Clock, DATABASE, Dispatcher } from '@app/platform';
import { writeSummary } from '@app/workbook';
import { AccessService } from '../access/access.service';
import { toUnderWay } from './under-way';

/** A plant's weeks as they were told, and new versions of them on demand. */
@Injectable()
export class SummariesService {
  constructor(
    @Inject(DATABASE) private readonly database: Database,
    @Inject(CLOCK) private readonly clock: Clock,
    private readonly access: AccessService,
    private readonly dispatcher: Dispatcher,
  ) {}

  async list(person: Person, plantId: number): Promise<SummaryListView> {
    const found = await findSummaryPlant(this.database, plantId);
    const { thing: plant, roles } = await this.access.requireThing(person.id, found, 'read_summary');
    return {
      items: await listSummaries(this.database, plantId),
      lastWeekStartsOn: lastCompleteWeek(this.clock.now(), plant.timeZone).startsOn,
      underWay: (await listSummariesUnderWay(this.database, plantId)).map(toUnderWay),
      maySend: maySend(roles),
    };
  }

  async get(person: Person, id: number): Promise<SummaryView> {
    const { thing: summary, roles } = await this.require(person, id);
    const versions = await listSummaryVersions(this.database, summary.plantId, summary.weekStartsOn);
    return {
      ...summary.content,
      id,
      version: summary.version,
      madeAt: summary.madeAt.toISOString(),
      versions: versions.map((version) => ({ ...version, madeAt: version.madeAt.toISOString() })),
      maySend: maySend(roles),
    };
  }

  async workbook(person: Person, id: number): Promise<{ name: string; bytes: Buffer }> {
    const { thing: summary } = await this.require(person, id);
    return { name: `summary-${summary.weekStartsOn}.xlsx`, bytes: await writeSummary(summary.content) };
  }

  /** Owes a new version of a week that is over; the worker makes it. */
  async request(
    person: Person,
    plantId: number,
    { weekStartsOn, send }: { weekStartsOn: string; send: boolean },
    address: string,
  ): Promise<SummaryRequested> {
    const found = await findSummaryPlant(this.database, plantId);
    const { thing: plant } = await this.access.requireThing(person.id, found, 'send_summary');
    const at = this.clock.now();
    const week = weekStartingOn(weekStartsOn, plant.timeZone);
    const firstReadingAt = await findFirstReadingAt(this.database, plantId);
    if (toldAt(week, plant.timeZone) > at)
      throw refusal('week-not-over', 'The summary of a week is made from Monday 06:00 after it on.');
    if (firstReadingAt === null || firstReadingAt >= week.to)
      throw refusal('week-before-readings', 'The plant has no reading from that week or before it.');
    const { version, owedJobId } = await this.database.transaction(async (tx) => {
      const version = (await getSummaryVersion(tx, plantId, weekStartsOn)) + 1;
      await insertAuditEntry(tx, {
        plantId,
        at,
        actor: person,
        action: 'request-summary',
        thingKind: 'plant',
        thingId: plantId,
        sentence: `${person.name} asked for a new version of the summary of the week of ${weekInWords(weekStartsOn)}${send ? ', to be mailed' : ''}.`,
        after: { weekStartsOn, send },
        address,
      });
      const subject = { plantId, weekStartsOn, isSent: send, askedBy: person.id };
      return { version, owedJobId: await insertOwedJob(tx, { plantId, name: JOBS.weeklySummary, subject, at }) };
    });
    await this.dispatcher.owedJobs([owedJobId]);
    return { weekStartsOn, version, jobId: owedJobId };
  }

  private async require(person: Person, id: number): Promise<{ thing: SummaryRow; roles: Role[] }> {
    return this.access.requireThing(person.id, await findSummary(this.database, id), 'read_summary');
  }
}

const maySend = (roles: Role[]) => permissionsOf(roles).includes('send_summary');

const refusal = (code: string, detail: string) =>
  new DomainError('conflict', code, detail, [{ pointer: '/weekStartsOn', code, detail }]);
