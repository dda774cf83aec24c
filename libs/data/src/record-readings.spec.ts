import { createTestDatabase, type TestDatabase } from '../../../test/support/database';
import { insertIntake, insertLot, insertReadings } from '../../../test/support/factories/lots';
import { insertPlant, type TestPlant } from '../../../test/support/factories/plant';
import { createDatabase, type Database } from './database';
import { listReadingColumns } from './record-readings';
import { findRecordExtent } from './record-span';

const HOUR = 3_600_000;
const START = Date.parse('2026-03-01T00:00:00Z');

describe('the columns of a record', () => {
  let test: TestDatabase;
  let db: Database;
  let plant: TestPlant;
  /** 40 lots of two hours with 25 readings each: lot k runs from k · 0.1 − 0.05 to k · 0.1 + 0.05 about nominal. */
  const LOTS = 40;
  const PER_LOT = 25;
  const valueOf = (lot: number, index: number) => 60 + lot * 0.1 + 0.05 * Math.sin((index * Math.PI) / 2);
  beforeAll(async () => {
    test = await createTestDatabase();
    db = createDatabase(test.url);
    plant = await insertPlant(db);
    const intakeId = await insertIntake(db, plant);
    const channel = plant.channels[0];
    for (let k = 0; k < LOTS; k++) {
      const lot = await insertLot(db, plant, { number: `${k}`, startsAt: new Date(START + k * 2 * HOUR), hours: 1.9 });
      const values = Array.from({ length: PER_LOT }, (_, index) => valueOf(k, index));
      await insertReadings(db, plant, { channel, lot, intakeId }, values);
    }
  });
  afterAll(async () => {
    await db.destroy();
    await test.drop();
  });

  const span = (columnCount: number, from = START, to = START + LOTS * 2 * HOUR) => ({
    channelId: plant.channels[0].id,
    from: new Date(from),
    to: new Date(to),
    columnCount,
  });

  it('are at most as many as there are pixels, and hold every reading', async () => {
    const columns = await listReadingColumns(db, span(16), 0);
    expect(columns).toHaveLength(16);
    expect(columns.map(({ column }) => column)).toEqual(Array.from({ length: 16 }, (_, index) => index));
    expect(Math.min(...columns.map(({ low }) => low))).toBeCloseTo(-0.05, 9);
    expect(Math.max(...columns.map(({ high }) => high))).toBeCloseTo(3.95, 9);
  });

  it('tell what a pass over all readings tells', async () => {
    const columns = await listReadingColumns(db, span(33), 0);
    const width = (LOTS * 2 * HOUR) / 33;
    const expected = new Map<number, { low: number; high: number }>();
    for (let k = 0; k < LOTS; k++)
      for (let index = 0; index < PER_LOT; index++) {
        const at = k * 2 * HOUR + Math.floor((index * 1.9 * HOUR) / (PER_LOT - 1));
        const deviation = valueOf(k, index) - 60;
        const former = expected.get(Math.floor(at / width)) ?? { low: Infinity, high: -Infinity };
        expected.set(Math.floor(at / width), {
          low: Math.min(former.low, deviation),
          high: Math.max(former.high, deviation),
        });
      }
    expect(columns.map(({ column }) => column)).toEqual([...expected.keys()].sort((a, b) => a - b));
    for (const { column, low, high } of columns) {
      expect(low).toBeCloseTo(expected.get(column)!.low, 9);
      expect(high).toBeCloseTo(expected.get(column)!.high, 9);
    }
  });

  it('of a stretch with very many readings come from the lots, and still cover them', async () => {
    const exact = await listReadingColumns(db, span(8), 0);
    const coarse = await listReadingColumns(db, span(8), 0, 100);
    expect(coarse).toHaveLength(8);
    coarse.forEach((column, index) => {
      expect(column.low).toBeLessThanOrEqual(exact[index].low + 1e-9);
      expect(column.high).toBeGreaterThanOrEqual(exact[index].high - 1e-9);
    });
    expect(coarse[0].low).toBeCloseTo(-0.05, 9);
    expect(coarse[7].high).toBeCloseTo(3.95, 9);
  });

  it('of lots wider than a column show the lot in each of its columns', async () => {
    const coarse = await listReadingColumns(db, span(10, START, START + HOUR), 0, 0);
    expect(coarse.map(({ column }) => column)).toEqual([0, 1, 2, 3, 4, 5, 6, 7, 8, 9]);
    for (const { low, high } of coarse)
      expect([low, high].map((value) => value.toFixed(3))).toEqual(['-0.050', '0.050']);
  });

  it('leave superseded readings and those without a value out', async () => {
    const channel = plant.channels[1];
    const lot = await insertLot(db, plant, { number: 'A', startsAt: new Date(START) });
    await insertReadings(db, plant, { channel, lot, intakeId: 1 }, [25, 99]);
    const [first, second] = await db<{ id: number; channel_id: number }>('readings')
      .where({ channel_id: channel.id })
      .orderBy('id')
      .select('id');
    await db('readings').where({ id: second.id }).update({ superseded_by: first.id });
    const columns = await listReadingColumns(db, { ...span(4, START, START + 4 * HOUR), channelId: channel.id }, 0);
    expect(columns).toEqual([{ column: 0, low: 0, high: 0 }]);
    expect(await findRecordExtent(db, channel.id)).toEqual({ first: new Date(START), last: new Date(START) });
  });
});
