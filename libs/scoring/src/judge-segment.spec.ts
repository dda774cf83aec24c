import { judgeSegment } from './judge-segment';
import { ScoringError } from './scoring-error';
import { DAY, madeLot, madePlan, onePointLot, SPACING, START_AT } from './testing/made-lots';
import { normals } from './testing/seeded-random';
import type { LotOnChannel, PlanParameters } from './types';

function channel(count = 120, seed = 3): LotOnChannel[] {
  const normal = normals(seed);
  return Array.from({ length: count }, (_, j) => onePointLot(j, Math.sin(j / 25) + normal()));
}

function judge(lots: LotOnChannel[], lotIdsToJudge: number[], plan: PlanParameters | null = madePlan()) {
  return judgeSegment({ plan, lots, lotIdsToJudge, segmentStartsAt: START_AT, segmentEndsAt: null });
}

const SPECIFICATION = { nominal: 100, lower: 90, upper: 110 };

describe('judging a segment', () => {
  it('gives each lot its score, baseline and limits in the unit, as measured', () => {
    const lots = channel().map((lot) =>
      onePointLot(lot.lotId, lot.points[0].mean + 100, { specification: SPECIFICATION }),
    );
    lots[60] = onePointLot(60, 100 + Math.sin(60 / 25) + 7, { specification: SPECIFICATION });
    const plan = madePlan({ centre: 0.1, scale: 1.25, limit: 3.2 });
    const { lots: [out], fit } = judge(lots, [60], plan); // prettier-ignore
    expect(out.controlState).toBe('outside_control_limits');
    expect(out.specificationState).toBe('inside_specification');
    const { score, residual, residualSd, lotMean, baseline, controlHigh, controlLow } = out;
    expect(lotMean).toBeCloseTo(107.675463, 6);
    expect(baseline! + residual!).toBeCloseTo(lotMean!, 10);
    expect(Math.abs(baseline! - 100 - Math.sin(60 / 25))).toBeLessThan(1);
    // score = (r / sd - centre) / scale with residualSd = sd * scale.
    expect(score).toBeCloseTo(residual! / residualSd! - 0.1 / 1.25, 10);
    expect(controlHigh).toBeCloseTo(baseline! + (0.1 / 1.25 + 3.2) * residualSd!, 10);
    expect(controlLow).toBeCloseTo(baseline! + (0.1 / 1.25 - 3.2) * residualSd!, 10);
    expect(fit).toMatchObject({ pointCount: 120, lotCount: 119 });
    expect(out.signals).toHaveLength(1);
    expect(out.signals[0]).toMatchObject({ signal: 'lot_mean', action: 'holds' });
    expect(out.signals[0].facts).toMatchObject({ score, limit: 3.2, direction: 'above', lotMean, baseline });
  });

  it('does not take a change of product for movement', () => {
    const one = channel();
    const two = one.map((lot, j) =>
      j % 2 === 0
        ? lot
        : onePointLot(j, lot.points[0].mean + 250, { specification: { nominal: 250, lower: null, upper: null } }),
    );
    const ids = one.map((lot) => lot.lotId);
    const scores = judge(one, ids).lots.map((lot) => lot.score);
    judge(two, ids).lots.forEach((lot, j) => expect(lot.score).toBeCloseTo(scores[j]!, 8));
  });

  it('draws the baseline over the points with its standard error', () => {
    const { curve } = judge(channel(), []);
    expect(curve.t).toHaveLength(120);
    const worst = Math.max(
      ...curve.t.map((t, i) => Math.abs(curve.value[i] - Math.sin((t - START_AT) / SPACING / 25))),
    );
    expect(worst).toBeLessThan(3.5 * Math.max(...curve.standardError));
    expect(curve.standardError.every((se) => se > 0 && se < 1)).toBe(true);
  });

  it('scores a held lot against the others without letting it pull', () => {
    const lots = channel();
    lots[50] = onePointLot(50, 30, { pulls: false });
    const { lots: judged } = judge(lots, [49, 50, 51]);
    expect(judged.map((lot) => lot.controlState)).toEqual([
      'within_control_limits',
      'outside_control_limits',
      'within_control_limits',
    ]);
  });
});

describe('a lot that cannot be scored', () => {
  const reasonOf = (lots: LotOnChannel[], id: number, plan: PlanParameters | null = madePlan()) => {
    const [lot] = judge(lots, [id], plan).lots;
    expect(lot.controlState).toBe('not_scored');
    expect(lot.score).toBeNull();
    const signal = lot.signals.find((found) => found.signal === 'not_scored');
    return [lot.notScoredReason, signal?.action];
  };

  it('is learning below 8 lots, which holds nothing', () => {
    expect(reasonOf(channel(7), 6)).toEqual(['learning', 'notice']);
    expect(judge(channel(8), [7]).lots[0].score).not.toBeNull();
  });

  it('is learning below three lots for each degree of freedom', () => {
    // Lots a day apart with T = 2 days: about one degree of freedom for each lot.
    const sparse = channel(12).map((lot, j) => madeLot(j, [{ ...lot.points[0], at: START_AT + j * DAY }]));
    const plan = madePlan({ shortestPeriodSeconds: 2 * DAY, effectivePeriodSeconds: 2 * DAY });
    expect(reasonOf(sparse, 5, plan)).toEqual(['learning', 'notice']);
  });

  it('counts the minimum after held lots are out', () => {
    const lots = channel(12).map((lot) => ({ ...lot, pulls: lot.lotId < 7 }));
    expect(reasonOf(lots, 3)).toEqual(['learning', 'notice']);
  });

  it('has no plan in force, but keeps its specification verdict', () => {
    const lots = channel(30);
    lots[12] = onePointLot(12, 120, { specification: SPECIFICATION, countAbove: 3 });
    expect(reasonOf(lots, 12, null)).toEqual(['no_plan_in_force', 'notice']);
    const [lot] = judge(lots, [12], null).lots;
    expect(lot.specificationState).toBe('outside_specification');
    expect(lot.signals.map(({ signal, action }) => [signal, action])).toEqual([
      ['outside_specification', 'holds'],
      ['not_scored', 'notice'],
    ]);
  });

  it('has no values, which holds', () => {
    const lots = channel();
    lots[40] = madeLot(40, [], { censoredHigh: 10, specification: SPECIFICATION });
    expect(reasonOf(lots, 40)).toEqual(['no_values', 'holds']);
    const [lot] = judge(lots, [40]).lots;
    expect(lot).toMatchObject({ lotMean: null, baseline: null, specificationState: 'no_specification' });
    expect(lot.constant.state).toBe('not_scored');
    expect(lot.signals.find((found) => found.signal === 'censored_readings')?.action).toBe('holds');
  });

  it.each([NaN, Infinity, -Infinity])('has a value of %d, which holds and leaves the others as they are', (mean) => {
    const lots = channel();
    lots[40] = onePointLot(40, mean);
    expect(reasonOf(lots, 40)).toEqual(['non_finite', 'holds']);
    const others = channel().filter((lot) => lot.lotId !== 40);
    expect(judge(lots, [41]).lots[0].score).toBe(judge(others, [41]).lots[0].score);
  });

  it('lies where every point is the same, which holds', () => {
    const stuck = channel().map((lot) => onePointLot(lot.lotId, 4));
    expect(reasonOf(stuck, 60)).toEqual(['constant_data', 'holds']);
  });

  it('is settled as not scored when all the segment is off the scale', () => {
    const all = channel(20).map((lot) => madeLot(lot.lotId, [], { censoredLow: 10 }));
    const judgement = judge(all, [3, 19]);
    expect(judgement.fit).toBeNull();
    expect(judgement.lots.every((lot) => lot.notScoredReason === 'no_values')).toBe(true);
  });

  it('shares one instant with all others', () => {
    const tied = channel(20).map((lot) => madeLot(lot.lotId, [{ ...lot.points[0], at: START_AT }]));
    expect(reasonOf(tied, 4)).toEqual(['ill_posed', 'holds']);
  });
});

describe('ties', () => {
  it('between two lots at one time are scored like any others', () => {
    const lots = channel();
    lots[31] = madeLot(31, [{ ...lots[31].points[0], at: lots[30].points[0].at }]);
    const judged = judge(lots, [30, 31]).lots;
    expect(judged.every((lot) => Number.isFinite(lot.score))).toBe(true);
  });
});

describe('readings off the scale', () => {
  const withCensored = (more: Partial<LotOnChannel>, mean = 0) => {
    const lots = channel();
    lots[60] = onePointLot(60, mean, more);
    const [lot] = judge(lots, [60]).lots;
    return { lot, action: lot.signals.find((found) => found.signal === 'censored_readings')?.action };
  };

  it('never leave a lot within: a notice without a specification limit on their side', () => {
    for (const specification of [null, { nominal: 0, lower: null, upper: 9 }]) {
      const { lot, action } = withCensored({ censoredLow: 1, specification });
      expect([lot.controlState, lot.notScoredReason, action]).toEqual(['not_scored', 'censored', 'notice']);
      expect(lot.constant.state).toBe('not_scored');
      expect(lot.signals.every((signal) => signal.action !== 'holds')).toBe(true);
    }
  });

  it('hold when they may hide a nonconforming reading, and leave no verdict of inside', () => {
    const { lot, action } = withCensored({ censoredLow: 1, specification: { nominal: 0, lower: -9, upper: null } });
    expect(action).toBe('holds');
    expect(lot.specificationState).toBe('no_specification');
    expect(lot.signals.find((found) => found.signal === 'censored_readings')?.facts.mayHide).toBe('lower');
  });

  it('do not take back that the lot is outside', () => {
    const { lot } = withCensored({ censoredLow: 2 }, -9);
    expect(lot.controlState).toBe('outside_control_limits');
  });
});

describe('specification', () => {
  const stateOf = (more: Partial<LotOnChannel>, mean = 100) => {
    const lots = channel().map((lot) =>
      onePointLot(lot.lotId, lot.points[0].mean + 100, { specification: SPECIFICATION }),
    );
    lots[60] = onePointLot(60, mean, { specification: SPECIFICATION, ...more });
    return judge(lots, [60]).lots[0];
  };

  it('is met on a limit and not beyond it, by mean and by every reading', () => {
    expect(stateOf({}, 110).specificationState).toBe('inside_specification');
    expect(stateOf({}, 110.001).specificationState).toBe('outside_specification');
    expect(stateOf({ countBelow: 1 }).specificationState).toBe('outside_specification');
    expect(stateOf({ countAbove: 1 }).specificationState).toBe('outside_specification');
    expect(stateOf({ specification: null }, 5).specificationState).toBe('no_specification');
  });

  it('tells the side and the counts', () => {
    const lot = stateOf({ countBelow: 2, countAbove: 1, minimum: 88, maximum: 111 });
    const signal = lot.signals.find((found) => found.signal === 'outside_specification');
    expect(signal?.facts).toMatchObject({
      direction: 'both',
      countBelow: 2,
      countAbove: 1,
      lower: 90,
      upper: 110,
      count: 10,
    });
  });
});

describe('movement of the baseline', () => {
  /** One unit up every ten lots. */
  const climbing = channel(120, 8).map((lot, j) => onePointLot(j, lot.points[0].mean + j / 10));
  const plan = madePlan({ allowanceNotice: 4, allowanceCap: 10 });

  it('is a notice beyond the notice allowance, and lots beyond the cap are not scored, which holds', () => {
    const { lots, fit } = judge(climbing, [20, 60, 115], plan);
    expect(lots[0].signals).toEqual([]);
    expect(lots[1].signals.map(({ signal, action }) => [signal, action])).toEqual([['baseline_moved', 'notice']]);
    expect(Math.abs(Number(lots[1].signals[0].facts.movement) - 6)).toBeLessThan(2.5);
    expect(lots[2].notScoredReason).toBe('beyond_allowance');
    expect(lots[2].signals.map(({ signal, action }) => [signal, action])).toEqual([
      ['not_scored', 'holds'],
      ['baseline_moved', 'notice'],
    ]);
    expect(Math.abs(fit!.movement - 12)).toBeLessThan(2.5);
  });

  it('is counted from the segment start that an earlier judgement told', () => {
    const { startLevel } = judge(climbing, [], plan);
    const later = judgeSegment({
      plan,
      lots: climbing.slice(60),
      lotIdsToJudge: [115],
      segmentStartsAt: START_AT,
      segmentEndsAt: null,
      startLevel,
    });
    expect(later.lots[0].notScoredReason).toBe('beyond_allowance');
    expect(later.startLevel).toBe(startLevel);
  });

  it('starts from a level that is told once, when later lots can no longer change it', () => {
    // T_eff is 36 lot spacings.
    expect(judge(climbing.slice(0, 30), [], plan).startLevel).toBeNull();
    expect(judge(climbing.slice(0, 12), [], plan).startLevel).toBeNull();
    expect(judge(climbing.slice(0, 40), [], plan).startLevel).toBe(judge(climbing, [], plan).startLevel);
  });

  it('is nothing without a stated allowance', () => {
    expect(judge(climbing, [115]).lots[0].signals).toEqual([]);
  });
});

describe('the constant yardstick', () => {
  it('judges the lot mean by the frozen chart, beside the score', () => {
    const plan = madePlan({ constant: { centre: 0.5, halfWidth: 2 } });
    const lots = channel();
    lots[60] = onePointLot(60, 2.6);
    lots[61] = onePointLot(61, 2.4);
    const [out, within] = judge(lots, [60, 61], plan).lots.map((lot) => lot.constant);
    expect(out).toMatchObject({ state: 'outside_control_limits', low: -1.5, high: 2.5 });
    expect(out.score).toBeCloseTo(3.15, 10);
    expect(within.state).toBe('within_control_limits');
  });
});

describe('a long run of held lots', () => {
  it('asks for a break once it is longer than half of T', () => {
    const step = channel(150).map((lot) =>
      lot.lotId < 120 ? lot : onePointLot(lot.lotId, lot.points[0].mean + 40, { pulls: false }),
    );
    // T is 36 lot spacings: more than 18 lots are asked for.
    expect(judge(step.slice(0, 137), []).askForBreak).toBeUndefined();
    expect(judge(step, []).askForBreak).toMatchObject({ fromLotId: 120, toLotId: 149, lotCount: 30 });
  });

  it('does not ask once lots fit again', () => {
    const back = channel(150).map((lot) =>
      lot.lotId < 110 || lot.lotId > 145 ? lot : onePointLot(lot.lotId, lot.points[0].mean + 40, { pulls: false }),
    );
    expect(judge(back, []).askForBreak).toBeUndefined();
  });
});

describe('signals that are off', () => {
  it('are not given', () => {
    const plan = madePlan();
    plan.signals = { ...plan.signals, lot_mean: 'off' };
    const lots = channel();
    lots[60] = onePointLot(60, 20);
    expect(judge(lots, [60], plan).lots[0]).toMatchObject({ controlState: 'outside_control_limits', signals: [] });
  });
});

describe('a lot of another segment', () => {
  it('is refused', () => {
    const input = { plan: madePlan(), lots: channel(20), lotIdsToJudge: [] };
    const [startsAt, endsAt] = [START_AT, START_AT + 19 * SPACING];
    expect(() => judgeSegment({ ...input, segmentStartsAt: startsAt, segmentEndsAt: endsAt })).not.toThrow();
    expect(() => judgeSegment({ ...input, segmentStartsAt: startsAt + SPACING, segmentEndsAt: null })).toThrow(
      ScoringError,
    );
    expect(() => judgeSegment({ ...input, segmentStartsAt: startsAt, segmentEndsAt: endsAt - SPACING })).toThrow(
      ScoringError,
    );
  });
});

describe('what the caller answers for', () => {
  it('is refused', () => {
    const lots = channel(20);
    const wrong: [LotOnChannel[], number[], PlanParameters][] = [
      [lots, [99], madePlan()],
      [[lots[1], lots[0]], [], madePlan()],
      [[lots[0], lots[0]], [], madePlan()],
      [lots, [], madePlan({ scale: 0 })],
      [lots, [], madePlan({ limit: NaN })],
      [lots, [], madePlan({ effectivePeriodSeconds: Infinity })],
      [lots, [], madePlan({ components: { betweenLots: 0, betweenPoints: 0, betweenReadings: 0 } })],
      [lots, [], madePlan({ components: { betweenLots: 2, betweenPoints: -1, betweenReadings: 0 } })],
      [lots, [], madePlan({ centre: NaN })],
    ];
    for (const [given, ids, plan] of wrong) expect(() => judge(given, ids, plan)).toThrow(ScoringError);
  });
});
