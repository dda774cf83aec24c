import { insertPlant, type TestPlant } from '../../../test/support/factories/plant';
import {
  findIntake,
  findSameFile,
  getIntakeBytes,
  getIntakeOutcome,
  insertIntake,
  insertIntakeProblems,
  type IntakeRow,
  listIntakeProblems,
  listIntakes,
  lockIntake,
  updateIntakeConfirmed,
  updateIntakeRead,
  updateIntakeRefused,
  updateIntakeScored,
  updateIntakeStored,
} from './intakes';
import { openPlantDatabase, type PlantDatabase } from './testing/plant-database';

const AT = new Date('2026-03-11T14:20:00Z');

describe('intakes', () => {
  let place: PlantDatabase;
  let plant: TestPlant;
  beforeAll(async () => {
    place = await openPlantDatabase();
  });
  afterAll(() => place.close());
  beforeEach(async () => {
    await place.reset();
    ({ plant } = place);
  });

  const receive = (differs: Partial<Parameters<typeof insertIntake>[1]> = {}) =>
    place.db.transaction((tx) =>
      insertIntake(tx, {
        plantId: plant.id,
        lineId: plant.lines[0].id,
        fileName: 'Frühschicht.xlsx',
        bytes: Buffer.from([0, 1, 2, 255]),
        sha256: Buffer.from('same hash'),
        receivedBy: plant.people.engineer.id,
        receivedAt: AT,
        ...differs,
      }),
    );
  const find = async (id: number) => (await findIntake(place.db, id)) as IntakeRow;
  const read = { report: { layout: 'long' }, rowsRead: 10, rowsNotUsed: 2, at: AT };
  const counts = {
    channelIds: [3, 1],
    lotIds: [],
    rowsUsed: 7,
    rowsAlreadyThere: 1,
    rowsSuperseding: 0,
    readingsSuperseding: 0,
    rowsNotUsed: 2,
    readingsStored: 7,
    readingsAlreadyThere: 1,
  };

  it('keep the workbook’s bytes, hash and receiver', async () => {
    const id = await receive();
    expect(await getIntakeBytes(place.db, id)).toEqual(Buffer.from([0, 1, 2, 255]));
    expect(await find(id)).toMatchObject({
      state: 'received',
      fileName: 'Frühschicht.xlsx',
      byteCount: 4,
      lineName: 'Coater 2',
      receivedByName: 'engineer',
      confirmedByName: null,
      channelIds: null,
      report: null,
    });
  });

  it('are not there, nor their bytes, when the transaction is rolled back', async () => {
    const failing = place.db.transaction(async (tx) => {
      await insertIntake(tx, {
        plantId: plant.id,
        lineId: plant.lines[0].id,
        fileName: 'a',
        bytes: Buffer.from('b'),
        sha256: Buffer.from('c'),
        receivedBy: plant.people.engineer.id,
        receivedAt: AT,
      });
      throw new Error('the power fails');
    });
    await expect(failing).rejects.toThrow('the power fails');
    expect(await place.db('intakes')).toEqual([]);
    expect(await place.db('intake_bytes')).toEqual([]);
  });

  it('go from received to scored, each step with its time and counts', async () => {
    const id = await receive();
    await place.db.transaction(async (tx) => {
      await updateIntakeRead(tx, id, read);
      await updateIntakeConfirmed(tx, id, { by: plant.people.engineer2.id, at: AT });
      await updateIntakeStored(tx, id, { ...counts, at: AT });
      await updateIntakeScored(tx, id, AT);
    });
    const { lotIds: _, ...shown } = counts;
    expect(await find(id)).toMatchObject({
      ...shown,
      state: 'scored',
      rowsRead: 10,
      confirmedByName: 'engineer2',
      readingsStoredAt: AT,
      scoredAt: AT,
      report: { layout: 'long' },
    });
  });

  it('are read once: a second reading changes nothing', async () => {
    const id = await receive();
    await place.db.transaction((tx) => updateIntakeRead(tx, id, read));
    await place.db.transaction((tx) => updateIntakeRead(tx, id, { ...read, rowsRead: 99 }));
    expect(await find(id)).toMatchObject({ state: 'needs_attention', rowsRead: 10 });
  });

  it('are refused with the sentence, but not once they are scored', async () => {
    const [refused, scored] = [await receive(), await receive()];
    await place.db.transaction(async (tx) => {
      await updateIntakeConfirmed(tx, scored, { by: plant.people.engineer.id, at: AT });
      await updateIntakeStored(tx, scored, { ...counts, rowsUsed: 0, rowsAlreadyThere: 0, rowsNotUsed: 0, at: AT });
      await updateIntakeScored(tx, scored, AT);
      for (const id of [refused, scored]) await updateIntakeRefused(tx, id, 'The file is empty.');
    });
    expect(await find(refused)).toMatchObject({ state: 'refused', failure: 'The file is empty.' });
    expect(await find(scored)).toMatchObject({ state: 'scored', failure: null });
  });

  it('name the earliest other intake of the same bytes at the plant only', async () => {
    const [first, second] = [await receive(), await receive()];
    const other = await insertPlant(place.db, { name: 'Elsewhere', domain: 'elsewhere.example' });
    const foreign = await receive({
      plantId: other.id,
      lineId: other.lines[0].id,
      receivedBy: other.people.engineer.id,
    });
    expect(await findSameFile(place.db, await find(first))).toBeUndefined();
    expect(await findSameFile(place.db, await find(second))).toMatchObject({ id: first });
    expect(await findSameFile(place.db, await find(foreign))).toBeUndefined();
  });

  it('are listed newest first, a page at a time', async () => {
    const ids = [];
    for (const minute of [0, 2, 1, 2])
      ids.push(await receive({ receivedAt: new Date(AT.getTime() + minute * 60_000) }));
    await receive({ lineId: plant.lines[1].id });
    const page = (number: number) => listIntakes(place.db, plant.lines[0].id, number, 3);
    expect((await page(1)).items.map(({ id }) => id)).toEqual([ids[3], ids[1], ids[2]]);
    expect(await page(2)).toMatchObject({ items: [{ id: ids[0] }], total: 4 });
  });

  it('keep their problems in order, with sheet, row and column', async () => {
    const id = await receive();
    const problem = {
      sheet: 'Läufe',
      row: 7,
      column: 'AB',
      code: 'value-missing',
      detail: 'Nothing there: "x".',
      severity: 'cell_not_used' as const,
    };
    const whole = { ...problem, row: null, column: null, severity: 'blocking' as const };
    await place.db.transaction((tx) => insertIntakeProblems(tx, plant.id, id, [problem, whole]));
    await place.db.transaction((tx) => insertIntakeProblems(tx, plant.id, id, []));
    expect(await listIntakeProblems(place.db, id, 10)).toEqual([problem, whole]);
    expect(await listIntakeProblems(place.db, id, 1)).toEqual([problem]);
  });

  it('are locked for one transaction at a time', async () => {
    const id = await receive();
    const order: string[] = [];
    let other: Promise<void> | undefined;
    await place.db.transaction(async (tx) => {
      await lockIntake(tx, id);
      other = place.db.transaction(async (later) => {
        await lockIntake(later, id);
        order.push('other');
      });
      await new Promise((resolve) => setTimeout(resolve, 50));
      order.push('first');
    });
    await other;
    expect(order).toEqual(['first', 'other']);
  });

  it('have no outcome before they are scored', async () => {
    expect(await getIntakeOutcome(place.db, await receive())).toEqual({ lotsScored: 0, held: [] });
  });

  describe('the database itself refuses', () => {
    const refused = (work: Promise<unknown>, constraint: string) => expect(work).rejects.toThrow(constraint);

    it('rows that do not add up', async () => {
      const id = await receive();
      const storing = place.db.transaction(async (tx) => {
        await updateIntakeRead(tx, id, read);
        await updateIntakeConfirmed(tx, id, { by: plant.people.engineer.id, at: AT });
        await updateIntakeStored(tx, id, { ...counts, rowsUsed: 6, at: AT });
      });
      await refused(storing, 'intakes_rows_check');
    });

    it('a scored intake that nobody confirmed', async () => {
      const id = await receive();
      await refused(
        place.db('intakes').where({ id }).update({ state: 'scored', scored_at: AT, readings_stored_at: AT }),
        'intakes_progress_check',
      );
    });

    it('rows that point into another plant', async () => {
      const other = await insertPlant(place.db, { name: 'Elsewhere', domain: 'elsewhere.example' });
      await refused(receive({ lineId: other.lines[0].id }), 'intakes_line_fkey');
      const id = await receive();
      await refused(
        place
          .db('intake_problems')
          .insert({ plant_id: other.id, intake_id: id, sheet: '', code: 'x', detail: 'x', severity: 'notice' }),
        'intake_problems_intake_fkey',
      );
      await place.takeIn([{ lot: '24117', channelId: plant.channels[0].id, at: AT.getTime(), value: 60 }]);
      const lot = await place.db('lots').first();
      await refused(
        place
          .db('lot_channels')
          .insert({ plant_id: plant.id, line_id: lot.line_id, lot_id: lot.id, channel_id: other.channels[0].id }),
        'lot_channels_channel_fkey',
      );
      await refused(place.db('lots').update({ product_id: other.productId }), 'lots_product_fkey');
    });

    it('a reading with neither value nor censoring, with both, or twice at its place', async () => {
      await place.takeIn([{ lot: '24117', channelId: plant.channels[0].id, at: AT.getTime(), value: 60 }]);
      const { id: _, ...reading } = await place.db('readings').first();
      const insert = (differs: object) => place.db('readings').insert({ ...reading, occurrence: 2, ...differs });
      await refused(insert({ value: null }), 'readings_value_or_censoring');
      await refused(insert({ censoring: 'below' }), 'readings_value_or_censoring');
      await refused(insert({ value: Infinity }), 'readings_finite_check');
      await refused(insert({ occurrence: 1 }), 'readings_identity_key');
    });
  });
});
