import { Inject, Injectable, Logger, type OnApplicationBootstrap, type OnApplicationShutdown } from '@nestjs/common';
import { type Database, listDueMailIds, listOwedJobIds } from '@app/data';
import { CLOCK, type Clock, DATABASE, Dispatcher } from '@app/platform';

const EVERY_MS = 10_000;
const MAILS_AT_ONCE = 200;

/** Queues again, at start and on a timer, what stands in the database as owed: the queue may have died with its process. */
@Injectable()
export class OwedWorkService implements OnApplicationBootstrap, OnApplicationShutdown {
  private readonly logger = new Logger(OwedWorkService.name);
  private timer?: NodeJS.Timeout;
  private isSweeping = false;

  constructor(
    @Inject(DATABASE) private readonly database: Database,
    @Inject(CLOCK) private readonly clock: Clock,
    private readonly dispatcher: Dispatcher,
  ) {}

  async onApplicationBootstrap(): Promise<void> {
    await this.sweep();
    this.timer = setInterval(() => void this.sweep(), EVERY_MS);
  }

  onApplicationShutdown(): void {
    clearInterval(this.timer);
  }

  async sweep(): Promise<void> {
    if (this.isSweeping) return;
    this.isSweeping = true;
    try {
      await this.dispatcher.owedJobs(await listOwedJobIds(this.database));
      await this.dispatcher.mails(await listDueMailIds(this.database, this.clock.now(), MAILS_AT_ONCE));
    } catch (error) {
      this.logger.warn(`Looking for owed work failed, trying again in ${EVERY_MS / 1000} s: ${String(error)}`);
    } finally {
      this.isSweeping = false;
    }
  }
}
