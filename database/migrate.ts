import { knex } from 'knex';
import { knexConfig } from './knexfile';

/** Brings the database to the newest schema. Throws what PostgreSQL says when that fails; what was begun is rolled back. */
export async function migrateToLatest(url: string): Promise<string[]> {
  const database = knex(knexConfig(url, { min: 0, max: 2 }));
  try {
    const [, applied] = (await database.migrate.latest()) as [number, string[]];
    return applied;
  } finally {
    await database.destroy();
  }
}

/** Takes every migration back, newest first. */
export async function rollbackAll(url: string): Promise<void> {
  const database = knex(knexConfig(url, { min: 0, max: 2 }));
  try {
    await database.migrate.rollback(undefined, true);
  } finally {
    await database.destroy();
  }
}
