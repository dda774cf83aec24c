import { createTestDatabase } from '../../../../test/support/database';
import { insertPlant, type TestPlant } from '../../../../test/support/factories/plant';
import { createDatabase, type Database, type Transaction } from '../database';
import { insertIntake } from '../../../../test/support/factories/lots';
import { type StoredReadings, storeReadings } from '../store-readings';
import { type SheetReading, stageReadings } from './stage-readings';

/** A fresh database with one plant, and what storing a workbook in it needs. */
export interface PlantDatabase {
  db: Database;
  url: string;
  plant: TestPlant;
  /** Stages and stores readings as a confirmed intake of the plant's first line. */
  takeIn(readings: SheetReading[], rowsRead?: number): Promise<StoredReadings & { intakeId: number }>;
  problems(intakeId: number): Promise<{ row: number; code: string; detail: string }[]>;
  /** Empties the database and makes the plant anew, which is much faster than another database. */
  reset(): Promise<void>;
  close(): Promise<void>;
}

export async function openPlantDatabase(): Promise<PlantDatabase> {
  const test = await createTestDatabase();
  const db = createDatabase(test.url, { min: 0, max: 6 });
  const place: PlantDatabase = {
    db,
    url: test.url,
    plant: await insertPlant(db),
    async takeIn(readings, rowsRead = readings.length) {
      const intakeId = await insertIntake(db, place.plant, { state: 'queued' });
      const stored = await db.transaction((tx) => storeStaged(tx, place.plant, intakeId, readings, rowsRead));
      return { ...stored, intakeId };
    },
    problems: (intakeId) =>
      db('intake_problems').where({ intake_id: intakeId }).orderBy('id').select('row', 'code', 'detail'),
    async reset() {
      await emptyTables(db);
      place.plant = await insertPlant(db);
    },
    async close() {
      await db.destroy();
      await test.drop();
    },
  };
  return place;
}

/** Append-only tables refuse to be emptied; a replica's session does not ask them. */
async function emptyTables(db: Database): Promise<void> {
  await db.transaction(async (tx) => {
    const tables = (await tx('pg_tables').where({ schemaname: 'public' }).pluck('tablename')) as string[];
    const own = tables.filter((name) => !name.startsWith('schema_migrations')).map((name) => `"${name}"`);
    await tx.raw('set local session_replication_role = replica');
    await tx.raw(`truncate ${own.join(', ')} restart identity`);
  });
}

/** Stages readings for the intake and stores them, in the caller's transaction. */
export async function storeStaged(
  tx: Transaction,
  plant: TestPlant,
  intakeId: number,
  readings: SheetReading[],
  rowsRead = readings.length,
): Promise<StoredReadings> {
  const intake = { id: intakeId, plantId: plant.id, lineId: plant.lines[0].id, rowsRead };
  await stageReadings(tx, intake, readings);
  return storeReadings(tx, intake);
}
