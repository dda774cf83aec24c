import { insertIntake } from '../../../test/support/factories/lots';
import { openPlantDatabase, type PlantDatabase, storeStaged } from './testing/plant-database';
import type { SheetReading } from './testing/stage-readings';

const START = Date.parse('2026-03-11T06:00:00Z');
const MINUTE = 60_000;

describe('storing the readings of a workbook', () => {
  let place: PlantDatabase;
  let coatWeight: number;
  let thickness: number;
  beforeAll(async () => {
    place = await openPlantDatabase();
  });
  afterAll(() => place.close());
  beforeEach(async () => {
    await place.reset();
    [coatWeight, thickness] = place.plant.channels.map((channel) => channel.id);
  });

  const reading = (minute: number, value: number | null, more: Partial<SheetReading> = {}): SheetReading => ({
    lot: '24117',
    channelId: coatWeight,
    at: START + minute * MINUTE,
    value,
    ...more,
  });
  const stored = () =>
    place
      .db('readings')
      .join('lots', 'lots.id', 'readings.lot_id')
      .orderBy(['measured_at', 'occurrence', 'serial', 'number'])
      .select('number', 'channel_id', 'value', 'censoring', 'occurrence', 'serial', 'position');
  const everything = async () => ({
    readings: await place.db('readings').orderBy('id'),
    lots: await place.db('lots').orderBy('id'),
    lotChannels: await place.db('lot_channels').orderBy(['channel_id', 'lot_id']),
    versions: await place.db('channels').orderBy('id').select('inputs_version'),
  });

  it('makes the lots, counts what it stored, and raises the version of what judging reads', async () => {
    const answer = await place.takeIn(
      [
        reading(0, 60.1),
        reading(5, 60.2),
        reading(10, 59.9, { lot: '24118' }),
        reading(10, 25.1, { lot: '24118', channelId: thickness, row: 4 }),
      ],
      3,
    );
    expect(answer).toMatchObject({
      channelIds: [coatWeight, thickness],
      rowsUsed: 3,
      rowsAlreadyThere: 0,
      rowsNotUsed: 0,
      readingsStored: 4,
      readingsAlreadyThere: 0,
    });
    expect(answer.lotIds).toHaveLength(2);
    expect(await stored()).toMatchObject([
      { number: '24117', value: 60.1, occurrence: 1 },
      { number: '24117', value: 60.2 },
      { number: '24118', value: 59.9 },
      { number: '24118', value: 25.1, channel_id: thickness },
    ]);
    expect(await place.db('channels').orderBy('id').pluck('inputs_version')).toEqual([1, 1]);
    expect(await place.db('staged_readings')).toEqual([]);
    expect(await place.db('lots').orderBy('number')).toMatchObject([
      { number: '24117', starts_at: new Date(START), ends_at: new Date(START + 5 * MINUTE), run: 1 },
      { number: '24118', starts_at: new Date(START + 10 * MINUTE), ends_at: new Date(START + 10 * MINUTE) },
    ]);
  });

  it('changes nothing the second time and counts every row as already there', async () => {
    const rows = [
      reading(0, 60.1),
      reading(5, null, { censoring: 'above' }),
      reading(5, 60.3),
      reading(9, 60, { serial: 'A' }),
    ];
    await place.takeIn(rows);
    const before = await everything();
    const answer = await place.takeIn(rows);
    expect(answer).toMatchObject({
      channelIds: [],
      lotIds: [],
      rowsUsed: 0,
      rowsAlreadyThere: 4,
      rowsNotUsed: 0,
      readingsStored: 0,
      readingsAlreadyThere: 4,
    });
    expect(await everything()).toEqual(before);
    expect(await place.problems(answer.intakeId)).toEqual([]);
  });

  it('adds only what is new of a workbook that overlaps, in any order of rows', async () => {
    await place.takeIn([reading(0, 60.1), reading(5, 60.2)]);
    const answer = await place.takeIn([reading(10, 60.4), reading(5, 60.2), reading(0, 60.1), reading(-5, 60)]);
    expect(answer).toMatchObject({ rowsUsed: 2, rowsAlreadyThere: 2, readingsStored: 2, readingsAlreadyThere: 2 });
    expect((await stored()).map(({ value }) => value)).toEqual([60, 60.1, 60.2, 60.4]);
    expect(await place.db('lots')).toMatchObject([
      { starts_at: new Date(START - 5 * MINUTE), ends_at: new Date(START + 10 * MINUTE) },
    ]);
  });

  it('counts a row as used when one of its readings is new and the other is there', async () => {
    await place.takeIn([reading(0, 60.1)]);
    const answer = await place.takeIn(
      [reading(0, 60.1, { row: 2 }), reading(0, 25, { channelId: thickness, row: 2 })],
      1,
    );
    expect(answer).toMatchObject({ rowsUsed: 1, rowsAlreadyThere: 0, rowsNotUsed: 0, readingsAlreadyThere: 1 });
  });

  it('numbers readings of equal stamp by the order of rows', async () => {
    await place.takeIn([reading(0, 60.3), reading(0, 60.1), reading(0, 60.2), reading(0, 60.9, { lot: '24118' })]);
    expect(await stored()).toMatchObject([
      { number: '24117', occurrence: 1, value: 60.3 },
      { number: '24118', occurrence: 1, value: 60.9 },
      { number: '24117', occurrence: 2, value: 60.1 },
      { number: '24117', occurrence: 3, value: 60.2 },
    ]);
    const answer = await place.takeIn([reading(0, 60.3), reading(0, 60.1), reading(0, 60.2), reading(0, 60.4)]);
    expect(answer).toMatchObject({ rowsUsed: 1, rowsAlreadyThere: 3 });
  });

  it('tells readings of equal stamp apart by serial or position and uses neither twice', async () => {
    const answer = await place.takeIn([
      reading(0, 60.1, { serial: 'P1' }),
      reading(0, 60.2, { serial: 'P2' }),
      reading(0, 60.3, { serial: 'P1' }),
      reading(0, 60.4, { serial: 'P1', position: 'left' }),
      reading(0, 60.5, { position: 'left' }),
    ]);
    expect(answer).toMatchObject({ rowsUsed: 4, rowsNotUsed: 1 });
    expect(
      (await stored()).map(({ serial, position, value, occurrence }) => [serial, position, value, occurrence]),
    ).toEqual(
      expect.arrayContaining([
        ['P1', '', 60.1, 1],
        ['P2', '', 60.2, 1],
        ['P1', 'left', 60.4, 1],
        ['', 'left', 60.5, 1],
      ]),
    );
    expect(await place.problems(answer.intakeId)).toEqual([
      { row: 4, code: 'repeated-in-file', detail: expect.stringContaining('The first reading stands') },
    ]);
  });

  it('uses no reading of a lot under another product, and says which product the lot has', async () => {
    const other = await place.db('products').insert({ plant_id: place.plant.id, code: 'SEP-12', name: 'Separator 12' });
    expect(other).toBeDefined();
    const answer = await place.takeIn([
      reading(0, 60.1),
      reading(-60, 60.2, { product: 'SEP-12' }),
      reading(5, 60.2, { product: null }),
    ]);
    expect(answer).toMatchObject({ rowsUsed: 2, rowsNotUsed: 1 });
    expect(await place.problems(answer.intakeId)).toEqual([
      { row: 3, code: 'product-differs', detail: expect.stringContaining('is product SEP-16, this row says SEP-12') },
    ]);
    expect(await place.db('lots')).toMatchObject([
      { starts_at: new Date(START), ends_at: new Date(START + 5 * MINUTE) },
    ]);
  });

  it('makes no lot that no row names a product for', async () => {
    const answer = await place.takeIn([reading(0, 60.1, { product: null }), reading(0, 60.1, { lot: '24118' })]);
    expect(answer).toMatchObject({ rowsUsed: 1, rowsNotUsed: 1 });
    expect(await place.db('lots').pluck('number')).toEqual(['24118']);
    expect(await place.problems(answer.intakeId)).toMatchObject([{ row: 2, code: 'product-missing' }]);
  });

  it('lets a stored value stand, also against an off-scale one, and says what the workbook says', async () => {
    await place.takeIn([reading(0, 60.1), reading(5, 60.2), reading(10, null, { censoring: 'below' })]);
    const before = await everything();
    const answer = await place.takeIn([reading(0, 60.4), reading(5, null, { censoring: 'above' }), reading(10, 59)]);
    expect(answer).toMatchObject({ rowsUsed: 0, rowsAlreadyThere: 3 });
    expect(await everything()).toEqual(before);
    expect((await place.problems(answer.intakeId)).map(({ code, detail }) => `${code}: ${detail}`)).toEqual([
      'stored-value-differs: This reading is stored already as 60.1; the workbook says 60.4. The stored value stands.',
      'stored-value-differs: This reading is stored already as 60.2; the workbook says off scale above. The stored value stands.',
      'stored-value-differs: This reading is stored already as off scale below; the workbook says 59. The stored value stands.',
    ]);
  });

  it('keeps the first quantity that is one, with its unit or none', async () => {
    await place.takeIn([
      reading(0, 60, { quantity: 0, quantityUnit: 'm' }),
      reading(1, 60, { quantity: 500, quantityUnit: 'm' }),
      reading(2, 60, { quantity: 700, quantityUnit: 'm' }),
      reading(3, 60, { lot: '24118', quantity: 300 }),
      reading(4, 60, { lot: '24119' }),
    ]);
    await place.takeIn([
      reading(5, 60, { quantity: 900, quantityUnit: 'kg' }),
      reading(6, 60, { lot: '24119', quantity: 20, quantityUnit: 'kg' }),
    ]);
    expect(await place.db('lots').orderBy('number').select('quantity', 'quantity_unit')).toEqual([
      { quantity: 500, quantity_unit: 'm' },
      { quantity: 300, quantity_unit: '' },
      { quantity: 20, quantity_unit: 'kg' },
    ]);
  });

  it('gives two intakes of the same rows at once every reading once', async () => {
    const rows = Array.from({ length: 200 }, (_, index) => reading(index % 120, 60 + index / 100));
    const answers = await Promise.all([place.takeIn(rows), place.takeIn(rows), place.takeIn(rows)]);
    expect(answers.map(({ readingsStored }) => readingsStored).sort((a, b) => a - b)).toEqual([0, 0, 200]);
    expect(answers.map(({ readingsAlreadyThere }) => readingsAlreadyThere).sort((a, b) => a - b)).toEqual([
      0, 200, 200,
    ]);
    expect(await stored()).toHaveLength(200);
  });

  it('leaves nothing behind when its transaction is rolled back', async () => {
    await place.takeIn([reading(0, 60)]);
    const before = await everything();
    const intakeId = await insertIntake(place.db, place.plant, { state: 'queued' });
    const failing = place.db.transaction(async (tx) => {
      await storeStaged(tx, place.plant, intakeId, [reading(1, 61), reading(0, 60, { lot: '24118' })]);
      throw new Error('the power fails');
    });
    await expect(failing).rejects.toThrow('the power fails');
    expect(await everything()).toEqual(before);
  });
});
