import { insertIntake } from '../../../test/support/factories/lots';
import { insertDecision, insertHold } from '../../../test/support/factories/holds';
import { insertPlan } from '../../../test/support/factories/plans';
import { insertFit, insertVerdict } from '../../../test/support/factories/verdicts';
import { compareIntake, findSupersedable, refreshComparison, refuseOutdatedComparison } from './compare-intake';
import { findIntake, type IntakeRow } from './intakes';
import { storeReadings } from './store-readings';
import { openPlantDatabase, type PlantDatabase } from './testing/plant-database';
import { type SheetReading, stageReadings } from './testing/stage-readings';

const START = Date.parse('2026-03-11T06:00:00Z');
const AT = new Date('2026-03-11T16:00:00Z');

describe('a workbook held against what is stored', () => {
  let place: PlantDatabase;
  let channelId: number;
  beforeAll(async () => {
    place = await openPlantDatabase();
  });
  afterAll(() => place.close());
  beforeEach(async () => {
    await place.reset();
    channelId = place.plant.channels[0].id;
  });

  const reading = (minute: number, value: number | null, more: Partial<SheetReading> = {}): SheetReading => ({
    lot: '24117',
    channelId,
    at: START + minute * 60_000,
    value,
    ...more,
  });
  /** A workbook that was read and compared, and waits to be confirmed. */
  const read = async (readings: SheetReading[], rowsRead = readings.length) => {
    const id = await insertIntake(place.db, place.plant, { state: 'needs_attention' });
    await place.db('intakes').where({ id }).update({ rows_read: rowsRead, report: '{}' });
    const intake = (await findIntake(place.db, id)) as IntakeRow;
    const comparison = await place.db.transaction(async (tx) => {
      await stageReadings(tx, intake, readings);
      return compareIntake(tx, intake, AT);
    });
    return { id, comparison };
  };
  const intakeOf = async (id: number) => (await findIntake(place.db, id)) as IntakeRow;

  it('counts each row once, also of lots that are not there yet, and makes none of them', async () => {
    await place.takeIn([reading(0, 60.1), reading(5, 60.2), reading(10, 60.3)]);
    const { id, comparison } = await read(
      [
        reading(0, 60.1),
        reading(5, 60.9),
        reading(15, 60),
        reading(20, 60, { lot: '24118' }),
        reading(20, 60, { lot: '24119', product: null }),
        reading(21, 60, { product: 'SEP-99' }),
      ],
      7,
    );
    expect(comparison).toMatchObject({
      rowsNew: 3,
      rowsDiffering: 1,
      rowsAlreadyThere: 1,
      rowsNotUsed: 2,
      readingsNew: 3,
      readingsAlreadyThere: 1,
      readingsDiffering: 1,
      readingsNotInFile: 1,
      lotsDecided: [],
      lotsSettled: [],
    });
    expect(await place.db('lots').pluck('number')).toEqual(['24117']);
    expect((await intakeOf(id)).comparison).toEqual(comparison);
  });

  it('lists what differs with both values, and which intakes brought readings of the same lots', async () => {
    const first = await place.takeIn([reading(0, 60.1), reading(5, null, { censoring: 'above' })]);
    const { comparison } = await read([reading(0, null, { censoring: 'below' }), reading(5, 60.2, { column: 'F' })]);
    expect(comparison.differing).toEqual([
      expect.objectContaining({
        row: 2,
        column: 'E',
        lot: '24117',
        stored: 60.1,
        incoming: null,
        incomingCensoring: 'below',
      }),
      expect.objectContaining({
        row: 3,
        column: 'F',
        channelName: place.plant.channels[0].name,
        unit: 'g/m²',
        at: '2026-03-11T06:05:00.000Z',
        stored: null,
        storedCensoring: 'above',
        incoming: 60.2,
        incomingCensoring: null,
      }),
    ]);
    expect(comparison.overlaps).toEqual([
      {
        intakeId: first.intakeId,
        fileName: 'coater-2-early.xlsx',
        receivedAt: '2026-03-11T06:00:00.000Z',
        receivedBy: 'engineer',
        lots: ['24117'],
      },
    ]);
  });

  it('counts readings of its lots that it lacks only within its own span of time', async () => {
    await place.takeIn([0, 5, 10, 15, 20].map((minute) => reading(minute, 60)));
    expect((await read([reading(5, 60), reading(15, 60)])).comparison.readingsNotInFile).toBe(1);
    expect((await read([reading(0, 60), reading(5, 60)])).comparison.readingsNotInFile).toBe(0);
  });

  it('names the lots that it would touch and that are decided or settled', async () => {
    await place.takeIn([reading(0, 60), reading(0, 60, { lot: '24118' }), reading(0, 60, { lot: '24119' })]);
    await place.db('lots').update({ quantity: 500, quantity_unit: 'm' });
    const lots = await place.db('lots').orderBy('number');
    const fitId = await insertFit(
      place.db,
      place.plant,
      channelId,
      await insertPlan(place.db, place.plant, place.plant.channels[0]),
    );
    for (const lot of lots.slice(0, 2)) {
      const own = { id: lot.id, number: lot.number, startsAt: lot.starts_at, endsAt: lot.ends_at };
      const verdictId = await insertVerdict(
        place.db,
        place.plant,
        { channel: place.plant.channels[0], lot: own },
        { fitId },
      );
      const holdId = await insertHold(place.db, place.plant, {
        lot: own,
        causes: [{ channel: place.plant.channels[0], verdictId }],
      });
      await insertDecision(place.db, place.plant, { holdId, disposition: 'release' });
    }
    const { comparison } = await read([
      reading(0, 61),
      reading(0, 60, { lot: '24118' }),
      reading(3, 60, { lot: '24119' }),
    ]);
    expect(comparison).toMatchObject({ lotsDecided: ['24117'], lotsSettled: ['24117'] });
  });

  it('is out of date when another intake was stored, says so when it would do something else, and is made anew', async () => {
    const { id } = await read([reading(0, 60.1), reading(5, 60.2)]);
    const fresh = (tx: Parameters<typeof refreshComparison>[0]) => refreshComparison(tx, id, AT);
    expect(await place.db.transaction(fresh)).toBe(false);
    await place.takeIn([reading(0, 61)]);
    await expect(
      place.db.transaction(async (tx) => refuseOutdatedComparison(tx, await intakeOf(id))),
    ).rejects.toMatchObject({
      code: 'comparison-changed',
    });
    expect(await place.db.transaction(fresh)).toBe(true);
    expect((await intakeOf(id)).comparison).toMatchObject({ readingsNew: 1, readingsDiffering: 1 });
    await place.db.transaction(async (tx) => refuseOutdatedComparison(tx, await intakeOf(id)));
    await place.takeIn([reading(0, 61, { lot: '24200' })]);
    expect(await place.db.transaction(fresh)).toBe(false);
    await place.db.transaction(async (tx) => refuseOutdatedComparison(tx, await intakeOf(id)));
  });

  it('supersedes what it was shown to differ from, keeps it, and counts each row', async () => {
    await place.takeIn([reading(0, 60.1), reading(5, 60.2), reading(10, null, { censoring: 'above' })]);
    const { id } = await read([reading(0, 60.1), reading(5, 60.9), reading(10, 60), reading(15, 60)]);
    await place.db('intakes').where({ id }).update({
      differing: 'supersede',
      state: 'queued',
      confirmed_by: place.plant.people.engineer.id,
      confirmed_at: AT,
    });
    const stored = await place.db.transaction(async (tx) => {
      const intake = await intakeOf(id);
      return storeReadings(tx, intake, await findSupersedable(tx, intake));
    });
    expect(stored).toMatchObject({
      rowsUsed: 1,
      rowsSuperseding: 2,
      rowsAlreadyThere: 1,
      rowsNotUsed: 0,
      readingsStored: 3,
      readingsSuperseding: 2,
      readingsAlreadyThere: 1,
      superseded: [{ lotNumber: '24117', readings: 2, isDecided: false }],
    });
    expect(stored.superseded[0].meanBefore).toBeCloseTo(60.15, 12);
    expect(stored.superseded[0].meanAfter).toBeCloseTo((60.1 + 60.9 + 60 + 60) / 4, 12);
    const all = await place.db('readings').orderBy(['measured_at', 'id']);
    const inPlace = new Map(all.map((one) => [one.id, one.value]));
    expect(all.map((one) => [one.value, one.superseded_by && inPlace.get(one.superseded_by)])).toEqual([
      [60.1, null],
      [60.2, 60.9],
      [60.9, null],
      [null, 60],
      [60, null],
      [60, null],
    ]);
    expect(await place.db('lot_channels')).toMatchObject([{ count: 4, censored_high: 0, maximum: 60.9 }]);
    expect(await place.problems(id)).toEqual([]);
  });

  it('does not supersede what another intake stored after it was confirmed, and says so', async () => {
    const { id } = await read([reading(0, 60.1), reading(5, 60.2)]);
    await place.takeIn([reading(0, 61)]);
    const stored = await place.db.transaction(async (tx) => {
      const intake = { ...(await intakeOf(id)), differing: 'supersede' as const };
      return storeReadings(tx, intake, await findSupersedable(tx, intake));
    });
    expect(stored).toMatchObject({ rowsUsed: 1, rowsSuperseding: 0, rowsAlreadyThere: 1 });
    expect(await place.problems(id)).toMatchObject([{ row: 2, code: 'stored-value-differs' }]);
  });
});
