import { BullModule, InjectQueue } from '@nestjs/bull';
import { type BeforeApplicationShutdown, type DynamicModule, Global, Inject, Injectable, Module } from '@nestjs/common';
import type { Queue } from 'bull';
import Redis from 'ioredis';
import { MAIL_QUEUE, WORK_QUEUE } from '@app/contracts';
import type { Config } from '../config';
import { CONFIG } from '../tokens';
import { within } from '../within';
import { Dispatcher } from './dispatcher';
import { BullOnIoredisMock } from './bull-on-ioredis-mock';

const CLIENT_OPTIONS = { maxRetriesPerRequest: null, enableReadyCheck: false };
const CLOSING_MS = 1000;
/** A job whose worker was killed goes to another one within some twenty seconds. Its attempts are counted in the database. */
export const QUEUE_SETTINGS = { drainDelay: 1, lockDuration: 15_000, stalledInterval: 5_000, maxStalledCount: 100 };

let processStores = 0;

/** Makes Bull's connections, to Redis or to a store of this program's own in the process, and ends them: Bull ends only some of its own. */
@Injectable()
export class QueueClients {
  private readonly clients: Redis[] = [];
  private readonly store = `in-process-${(processStores += 1)}`;

  constructor(@Inject(CONFIG) private readonly config: Config) {}

  create(): Redis {
    const client =
      this.config.redisUrl === null
        ? (new BullOnIoredisMock({ ...CLIENT_OPTIONS, host: this.store }) as unknown as Redis)
        : new Redis(this.config.redisUrl, CLIENT_OPTIONS);
    this.clients.push(client);
    return client;
  }

  end(): void {
    for (const client of this.clients) client.disconnect();
  }
}

/** Closes the queues while the rest still stands, also when Redis is away. */
@Injectable()
class QueueCloser implements BeforeApplicationShutdown {
  constructor(
    @InjectQueue(WORK_QUEUE) private readonly work: Queue,
    @InjectQueue(MAIL_QUEUE) private readonly mail: Queue,
    private readonly clients: QueueClients,
  ) {}

  async beforeApplicationShutdown(): Promise<void> {
    await within(CLOSING_MS, Promise.allSettled([this.work.close(true), this.mail.close(true)]));
    this.clients.end();
  }
}

@Module({ providers: [QueueClients], exports: [QueueClients] })
class QueueClientsModule {}

/** The two queues, for whoever adds to them or works them off. */
@Global()
@Module({})
export class QueueModule {
  static register(): DynamicModule {
    return {
      module: QueueModule,
      imports: [
        BullModule.forRootAsync({
          imports: [QueueClientsModule],
          inject: [QueueClients],
          useFactory: (clients: QueueClients) => ({
            createClient: () => clients.create(),
            settings: QUEUE_SETTINGS,
          }),
        }),
        QueueClientsModule,
        BullModule.registerQueue({ name: WORK_QUEUE }, { name: MAIL_QUEUE }),
      ],
      providers: [Dispatcher, QueueCloser],
      exports: [BullModule, Dispatcher],
    };
  }
}
