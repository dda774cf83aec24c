import { insertDecision, insertHold, insertSetAside } from '../../../test/support/factories/holds';
import { insertIntake, insertLot, insertReadings } from '../../../test/support/factories/lots';
import { insertRow } from '../../../test/support/factories/insert';
import { planParameters } from '../../../test/support/factories/plans';
import { insertFit, insertVerdict } from '../../../test/support/factories/verdicts';
import {
  listSummaryWeeksTold,
  findSummary,
  getSummaryVersion,
  insertSummary,
  listSummaries,
  listSummaryVersions,
} from './summaries';
import { findFirstReadingAt, findSummaryPlant, getSummaryContent, type SummaryPlant } from './summary-facts';
import { weekStartingOn } from './summary-week';
import { openPlantDatabase, type PlantDatabase } from './testing/plant-database';
import { insertMovement } from './testing/summary-week-rows';

const WEEK = weekStartingOn('2026-03-02', 'Europe/London');

describe('what is told of a week', () => {
  let place: PlantDatabase;
  beforeAll(async () => {
    place = await openPlantDatabase();
  });
  afterAll(() => place.close());
  beforeEach(() => place.reset());

  const told = async () => {
    const plant = (await findSummaryPlant(place.db, place.plant.id)) as SummaryPlant;
    return getSummaryContent(place.db, plant, WEEK);
  };
  const planWithCap = (channelIndex: number, allowanceCap: number | null) =>
    insertRow(place.db, 'plan_revisions', {
      plant_id: place.plant.id,
      channel_id: place.plant.channels[channelIndex].id,
      revision: 1,
      state: 'in_force',
      reason: 'first plan',
      parameters: JSON.stringify({ ...planParameters(place.plant.channels[channelIndex]), allowanceCap }),
      report: JSON.stringify({ cautions: [], leftOutLots: [] }),
      drafted_by: place.plant.people.engineer.id,
      drafted_at: WEEK.from,
      proposed_by: place.plant.people.engineer.id,
      proposed_at: WEEK.from,
      approved_by: place.plant.people.manager.id,
      approved_at: WEEK.from,
    });
  const heldLot = async (number: string, openedAt: string) => {
    const { plant, db } = place;
    const [channel] = plant.channels;
    const lot = await insertLot(db, plant, { number, startsAt: '2026-03-05T20:00:00Z' });
    const intakeId = await insertIntake(db, plant, { receivedAt: new Date('2026-03-05T22:00:00Z') });
    await insertReadings(db, plant, { channel, lot, intakeId }, [59.4, 59.7]);
    const fitId = await insertFit(db, plant, channel.id);
    const verdictId = await insertVerdict(db, plant, { channel, lot }, { fitId, score: -4.3 });
    return insertHold(db, plant, { lot, openedAt, causes: [{ channel, verdictId, intakeId }] });
  };

  it('is nothing but the lines of a plant in which nothing happened', async () => {
    const content = await told();
    expect(content).toMatchObject({
      headline: 'No lot was measured in this week, and none waits on hold.',
      whatToAsk: [],
      total: { week: { measured: { lots: 0 }, stillOpen: { lots: 0, value: null } }, lastWeek: null },
      openHolds: { count: 0, holds: [] },
      gauges: [],
      notScored: [],
      intakes: { count: 0, intakes: [] },
    });
    expect(content.lines.map(({ line }) => line.name)).toEqual(['Calender 1', 'Coater 2']);
  });

  it('has the oldest hold first, in the first sentence and in the question to whom may decide it', async () => {
    const old = await heldLot('24118', '2026-03-06T20:00:00Z');
    const late = await heldLot('24119', '2026-03-08T21:00:00Z');
    await insertSetAside(place.db, place.plant, old);
    await heldLot('24120', '2026-03-09T00:00:00Z');
    const content = await told();
    expect(content.openHolds.holds.map(({ holdId, ageHours, isSetAside }) => [holdId, ageHours, isSetAside])).toEqual([
      [old, 52, true],
      [late, 3, false],
    ]);
    expect(content.openHolds.holds[0].sentence).toContain('Lot 24118 lies 4.3 σ below its baseline in coat weight');
    expect(content.headline).toContain('Lot 24118 of Coater 2 had been on hold for 2');
    expect(content.whatToAsk.map(({ whom, path }) => [whom, path])).toEqual([
      ['the quality manager, manager', `/holds/${old}`],
      ['the line lead, lead', `/holds/${late}`],
    ]);
  });

  it('tells what was decided after the week ended, and no longer asks for it', async () => {
    const holdId = await heldLot('24118', '2026-03-06T20:00:00Z');
    await insertDecision(place.db, place.plant, { holdId, disposition: 'scrap', at: '2026-03-09T05:00:00Z' });
    const content = await told();
    expect(content.openHolds.holds).toMatchObject([{ decidedSince: 'scrap' }]);
    expect(content.total.week.stillOpen.lots).toBe(1);
    expect(content.headline).toContain('The one held lot is decided');
    expect(content.whatToAsk).toEqual([]);
  });

  it('states values only in the plant’s currency', async () => {
    await place.db('products').where({ id: place.plant.productId }).update({ value_per_unit: 1.8 });
    await heldLot('24118', '2026-03-06T20:00:00Z');
    expect((await told()).total.week.stillOpen.value).toBeNull();
    expect((await told()).openHolds.holds[0].value).toBeNull();
    await place.db('plants').where({ id: place.plant.id }).update({ currency: 'EUR' });
    const content = await told();
    expect(content.total.week.stillOpen.value).toEqual({ amount: 900, currency: 'EUR', lotsWithout: 0 });
    expect(content.openHolds.holds[0].value).toBe(900);
  });

  it('has each channel’s newest movement of the week as a share of its allowance, with last week’s beside it', async () => {
    const { db, plant } = place;
    const [coat, web] = plant.channels;
    const coatPlan = await planWithCap(0, 0.6);
    const webPlan = await planWithCap(1, null);
    const moved = (channelId: number, planId: number, at: string, movement: number | null, segmentStartsAt?: string) =>
      insertMovement(db, plant, channelId, { planId, at, movement, segmentStartsAt });
    await moved(coat.id, coatPlan, '2026-03-01T23:59:59Z', -0.3);
    await moved(coat.id, coatPlan, '2026-03-04T10:00:00Z', 0.7);
    await moved(coat.id, coatPlan, '2026-03-08T10:00:00Z', 0.9);
    await moved(coat.id, coatPlan, '2026-03-08T10:00:00Z', -0.45, '2026-03-06T00:00:00Z');
    await moved(coat.id, coatPlan, '2026-03-09T00:00:00Z', 0.1);
    await moved(web.id, webPlan, '2026-03-05T00:00:00Z', 0.2);
    expect((await told()).gauges).toEqual([
      expect.objectContaining({
        channel: { id: coat.id, name: 'Coat weight' },
        gaugeAssetNumber: 'BG-204',
        movement: 0.45,
        cap: 0.6,
        share: 0.75,
        lastWeekShare: 0.5,
        isGettingWorse: true,
      }),
      expect.objectContaining({ channel: { id: web.id, name: 'Web thickness' }, share: null, lastWeekShare: null }),
    ]);
    await moved(coat.id, coatPlan, '2026-03-08T20:00:00Z', 0.2);
    await moved(coat.id, coatPlan, '2026-03-08T20:00:00Z', null, '2026-03-08T12:00:00Z');
    expect((await told()).gauges.map(({ channel }) => channel.name)).toEqual(['Web thickness']);
  });

  it('names workbooks that wait for somebody whenever they came, and those refused in the week', async () => {
    const { db, plant } = place;
    const add = (state: string, receivedAt: string, failure?: string) =>
      insertIntake(db, plant, { state, receivedAt: new Date(receivedAt), failure });
    const waiting = await add('needs_attention', '2026-02-20T06:00:00Z');
    await add('refused', '2026-03-01T23:00:00Z', 'too old to tell');
    const refused = await add('refused', '2026-03-02T00:00:00Z', 'The file is no workbook.');
    await add('scored', '2026-03-03T06:00:00Z');
    await add('needs_attention', '2026-03-09T00:00:00Z');
    const { intakes } = await told();
    expect(intakes.count).toBe(2);
    expect(intakes.intakes.map(({ id, state, sentence }) => [id, state, sentence])).toEqual([
      [waiting, 'needs_attention', 'It waits for somebody to confirm what was recognised.'],
      [refused, 'refused', 'The file is no workbook.'],
    ]);
  });

  it('is another plant’s own', async () => {
    await heldLot('24118', '2026-03-06T20:00:00Z');
    const otherId = await insertRow(place.db, 'plants', { name: 'Overdale', time_zone: 'UTC', created_at: WEEK.from });
    const other = (await findSummaryPlant(place.db, otherId)) as SummaryPlant;
    expect(await getSummaryContent(place.db, other, WEEK)).toMatchObject({ lines: [], openHolds: { count: 0 } });
    expect(await findFirstReadingAt(place.db, otherId)).toBeNull();
    expect(await findFirstReadingAt(place.db, place.plant.id)).toEqual(new Date('2026-03-05T20:00:00Z'));
  });

  it('is kept in versions that never change', async () => {
    const { db, plant } = place;
    const content = await told();
    const add = (weekStartsOn: string, version: number) =>
      db.transaction((tx) => insertSummary(tx, { plantId: plant.id, weekStartsOn, version, content, madeAt: WEEK.to }));
    expect([await listSummaryWeeksTold(db, plant.id), await getSummaryVersion(db, plant.id, '2026-03-02')]).toEqual([
      [],
      0,
    ]);
    const first = await add('2026-03-02', 1);
    const second = await add('2026-03-02', 2);
    await add('2026-02-23', 1);
    await expect(add('2026-03-02', 2)).rejects.toMatchObject({ constraint: 'summaries_version_key' });
    expect(await findSummary(db, first)).toEqual({
      id: first,
      plantId: plant.id,
      weekStartsOn: '2026-03-02',
      version: 1,
      madeAt: WEEK.to,
      content,
    });
    expect((await listSummaries(db, plant.id)).map(({ weekStartsOn, version }) => [weekStartsOn, version])).toEqual([
      ['2026-03-02', 2],
      ['2026-02-23', 1],
    ]);
    expect((await listSummaryVersions(db, plant.id, '2026-03-02')).map(({ id }) => id)).toEqual([second, first]);
    expect([await listSummaryWeeksTold(db, plant.id), await getSummaryVersion(db, plant.id, '2026-03-02')]).toEqual([
      ['2026-02-23', '2026-03-02'],
      2,
    ]);
    await expect(db('summaries').where({ id: first }).update({ version: 9 })).rejects.toThrow('append-only');
  });
});
