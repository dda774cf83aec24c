import type { Knex } from 'knex';
import { migrationSource } from './migration-source';

/** Settings for the project's one database; `url` is a postgres:// address. */
export function knexConfig(url: string, pool: { min: number; max: number } = { min: 0, max: 10 }): Knex.Config {
  return { client: 'pg', connection: url, pool, migrations: { migrationSource, tableName: 'schema_migrations' } };
}
