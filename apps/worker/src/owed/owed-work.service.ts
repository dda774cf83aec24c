import { Inject, Injectable, Logger, type OnApplicationBootstrap, type OnApplicationShutdown } from '@nestjs/common';
import { type Database, listDueMailIds, listOwedJobIds, updateMailLeasesEnded } from '@app/data';
import { CLOCK, type Clock, CONFIG, type Config, DATABASE, Dispatcher, within } from '@app/platform';

const EVERY_MS = 10_000;
const FIRST_SWEEP_MS = 5_000;
const MAILS_AT_ONCE = 200;

/** Queues again, at start and on a timer, what stands in the database as owed: the queue may have died with its process. */
@Injectable()
export class OwedWorkService implements OnApplicationBootstrap, OnApplicationShutdown {
  private readonly logger = new Logger(OwedWorkService.name);
  private timer?: NodeJS.Timeout;
  private isSweeping = false;

  constructor(
    @Inject(DATABASE) private readonly database: Database,
    @Inject(CONFIG) private readonly config: Config,
    @Inject(CLOCK) private readonly clock: Clock,
    private readonly dispatcher: Dispatcher,
  ) {}

  async onApplicationBootstrap(): Promise<void> {
    this.timer = setInterval(() => void this.sweep(), EVERY_MS);
    await within(FIRST_SWEEP_MS, this.begin());
  }

  onApplicationShutdown(): void {
    clearInterval(this.timer);
  }

  /** Queues all that is owed. Waits for a queue that is away rather than piling up behind it. */
  async sweep(): Promise<void> {
    if (this.isSweeping) return;
    this.isSweeping = true;
    try {
      await this.dispatcher.queueOwedJobs(await listOwedJobIds(this.database));
      await this.dispatcher.queueMails(await listDueMailIds(this.database, this.clock.now(), MAILS_AT_ONCE));
    } catch (error) {
      this.logger.warn(`Looking for owed work failed, trying again in ${EVERY_MS / 1000} s: ${String(error)}`);
    } finally {
      this.isSweeping = false;
    }
  }

  /** Without Redis this process is the only one that sends: a mail that is still leased was leased by one that has ended. */
  private async begin(): Promise<void> {
    if (this.config.redisUrl === null) await updateMailLeasesEnded(this.database);
    await this.sweep();
  }
}
