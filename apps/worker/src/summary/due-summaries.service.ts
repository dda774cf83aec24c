import { InjectQueue } from '@nestjs/bull';
import { Inject, Injectable, Logger } from '@nestjs/common';
import type { Queue } from 'bull';
import { DUE_SUMMARIES_EVERY_MS, DUE_SUMMARIES_JOB, JOBS, WORK_QUEUE } from '@app/contracts';
import {
  type Database,
  dueWeeks,
  findFirstReadingAt,
  findNewestSummaryWeek,
  insertOwedJob,
  listSummaryPlants,
  listSummaryWeeksGivenUp,
  type SummaryPlant,
} from '@app/data';
import { CLOCK, type Clock, DATABASE, Dispatcher, within } from '@app/platform';

/** After a longer stop only the newest weeks are told. */
const MOST_WEEKS = 4;
const PATIENCE_MS = 3_000;
/** A week that could not be told is tried anew after so long. */
const GIVEN_UP_MS = 6 * 3_600_000;

/** Owes each plant the summaries that are due: at start, which catches up what a stop missed, and with every beat of a repeated job. */
@Injectable()
export class DueSummariesService {
  private readonly logger = new Logger(DueSummariesService.name);

  constructor(
    @Inject(DATABASE) private readonly database: Database,
    @Inject(CLOCK) private readonly clock: Clock,
    @InjectQueue(WORK_QUEUE) private readonly queue: Queue,
    private readonly dispatcher: Dispatcher,
  ) {}

  /** Begins the beat, and catches up. */
  async start(): Promise<void> {
    await within(PATIENCE_MS, this.begin());
  }

  /** Owes what is due now; the same week owed twice is one. Returns how many weeks that are. */
  async oweDue(): Promise<number> {
    const owed: number[] = [];
    for (const plant of await listSummaryPlants(this.database)) owed.push(...(await this.oweOf(plant)));
    await this.dispatcher.owedJobs(owed);
    return owed.length;
  }

  private async begin(): Promise<void> {
    try {
      await this.queue.add(
        DUE_SUMMARIES_JOB,
        {},
        {
          repeat: { every: DUE_SUMMARIES_EVERY_MS },
          removeOnComplete: true,
          removeOnFail: true,
        },
      );
      await this.oweDue();
    } catch (error) {
      this.logger.warn(`Looking for due summaries failed, trying again within minutes: ${String(error)}`);
    }
  }

  private async oweOf({ id: plantId, timeZone }: SummaryPlant): Promise<number[]> {
    const at = this.clock.now();
    const weeks = dueWeeks(
      at,
      timeZone,
      {
        newestToldStartsOn: await findNewestSummaryWeek(this.database, plantId),
        firstReadingAt: await findFirstReadingAt(this.database, plantId),
      },
      MOST_WEEKS,
    );
    const givenUp = await listSummaryWeeksGivenUp(this.database, plantId, new Date(at.getTime() - GIVEN_UP_MS));
    return this.database.transaction(async (tx) => {
      const ids: number[] = [];
      for (const { startsOn: weekStartsOn } of weeks.filter((week) => !givenUp.includes(week.startsOn))) {
        const subject = { plantId, weekStartsOn, isSent: true, askedBy: null };
        ids.push(await insertOwedJob(tx, { plantId, name: JOBS.weeklySummary, subject, at }));
      }
      return ids;
    });
  }
}
