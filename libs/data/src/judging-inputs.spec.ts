import { insertDecision, insertHold } from '../../../test/support/factories/holds';
import { insertPlan, planParameters } from '../../../test/support/factories/plans';
import { insertBreak } from '../../../test/support/factories/record';
import { insertFit, insertVerdict } from '../../../test/support/factories/verdicts';
import { getChannelInputs, getProposalInputs } from './judging-inputs';
import { openPlantDatabase, type PlantDatabase } from './testing/plant-database';

const START = Date.parse('2026-03-01T06:00:00Z');
const HOUR = 3_600_000;
const DAY_SECONDS = 86_400;

describe('what judging a channel reads', () => {
  let place: PlantDatabase;
  let channelId: number;
  let ids: Record<string, number>;
  beforeAll(async () => {
    place = await openPlantDatabase();
  });
  afterAll(() => place.close());
  beforeEach(async () => {
    await place.reset();
    channelId = place.plant.channels[0].id;
    // Lots 1 to 6, a day apart, two readings two hours apart each.
    await place.takeIn(
      [1, 2, 3, 4, 5, 6].flatMap((day) =>
        [0, 2].map((hour) => ({
          lot: `L${day}`,
          channelId,
          at: START + (24 * day + hour) * HOUR,
          value: 60 + day / 10 + hour / 100,
        })),
      ),
    );
    const lots = await place.db('lots').select<{ id: number; number: string }[]>('id', 'number');
    ids = Object.fromEntries(lots.map((lot) => [lot.number, lot.id]));
  });

  const lot = (number: string) => ({
    id: ids[number],
    number,
    startsAt: new Date(START),
    endsAt: new Date(START),
  });
  const verdict = async (number: string, options: { isProvisional?: boolean; readingCount?: number } = {}) => {
    const [channel] = place.plant.channels;
    const fitId = await insertFit(place.db, place.plant, channelId);
    const id = await insertVerdict(
      place.db,
      place.plant,
      { channel, lot: lot(number) },
      { fitId, isProvisional: options.isProvisional ?? false, isCurrent: false },
    );
    const copy = await place.db('verdicts').where({ id }).first();
    delete copy.id;
    return place
      .db('verdicts')
      .insert({ ...copy, is_current: true, reading_count: options.readingCount ?? 2 })
      .returning('id')
      .then(([row]) => row.id as number);
  };
  const hold = async (number: string) =>
    insertHold(place.db, place.plant, {
      lot: lot(number),
      causes: [{ channel: place.plant.channels[0], verdictId: await verdict(number) }],
    });
  const exclude = async (number: string, correctsId: number | null = null, isWithdrawn = false): Promise<number> =>
    (
      await place
        .db('exclusions')
        .insert({
          plant_id: place.plant.id,
          channel_id: channelId,
          lot_id: ids[number],
          reason: 'a start-up lot',
          excluded_by: place.plant.people.engineer.id,
          excluded_at: new Date(START),
          corrects_id: correctsId,
          is_withdrawn: isWithdrawn,
        })
        .returning('id')
    )[0].id as number;
  const numbersOf = (lotIds: number[]) => lotIds.map((id) => Object.keys(ids).find((key) => ids[key] === id));
  const allLots = async (rejudgeFrom: number | null = null) =>
    (await getChannelInputs(place.db, channelId, rejudgeFrom)).segments.flatMap((segment) => segment.lots);

  it('is every lot with its figures and specification, one point a lot while lots are short against T', async () => {
    const inputs = await getChannelInputs(place.db, channelId);
    expect(inputs).toMatchObject({ channelId, plantId: place.plant.id, inputsVersion: 1, plan: null });
    expect(inputs.segments).toHaveLength(1);
    const [segment] = inputs.segments;
    expect(segment).toMatchObject({ startsAt: null, endsAt: null, startLevel: null });
    expect(numbersOf(segment.lotIdsToJudge)).toEqual(['L1', 'L2', 'L3', 'L4', 'L5', 'L6']);
    expect(segment.lots[0]).toEqual({
      lotId: ids.L1,
      firstAt: (START + 24 * HOUR) / 1000,
      lastAt: (START + 26 * HOUR) / 1000,
      count: 2,
      censoredLow: 0,
      censoredHigh: 0,
      minimum: 60.1,
      maximum: expect.closeTo(60.12, 12),
      countBelow: 0,
      countAbove: 0,
      points: [
        {
          at: (START + 25 * HOUR) / 1000,
          count: 2,
          mean: expect.closeTo(60.11, 12),
          sumSquares: expect.closeTo(0.0002, 12),
        },
      ],
      specification: { nominal: 60, lower: 58.8, upper: 61.2 },
      pulls: true,
    });
  });

  it('cuts a lot into points when it is longer than a tenth of the plan’s shortest drift period', async () => {
    await insertPlan(place.db, place.plant, place.plant.channels[0]);
    // T is 72 h, so lots beyond 7.2 h are cut.
    await place.takeIn(
      Array.from({ length: 25 }, (_, hour) => ({
        lot: 'long',
        channelId,
        at: START + (24 * 8 + hour) * HOUR,
        value: 60 + hour,
      })),
    );
    const lots = await allLots();
    const long = lots.at(-1);
    expect(long?.count).toBe(25);
    expect(long?.points.length).toBeGreaterThan(3);
    expect(long?.points.reduce((sum, point) => sum + point.count, 0)).toBe(25);
    expect(lots[0].points).toHaveLength(1);
  });

  it('lets a lot pull unless it is held and undecided, scrapped, or excluded and not taken back', async () => {
    await hold('L1');
    await insertDecision(place.db, place.plant, { holdId: await decidable('L2'), disposition: 'release' });
    await insertDecision(place.db, place.plant, { holdId: await decidable('L3'), disposition: 'scrap' });
    await exclude('L4');
    await exclude('L5', await exclude('L5'), true);
    await exclude('L6', await exclude('L6'), false);
    expect((await allLots(0)).map(({ lotId, pulls }) => [numbersOf([lotId])[0], pulls])).toEqual([
      ['L1', false],
      ['L2', true],
      ['L3', false],
      ['L4', false],
      ['L5', true],
      ['L6', false],
    ]);
  });

  /** The factory's decision is about 500 of it. */
  const decidable = async (number: string) => {
    await place.db('lots').where({ id: ids[number] }).update({ quantity: 500, quantity_unit: 'm' });
    return hold(number);
  };

  it('starts a segment at each break that was not taken back, and keeps the level of its last fit', async () => {
    const [channel] = place.plant.channels;
    const planId = await insertPlan(place.db, place.plant, channel);
    const at = new Date(START + 80 * HOUR).toISOString();
    await insertBreak(place.db, place.plant, channel, { at });
    const wrong = await insertBreak(place.db, place.plant, channel, { at: new Date(START + 40 * HOUR).toISOString() });
    await insertBreak(place.db, place.plant, channel, {
      at: new Date(START + 40 * HOUR).toISOString(),
      correctsId: wrong,
      isWithdrawn: true,
    });
    const fitId = await insertFit(place.db, place.plant, channelId, planId);
    const fit = await place.db('fits').where({ id: fitId }).first();
    delete fit.id;
    await place.db('fits').insert({ ...fit, segment_starts_at: new Date(at), start_level: 0.25 });
    const { segments } = await getChannelInputs(place.db, channelId);
    expect(
      segments.map(({ startsAt, endsAt, startLevel, lots }) => ({
        startsAt,
        endsAt,
        startLevel,
        lots: numbersOf(lots.map((one) => one.lotId)),
      })),
    ).toEqual([
      { startsAt: null, endsAt: Date.parse(at) / 1000, startLevel: null, lots: ['L1', 'L2', 'L3'] },
      { startsAt: Date.parse(at) / 1000, endsAt: null, startLevel: 0.25, lots: ['L4', 'L5', 'L6'] },
    ]);
  });

  it('looks again at provisional lots and at those with late readings, not at settled ones, with their window before them', async () => {
    await insertPlan(place.db, place.plant, place.plant.channels[0]);
    for (const number of ['L1', 'L2', 'L3', 'L4']) await verdict(number);
    await verdict('L5', { isProvisional: true });
    const [segment] = (await getChannelInputs(place.db, channelId)).segments;
    expect(numbersOf(segment.lotIdsToJudge)).toEqual(['L5', 'L6']);
    expect(numbersOf(segment.lots.map((one) => one.lotId))).toEqual(['L1', 'L2', 'L3', 'L4', 'L5', 'L6']);

    await place.takeIn([{ lot: 'L2', channelId, at: START + 49 * HOUR, value: 60.2 }]);
    const [again] = (await getChannelInputs(place.db, channelId)).segments;
    expect(numbersOf(again.lotIdsToJudge)).toEqual(['L2', 'L5', 'L6']);
  });

  it('looks again at settled lots that end after the instant it is told', async () => {
    for (const number of ['L1', 'L2', 'L3', 'L4', 'L5', 'L6']) await verdict(number);
    expect((await getChannelInputs(place.db, channelId)).segments).toEqual([]);
    const from = (START + (24 * 4 + 1) * HOUR) / 1000;
    const [segment] = (await getChannelInputs(place.db, channelId, from)).segments;
    expect(numbersOf(segment.lotIdsToJudge)).toEqual(['L4', 'L5', 'L6']);
  });

  it('reaches back no further than the plan’s window before the oldest lot to judge', async () => {
    const [channel] = place.plant.channels;
    const planId = await insertPlan(place.db, place.plant, channel, { state: 'draft' });
    const parameters = { ...planParameters(channel), windowSeconds: 2.5 * DAY_SECONDS };
    const proposed = {
      parameters: JSON.stringify(parameters),
      proposed_by: place.plant.people.engineer.id,
      proposed_at: new Date(START),
    };
    await place
      .db('plan_revisions')
      .where({ id: planId })
      .update({ ...proposed, state: 'proposed' });
    await place
      .db('plan_revisions')
      .where({ id: planId })
      .update({ state: 'in_force', approved_by: place.plant.people.manager.id, approved_at: new Date(START) });
    for (const number of ['L1', 'L2', 'L3', 'L4', 'L5']) await verdict(number);
    const inputs = await getChannelInputs(place.db, channelId);
    expect(inputs.plan).toMatchObject({
      id: planId,
      revision: 1,
      isFirst: true,
      parameters: { windowSeconds: 216_000 },
    });
    expect(numbersOf(inputs.segments[0].lots.map((one) => one.lotId))).toEqual(['L4', 'L5', 'L6']);
  });

  it('says of a later plan that it is not the first', async () => {
    const [channel] = place.plant.channels;
    const first = await insertPlan(place.db, place.plant, channel);
    await place
      .db('plan_revisions')
      .where({ id: first })
      .update({ state: 'retired', retired_at: new Date(START) });
    const second = await insertPlan(place.db, place.plant, channel, { revision: 2, state: 'proposed' });
    await place
      .db('plan_revisions')
      .where({ id: second })
      .update({
        state: 'in_force',
        approved_by: place.plant.people.manager.id,
        approved_at: new Date('2026-03-05T00:00:00Z'),
      });
    expect((await getChannelInputs(place.db, channelId)).plan).toMatchObject({ id: second, isFirst: false });
  });

  it('is one snapshot: what is written meanwhile belongs to the next version', async () => {
    await place.db.transaction(
      async (tx) => {
        const before = await getChannelInputs(tx, channelId);
        await place.takeIn([{ lot: 'L7', channelId, at: START + 24 * 7 * HOUR, value: 60 }]);
        expect(await getChannelInputs(tx, channelId)).toEqual(before);
      },
      { isolationLevel: 'repeatable read', readOnly: true },
    );
    expect((await getChannelInputs(place.db, channelId)).inputsVersion).toBe(2);
  });

  describe('for a proposal', () => {
    it('is the lots of the newest segment within the window, with the narrowest tolerance', async () => {
      await insertBreak(place.db, place.plant, place.plant.channels[0], {
        at: new Date(START + 40 * HOUR).toISOString(),
      });
      const inputs = await getProposalInputs(place.db, channelId, {
        windowSeconds: 3.5 * DAY_SECONDS,
        shortestPeriodSeconds: 3 * DAY_SECONDS,
      });
      expect(numbersOf(inputs.lots.map((one) => one.lotId))).toEqual(['L3', 'L4', 'L5', 'L6']);
      expect(inputs.tolerance).toBeCloseTo(2.4, 12);
      expect(inputs.lotNumbers.get(ids.L3)).toBe('L3');
    });

    it('is nothing for a channel without readings', async () => {
      const inputs = await getProposalInputs(place.db, place.plant.channels[1].id, {
        windowSeconds: DAY_SECONDS,
        shortestPeriodSeconds: 60,
      });
      expect(inputs).toEqual({ lots: [], tolerance: null, lotNumbers: new Map() });
    });
  });
});
