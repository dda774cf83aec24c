import { createTestDatabase, type TestDatabase } from '../../../test/support/database';
import { insertBaseline } from '../../../test/support/factories/record';
import { insertIntake, insertLot, insertReadings } from '../../../test/support/factories/lots';
import { insertPlant, type TestPlant } from '../../../test/support/factories/plant';
import { insertFit, insertVerdict } from '../../../test/support/factories/verdicts';
import { createDatabase, type Database } from './database';
import { listBaselinePoints } from './record-baseline';
import { listRecordLots } from './record-lots';

const HOUR = 3_600_000;
const START = Date.parse('2026-03-01T00:00:00Z');

describe('a long record', () => {
  let test: TestDatabase;
  let db: Database;
  let plant: TestPlant;
  beforeAll(async () => {
    test = await createTestDatabase();
    db = createDatabase(test.url);
    plant = await insertPlant(db);
    const channel = plant.channels[0];
    const intakeId = await insertIntake(db, plant);
    const fitId = await insertFit(db, plant, channel.id);
    for (let k = 0; k < 60; k++) {
      const lot = await insertLot(db, plant, { number: `${100 + k}`, startsAt: new Date(START + k * 2 * HOUR) });
      await insertReadings(db, plant, { channel, lot, intakeId }, [60, 60.1]);
      await insertVerdict(db, plant, { channel, lot }, { fitId, score: k % 20 === 7 ? 4 : 0.1 });
    }
    const points = Array.from({ length: 600 }, (_, k) => ({ at: new Date(START + k * HOUR * 0.2), value: k / 1000 }));
    await insertBaseline(db, plant, channel, fitId, points);
  });
  afterAll(async () => {
    await db.destroy();
    await test.drop();
  });

  const span = () => ({
    channelId: plant.channels[0].id,
    from: new Date(START),
    to: new Date(START + 120 * HOUR),
    columnCount: 20,
  });

  it('shows every lot while they are few', async () => {
    const lots = await listRecordLots(db, span(), 0);
    expect(lots).toHaveLength(60);
    expect(lots.map((lot) => lot.number)).toEqual(lots.map((_, index) => `${100 + index}`));
  });

  it('of very many lots keeps those that stand out and thins the others, and says how many there are', async () => {
    const lots = await listRecordLots(db, span(), 0, 20);
    expect(lots.length).toBeLessThanOrEqual(25);
    expect(lots.map((lot) => lot.number)).toEqual(expect.arrayContaining(['107', '127', '147']));
    expect(lots[0].total).toBe(60);
  });

  it('takes in a lot that begins before the stretch and ends in it', async () => {
    const lots = await listRecordLots(
      db,
      { ...span(), from: new Date(START + 3 * HOUR), to: new Date(START + 5 * HOUR) },
      0,
    );
    expect(lots.map((lot) => lot.number)).toEqual(['101', '102']);
  });

  it('thins the baseline to two points a column, and keeps its ends', async () => {
    const points = await listBaselinePoints(db, span(), []);
    expect(points.length).toBeLessThanOrEqual(42);
    expect(points[0].value).toBe(0);
    expect(points.at(-1)?.value).toBe(0.599);
    expect(new Set(points.map((point) => point.segment)).size).toBe(1);
  });

  it('keeps the last point before a break and the first after it', async () => {
    const at = new Date(START + 50.1 * HOUR);
    const points = await listBaselinePoints(db, span(), [at]);
    const before = points.filter((point) => point.at < at).at(-1);
    const after = points.find((point) => point.at >= at);
    expect([before?.value, after?.value]).toEqual([0.25, 0.251]);
    expect(after!.segment - before!.segment).toBe(1);
  });

  it('runs to the edges of a stretch between two points', async () => {
    const from = new Date(START + 10.05 * HOUR);
    const points = await listBaselinePoints(db, { ...span(), from, to: new Date(START + 10.1 * HOUR) }, []);
    expect(points.map((point) => point.value)).toEqual([0.05, 0.051]);
  });
});
