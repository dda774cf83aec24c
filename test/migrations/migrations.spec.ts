import { knex } from 'knex';
import { knexConfig } from '../../database/knexfile';
import { migrationNames } from '../../database/migration-source';
import { migrateToLatest, rollbackAll } from '../../database/migrate';
import { createTestDatabase, type TestDatabase } from '../support/database';

describe('migrations', () => {
  let database: TestDatabase;
  beforeAll(async () => {
    database = await createTestDatabase();
  });
  afterAll(() => database.drop());

  async function tables(): Promise<string[]> {
    const db = knex(knexConfig(database.url));
    try {
      const result = await db.raw<{ rows: { table_name: string }[] }>(
        `select table_name from information_schema.tables where table_schema = 'public' and table_name not like 'schema_migrations%' order by 1`,
      );
      return result.rows.map((row) => row.table_name);
    } finally {
      await db.destroy();
    }
  }

  it('go up, down and up again to the same tables', async () => {
    const before = await tables();
    await rollbackAll(database.url);
    expect(await tables()).toEqual([]);
    expect(await migrateToLatest(database.url)).toEqual(migrationNames);
    expect(await tables()).toEqual(before);
  });

  it('comment every table', async () => {
    const db = knex(knexConfig(database.url));
    try {
      const result = await db.raw<{ rows: { relname: string }[] }>(
        `select relname from pg_class where relkind = 'r' and relnamespace = 'public'::regnamespace
         and relname not like 'schema_migrations%' and obj_description(oid, 'pg_class') is null`,
      );
      expect(result.rows).toEqual([]);
    } finally {
      await db.destroy();
    }
  });
});
