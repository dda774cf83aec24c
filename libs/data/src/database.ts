import { knex, type Knex } from 'knex';
import { types } from 'pg';

/** The database, or a transaction of it: what every repository function takes first. */
export type Database = Knex;
export type Transaction = Knex.Transaction;
export type Queryable = Knex | Knex.Transaction;

const INT8 = 20;

/**
 * Opens a pool on PostgreSQL. Ids are bigint below 2^53 and come back as numbers. Statements here are many and short: compiling them
 * (`jit`) costs more than it saves.
 */
export function createDatabase(url: string, pool: { min: number; max: number } = { min: 0, max: 10 }): Database {
  types.setTypeParser(INT8, Number);
  return knex({
    client: 'pg',
    connection: { connectionString: url, application_name: 'ebbline', options: '-c jit=off' },
    pool,
  });
}

/** Rows of a raw query. */
export async function rows<T>(
  db: Queryable,
  sql: string,
  bindings: Record<string, unknown> | unknown[] = [],
): Promise<T[]> {
  const result = (await db.raw(sql, bindings as never)) as unknown as { rows: T[] };
  return result.rows;
}

/** The first row of a raw query, if any. */
export async function findRow<T>(
  db: Queryable,
  sql: string,
  bindings: Record<string, unknown> | unknown[] = [],
): Promise<T | undefined> {
  return (await rows<T>(db, sql, bindings))[0];
}
