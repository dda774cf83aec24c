import { createTestDatabase, type TestDatabase } from '../../../test/support/database';
import { insertLot } from '../../../test/support/factories/lots';
import { insertPlant, type TestPlant } from '../../../test/support/factories/plant';
import { createDatabase, type Database } from './database';
import { listStripLots } from './plants-strip';

describe('the lots of a line by shifts', () => {
  let test: TestDatabase;
  let db: Database;
  let plant: TestPlant;
  beforeAll(async () => {
    test = await createTestDatabase();
    db = createDatabase(test.url);
    plant = await insertPlant(db);
  });
  afterAll(async () => {
    await db.destroy();
    await test.drop();
  });
  afterEach(() => db('lots').delete());

  const placed = async (shiftCount = 14) =>
    (await listStripLots(db, plant.lines[0].id, shiftCount)).map((lot) => [
      lot.number,
      lot.shiftName,
      lot.shiftStartsAt.toISOString(),
      (lot.shiftEndsAt.getTime() - lot.shiftStartsAt.getTime()) / 3_600_000,
    ]);
  const insert = (number: string, startsAt: string) => insertLot(db, plant, { number, startsAt });

  it('stand in the night shift of the day before after midnight', async () => {
    await insert('1', '2026-01-10T22:00:00Z');
    await insert('2', '2026-01-11T05:59:59Z');
    await insert('3', '2026-01-11T06:00:00Z');
    expect(await placed()).toEqual([
      ['1', 'night', '2026-01-10T22:00:00.000Z', 8],
      ['2', 'night', '2026-01-10T22:00:00.000Z', 8],
      ['3', 'early', '2026-01-11T06:00:00.000Z', 8],
    ]);
  });

  it('follow the wall clock: the night in which it springs forward is an hour shorter', async () => {
    await insert('1', '2026-03-29T00:30:00Z');
    await insert('2', '2026-03-29T04:30:00Z');
    await insert('3', '2026-03-29T05:30:00Z');
    expect(await placed()).toEqual([
      ['1', 'night', '2026-03-28T22:00:00.000Z', 7],
      ['2', 'night', '2026-03-28T22:00:00.000Z', 7],
      ['3', 'early', '2026-03-29T05:00:00.000Z', 8],
    ]);
  });

  it('of the last shifts only, and a shift without lots does not count', async () => {
    for (let day = 1; day <= 9; day++) await insert(`${day}`, `2026-01-0${day}T08:00:00Z`);
    expect((await placed(3)).map(([number]) => number)).toEqual(['7', '8', '9']);
  });

  it('outside the calendar stand together by day', async () => {
    await insert('1', '2019-06-01T08:00:00Z');
    expect(await placed()).toEqual([['1', 'outside the shift calendar', '2019-05-31T23:00:00.000Z', 24]]);
  });
});
