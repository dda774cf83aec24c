import { type DynamicModule, Global, Inject, Injectable, Module, type OnApplicationShutdown } from '@nestjs/common';
import { createDatabase, type Database } from '@app/data';
import type { Config } from './config';
import { ProductionGuard } from './production-guard';
import { ThreadPools } from './thread-pools';
import { type Clock, CLOCK, CONFIG, DATABASE } from './tokens';

/** Closes the database's connections last. */
@Injectable()
class DatabaseCloser implements OnApplicationShutdown {
  constructor(@Inject(DATABASE) private readonly database: Database) {}

  async onApplicationShutdown(): Promise<void> {
    await this.database.destroy();
  }
}

/** Settings, database and clock, for every module of a program. */
@Global()
@Module({})
export class PlatformModule {
  static register(config: Config, clock: Clock): DynamicModule {
    return {
      module: PlatformModule,
      providers: [
        { provide: CONFIG, useValue: config },
        { provide: CLOCK, useValue: clock },
        { provide: DATABASE, useFactory: () => createDatabase(config.databaseUrl) },
        DatabaseCloser,
        ProductionGuard,
        ThreadPools,
      ],
      exports: [CONFIG, CLOCK, DATABASE, ThreadPools],
    };
  }
}
