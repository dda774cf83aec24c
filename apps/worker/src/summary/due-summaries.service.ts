import { InjectQueue } from '@nestjs/bull';
import { Inject, Injectable, Logger } from '@nestjs/common';
import type { Queue } from 'bull';
import { DUE_SUMMARIES_EVERY_MS, DUE_SUMMARIES_JOB, JOBS, WORK_QUEUE } from '@app/contracts';
import {
  type Database,
  insertOwedJob,
  listDueSummaryWeeks,
  listSummaryPlants,
  listSummaryWeeksGivenUp,
  type SummaryPlant,
} from '@app/data';
import { CLOCK, type Clock, DATABASE, Dispatcher, within } from '@app/platform';

const PATIENCE_MS = 3_000;
/** A week that could not be told is tried anew after so long. */
const GIVEN_UP_MS = 6 * 3_600_000;

/** Owes each plant the summary that is due: at start, which catches up what a stop missed, and with every beat of a repeated job. */
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

  /** Owes what is due now; the same week owed twice is one. Returns of how many plants. */
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

  /** The newest week alone: who makes it makes those that were missed before it too. */
  private async oweOf(plant: SummaryPlant): Promise<number[]> {
    const { id: plantId } = plant;
    const at = this.clock.now();
    const newest = (await listDueSummaryWeeks(this.database, plant, at)).at(-1);
    if (newest === undefined) return [];
    const givenUp = await listSummaryWeeksGivenUp(this.database, plantId, new Date(at.getTime() - GIVEN_UP_MS));
    if (givenUp.includes(newest.startsOn)) return [];
    const subject = { plantId, weekStartsOn: newest.startsOn, isSent: true, askedBy: null };
    return [
      await this.database.transaction((tx) => insertOwedJob(tx, { plantId, name: JOBS.weeklySummary, subject, at })),
    ];
  }
}
