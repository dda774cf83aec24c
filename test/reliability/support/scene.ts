import { randomBytes } from 'node:crypto';
import { Client } from 'pg';
import { createDatabase, type Database, lastCompleteWeek } from '@app/data';
import { createTestDatabase } from '../../support/database';
import { insertPlant, type TestPlant } from '../../support/factories/plant';
import { insertHistory, insertPlans, workbookOf } from './history';

export interface Scene {
  plant: TestPlant;
  workbook: Buffer;
  /** A copy of the plant's database. */
  copy(): Promise<{ url: string; drop(): Promise<void> }>;
  drop(): Promise<void>;
}

async function asAdmin(sql: string): Promise<void> {
  const client = new Client({ connectionString: process.env.TEST_DATABASE_ADMIN_URL });
  await client.connect();
  try {
    await client.query(sql);
  } finally {
    await client.end();
  }
}

/** The week that ended last is told already: no program of a run makes its summary beside what is watched. */
async function insertToldWeek(db: Database, plant: TestPlant): Promise<void> {
  const madeAt = new Date();
  const { startsOn } = lastCompleteWeek(madeAt, 'Europe/London');
  const summary = { plant_id: plant.id, week_starts_on: startsOn, version: 1, content: '{}', made_at: madeAt };
  await db('summaries').insert(summary);
}

/** A plant with thirty lots on two channels whose plans are in force. */
export async function makeScene(): Promise<Scene> {
  const original = await createTestDatabase();
  const db = createDatabase(original.url, { min: 0, max: 2 });
  const plant = await insertPlant(db);
  await insertHistory(db, plant);
  await insertPlans(db, plant);
  await insertToldWeek(db, plant);
  await db.destroy();
  const source = new URL(original.url).pathname.slice(1);
  return {
    plant,
    workbook: workbookOf(plant),
    async copy() {
      const name = `ebbline_test_${randomBytes(8).toString('hex')}`;
      await asAdmin(`create database ${name} template ${source}`);
      const url = new URL(original.url);
      url.pathname = `/${name}`;
      return { url: url.href, drop: () => asAdmin(`drop database if exists ${name} with (force)`) };
    },
    drop: () => original.drop(),
  };
}
