import type { LotJudgement } from '@app/scoring';
import { insertPlan } from '../../../test/support/factories/plans';
import { updateInputsChanged } from './breaks';
import { InputsChangedError, type Recorded, recordJudgements } from './record-judgements';
import { judgedChannel, judgedLot, outsideLot } from './testing/judged';
import { openPlantDatabase, type PlantDatabase } from './testing/plant-database';

const START = Date.parse('2026-03-11T06:00:00Z');
const AT = new Date('2026-03-11T14:20:00Z');

describe('recording what was judged', () => {
  let place: PlantDatabase;
  let channelId: number;
  let planId: number;
  let first: number;
  let second: number;
  beforeAll(async () => {
    place = await openPlantDatabase();
  });
  afterAll(() => place.close());
  beforeEach(async () => {
    await place.reset();
    const [channel] = place.plant.channels;
    channelId = channel.id;
    planId = await insertPlan(place.db, place.plant, channel);
    await place.takeIn([
      { lot: '24117', channelId, at: START, value: 60 },
      { lot: '24118', channelId, at: START + 1000, value: 60 },
    ]);
    const lots = (await place.db('lots').orderBy('number')) as { id: number }[];
    [first, second] = lots.map(({ id }) => id);
  });

  const judged = (lots: LotJudgement[], inputsVersion = 1, curve?: { t: number[]; value: number[] }) =>
    judgedChannel(
      {
        channelId,
        plantId: place.plant.id,
        inputsVersion,
        plan: { id: planId, approvedAt: new Date(START), isFirst: true, limit: 3 },
      },
      lots,
      curve,
    );
  const record = (channel: ReturnType<typeof judged>): Promise<Recorded> =>
    place.db.transaction((tx) => recordJudgements(tx, [channel], { intakeId: null, methodVersion: '1', at: AT }));
  const verdicts = () => place.db('verdicts').orderBy('id');

  it('adds a verdict with its figures and signals, and the fit that it came from', async () => {
    const notice = { signal: 'baseline_moved' as const, action: 'notice' as const, facts: { movement: 0.4 } };
    const answer = await record(judged([judgedLot(first), judgedLot(second, { signals: [notice] })]));
    expect(answer).toEqual({ verdictCount: 2, held: [] });
    expect(await place.db('fits')).toMatchObject([
      {
        plan_revision_id: planId,
        lambda: null,
        edf: 2,
        lot_count: 2,
        start_level: 0.2,
        method_version: '1',
        judged_at: AT,
      },
    ]);
    expect(await verdicts()).toMatchObject([
      { lot_id: first, is_current: true, score: 0.5, score_limit: 3, reading_count: 1, baseline: 60, constant_low: 59 },
      { lot_id: second, is_current: true },
    ]);
    expect(await place.db('verdict_signals')).toMatchObject([
      { signal: 'baseline_moved', action: 'notice', facts: { movement: 0.4 } },
    ]);
  });

  it('adds no verdict that says nothing new', async () => {
    await record(judged([judgedLot(first), judgedLot(second)]));
    const before = await verdicts();
    expect(await record(judged([judgedLot(first), judgedLot(second)]))).toEqual({ verdictCount: 0, held: [] });
    expect(await verdicts()).toEqual(before);
  });

  it('makes the former verdict a former one when the new one differs', async () => {
    await record(judged([judgedLot(first, { isProvisional: true }), judgedLot(second)]));
    expect(await record(judged([judgedLot(first), judgedLot(second)]))).toMatchObject({ verdictCount: 1 });
    expect(
      (await verdicts()).map(({ lot_id, is_current, is_provisional }) => [lot_id, is_current, is_provisional]),
    ).toEqual([
      [first, false, true],
      [second, true, false],
      [first, true, false],
    ]);
  });

  it.each<[string, Partial<LotJudgement>]>([
    ['another score in its last digit', { score: 0.5 + Number.EPSILON }],
    ['another lot mean', { lotMean: 60.06 }],
    ['another reason not to score it', { controlState: 'not_scored', notScoredReason: 'learning', score: null }],
    ['another specification verdict', { specificationState: 'outside_specification' }],
    [
      'another verdict by the constant yardstick',
      { constant: { state: 'not_scored', low: null, high: null, score: null } },
    ],
  ])('adds a verdict with %s', async (_what, differs) => {
    await record(judged([judgedLot(first)]));
    expect(await record(judged([judgedLot(first, differs)]))).toMatchObject({ verdictCount: 1 });
  });

  it('adds a verdict for late readings, even when it says the same', async () => {
    await record(judged([judgedLot(first)]));
    await place.takeIn([{ lot: '24117', channelId, at: START + 5000, value: 60 }]);
    expect(await record(judged([judgedLot(first)], 2))).toMatchObject({ verdictCount: 1 });
    expect(await record(judged([judgedLot(first)], 2))).toMatchObject({ verdictCount: 0 });
  });

  it('records nothing when the inputs changed since they were read, and names the channel', async () => {
    await place.db.transaction((tx) => updateInputsChanged(tx, [channelId]));
    const failure: unknown = await record(judged([judgedLot(first)])).catch((error: unknown) => error);
    expect(failure).toBeInstanceOf(InputsChangedError);
    expect((failure as InputsChangedError).channelIds).toEqual([channelId]);
    expect(await verdicts()).toEqual([]);
    expect(await place.db('fits')).toEqual([]);
  });

  it('waits for a change that is under way, then sees it', async () => {
    let recording: Promise<unknown> | undefined;
    await place.db.transaction(async (tx) => {
      await updateInputsChanged(tx, [channelId]);
      recording = record(judged([judgedLot(first)])).catch((error: unknown) => error);
      await new Promise((resolve) => setTimeout(resolve, 100));
    });
    expect(await recording).toBeInstanceOf(InputsChangedError);
  });

  // Made before the plan, so that only its specification holds it.
  const outside: Partial<LotJudgement> = {
    signals: [{ signal: 'outside_specification', action: 'holds', facts: { countBelow: 1, countAbove: 0 } }],
  };

  it('lets two recordings of the same judging at once add each verdict and hold once', async () => {
    const both = await Promise.all([1, 2].map(() => record(judged([outsideLot(first, outside)]))));
    expect(both.map(({ verdictCount }) => verdictCount).sort()).toEqual([0, 1]);
    expect(both.flatMap(({ held }) => held)).toHaveLength(1);
    expect(await place.db('hold_causes')).toHaveLength(1);
  });

  it('leaves nothing behind when its transaction is rolled back', async () => {
    const recording = place.db.transaction(async (tx) => {
      await recordJudgements(
        tx,
        [judged([outsideLot(first), judgedLot(second)], 1, { t: [START / 1000], value: [0.1] })],
        { intakeId: null, methodVersion: '1', at: AT },
      );
      throw new Error('the power fails');
    });
    await expect(recording).rejects.toThrow('the power fails');
    for (const table of ['fits', 'verdicts', 'verdict_signals', 'baseline_points', 'holds', 'hold_causes'])
      expect(await place.db(table)).toEqual([]);
  });

  it('draws the baseline anew from its oldest judged lot on and lets older points stand', async () => {
    const t = [0, 60, 120, 180].map((seconds) => START / 1000 + seconds);
    await record(judged([judgedLot(first)], 1, { t, value: [1, 2, 3, 4] }));
    await record(judged([judgedLot(second, { score: 0.6 })], 1, { t: [t[2], t[3] + 30], value: [5, 6] }));
    const points = await place.db('baseline_points').orderBy('at').select('at', 'value');
    expect(points).toEqual([
      { at: new Date(START), value: 1 },
      { at: new Date(START + 60_000), value: 2 },
      { at: new Date(START + 120_000), value: 5 },
      { at: new Date(START + 210_000), value: 6 },
    ]);
  });

  describe('the database itself', () => {
    const refused = (sql: string) =>
      expect(place.db.raw(sql)).rejects.toThrow(/append-only|only added|violates check|duplicate key/);
    beforeEach(() =>
      record(judged([judgedLot(first, { signals: [{ signal: 'lot_mean', action: 'notice', facts: {} }] })])),
    );

    it.each([
      "update fits set method_version = '2'",
      'delete from fits',
      'update verdicts set score = 1',
      'update verdicts set is_current = false, score = 1',
      'delete from verdicts',
      'truncate verdicts cascade',
      "update verdict_signals set action = 'off'",
      'delete from verdict_signals',
    ])('refuses to %s', (sql) => refused(sql));

    it('has one current verdict a lot and channel', async () => {
      const columns =
        'plant_id, channel_id, lot_id, fit_id, is_current, control_state, is_provisional, score, score_limit, reading_count, specification_state, constant_state, constant_score, judged_at';
      await refused(`insert into verdicts (${columns}) select ${columns} from verdicts`);
    });

    it.each([
      ['within without a score', "'within_control_limits', null, null"],
      ['within beyond the limit', "'within_control_limits', 3.5, null"],
      ['not scored without a reason', "'not_scored', null, null"],
      ['not scored with a score', "'not_scored', 1, 'learning'"],
      ['a score that is no number', "'outside_control_limits', 'NaN', null"],
    ])('refuses a verdict that is %s', (_what, values) =>
      refused(
        `insert into verdicts (plant_id, channel_id, lot_id, fit_id, is_current, is_provisional, reading_count, specification_state, constant_state, judged_at, score_limit,
         control_state, score, not_scored_reason) select plant_id, channel_id, ${second}, fit_id, true, false, 1, 'inside_specification', 'not_scored', judged_at, 3, ${values} from verdicts limit 1`,
      ),
    );
  });
});
