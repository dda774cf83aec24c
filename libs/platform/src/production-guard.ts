import { Inject, Injectable, type OnModuleInit } from '@nestjs/common';
import { type Database, hasDemoPeople } from '@app/data';
import type { Config } from './config';
import { CONFIG, DATABASE } from './tokens';

/** Refuses to start in production on a database whose people have the demo's shared password. */
@Injectable()
export class ProductionGuard implements OnModuleInit {
  constructor(
    @Inject(CONFIG) private readonly config: Config,
    @Inject(DATABASE) private readonly database: Database,
  ) {}

  async onModuleInit(): Promise<void> {
    if (this.config.isProduction && (await hasDemoPeople(this.database)))
      throw new Error(
        'Ebbline cannot start in production: the database has demo sign-ins. Give DATABASE_URL of a database without the demo plant.',
      );
  }
}
