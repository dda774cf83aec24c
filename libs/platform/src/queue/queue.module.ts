import { BullModule } from '@nestjs/bull';
import { type DynamicModule, Global, Inject, Injectable, Module, type OnApplicationShutdown } from '@nestjs/common';
import Redis from 'ioredis';
import { MAIL_QUEUE, WORK_QUEUE } from '@app/contracts';
import type { Config } from '../config';
import { CONFIG } from '../tokens';
import { Dispatcher } from './dispatcher';
import { BullOnIoredisMock } from './bull-on-ioredis-mock';

const CLIENT_OPTIONS = { maxRetriesPerRequest: null, enableReadyCheck: false };

/** Makes Bull's connections, to Redis or to the in-process store, and closes them; Bull closes only some of its own. */
@Injectable()
export class QueueClients implements OnApplicationShutdown {
  private readonly clients: Redis[] = [];

  constructor(@Inject(CONFIG) private readonly config: Config) {}

  create(): Redis {
    const client =
      this.config.redisUrl === null
        ? (new BullOnIoredisMock(CLIENT_OPTIONS) as unknown as Redis)
        : new Redis(this.config.redisUrl, CLIENT_OPTIONS);
    this.clients.push(client);
    return client;
  }

  onApplicationShutdown(): void {
    for (const client of this.clients) client.disconnect();
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
            settings: { drainDelay: 1 },
          }),
        }),
        BullModule.registerQueue({ name: WORK_QUEUE }, { name: MAIL_QUEUE }),
      ],
      providers: [Dispatcher],
      exports: [BullModule, Dispatcher],
    };
  }
}
