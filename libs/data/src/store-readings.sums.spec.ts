import { openPlantDatabase, type PlantDatabase } from './testing/plant-database';
import type { SheetReading } from './testing/stage-readings';

const START = Date.parse('2026-03-11T06:00:00Z');
const RELATIVE = 1e-12;

interface Block {
  index: number;
  at: number;
  count: number;
  mean: number;
  sumSquares: number;
}

const mean = (values: number[]) => values.reduce((sum, value) => sum + value, 0) / values.length;
const sumSquares = (values: number[]) => values.reduce((sum, value) => sum + (value - mean(values)) ** 2, 0);

/** Written from the meaning of the columns, not from the query. */
function naiveBlocks(readings: { at: number; value: number | null }[]): Block[] {
  const first = Math.min(...readings.map(({ at }) => at));
  const last = Math.max(...readings.map(({ at }) => at));
  const blocks: Block[] = [];
  for (let index = 0; index < 16; index++) {
    const inside = readings.filter(({ at, value }) => {
      if (value === null) return false;
      const place = last > first ? Math.min(15, Math.floor((16 * (at - first)) / (last - first))) : 0;
      return place === index;
    });
    if (inside.length === 0) continue;
    const values = inside.map(({ value }) => value as number);
    blocks.push({
      index,
      at: mean(inside.map(({ at }) => at / 1000)),
      count: inside.length,
      mean: mean(values),
      sumSquares: sumSquares(values),
    });
  }
  return blocks;
}

describe('what the readings of a lot come to', () => {
  let place: PlantDatabase;
  let channelId: number;
  beforeAll(async () => {
    place = await openPlantDatabase();
    channelId = place.plant.channels[0].id;
  });
  afterAll(() => place.close());

  const figures = async (lot: string) =>
    place
      .db('lot_channels')
      .join('lots', 'lots.id', 'lot_channels.lot_id')
      .where({ number: lot, channel_id: channelId })
      .first('lot_channels.*');
  const reading = (
    lot: string,
    seconds: number,
    value: number | null,
    more: Partial<SheetReading> = {},
  ): SheetReading => ({
    lot,
    channelId,
    at: START + seconds * 1000,
    value,
    ...more,
  });

  it('is the same as counted by hand, over two intakes, with off-scale readings and readings outside specification', async () => {
    let state = 7;
    const next = () => (state = (state * 48_271) % 2_147_483_647) / 2_147_483_647;
    const rows = Array.from({ length: 400 }, (_, index) => {
      const dice = next();
      const censoring = dice < 0.05 ? 'below' : dice > 0.97 ? 'above' : null;
      // 58.8 and 61.2 are the specification limits.
      return reading('A', ((index * 7919) % 400) * 18, censoring ? null : 60 + 3 * (next() - 0.5), { censoring });
    });
    await place.takeIn(rows.slice(0, 250));
    await place.takeIn(rows.slice(250));
    const row = await figures('A');
    const values = rows.flatMap(({ value }) => (value === null ? [] : [value]));
    const stamps = rows.map(({ at }) => at as number);
    expect(row).toMatchObject({
      count: values.length,
      censored_low: rows.filter(({ censoring }) => censoring === 'below').length,
      censored_high: rows.filter(({ censoring }) => censoring === 'above').length,
      first_at: new Date(Math.min(...stamps)),
      last_at: new Date(Math.max(...stamps)),
      minimum: Math.min(...values),
      maximum: Math.max(...values),
      count_below: values.filter((value) => value < 58.8).length,
      count_above: values.filter((value) => value > 61.2).length,
    });
    expect(row.count_below).toBeGreaterThan(0);
    expect(row.censored_low).toBeGreaterThan(0);
    expect(Math.abs(row.mean / mean(values) - 1)).toBeLessThan(RELATIVE);
    expect(Math.abs(row.sum_squares / sumSquares(values) - 1)).toBeLessThan(1e-10);
    const meanAt = mean(rows.flatMap(({ at, value }) => (value === null ? [] : [at as number])));
    expect(Math.abs((row.mean_at as Date).getTime() - meanAt)).toBeLessThan(1);
    const expected = naiveBlocks(rows.map(({ at, value }) => ({ at: at as number, value })));
    const blocks = row.blocks as Block[];
    expect(blocks.map(({ index, count }) => [index, count])).toEqual(
      expected.map(({ index, count }) => [index, count]),
    );
    expect(blocks).toHaveLength(16);
    for (const [at, block] of blocks.entries()) {
      expect(Math.abs(block.mean / expected[at].mean - 1)).toBeLessThan(RELATIVE);
      expect(Math.abs(block.sumSquares / expected[at].sumSquares - 1)).toBeLessThan(1e-9);
      expect(Math.abs(block.at - expected[at].at)).toBeLessThan(1e-5);
    }
  });

  it('keeps its digits for values far from zero', async () => {
    const values = [1e9 + 0.25, 1e9 + 0.5, 1e9 + 0.75];
    await place.takeIn(values.map((value, index) => reading('B', index, value)));
    const row = await figures('B');
    expect(row.mean).toBe(1e9 + 0.5);
    expect(row.sum_squares).toBeCloseTo(0.125, 9);
  });

  it('is one block for a lot of one instant', async () => {
    await place.takeIn([reading('C', 0, 60), reading('C', 0, 61)]);
    expect((await figures('C')).blocks).toEqual([
      { index: 0, at: START / 1000, count: 2, mean: 60.5, sumSquares: 0.5 },
    ]);
  });

  it('has no mean when every reading is off the scale', async () => {
    await place.takeIn([reading('D', 0, null, { censoring: 'above' }), reading('D', 9, null, { censoring: 'above' })]);
    expect(await figures('D')).toMatchObject({
      count: 0,
      censored_high: 2,
      mean: null,
      sum_squares: null,
      mean_at: null,
      blocks: null,
      first_at: new Date(START),
    });
  });

  it('is compared with the specification that was valid when the lot began', async () => {
    const { plant, db } = place;
    const [channel] = plant.channels;
    const changeAt = '2026-03-11T20:00:00Z';
    await db('specifications')
      .where({ id: channel.specificationId })
      .update({ valid: `[2020-01-01T00:00:00Z,${changeAt})` });
    await db('specifications').insert({
      plant_id: plant.id,
      product_id: plant.productId,
      characteristic_id: channel.characteristicId,
      version: 2,
      nominal: 60,
      lower: 59.9,
      upper: 60.1,
      valid: `[${changeAt},)`,
      proposed_by: plant.people.engineer.id,
      approved_by: plant.people.manager.id,
      approved_at: new Date(changeAt),
    });
    const late = (Date.parse(changeAt) - START) / 1000;
    await place.takeIn([
      reading('E', late - 60, 60.5),
      reading('E', late + 60, 60.5),
      reading('F', late, 60.5),
      reading('F', late, 59),
    ]);
    expect(await figures('E')).toMatchObject({ specification_id: channel.specificationId, count_above: 0 });
    expect(await figures('F')).toMatchObject({ count_above: 1, count_below: 1 });
  });
});
