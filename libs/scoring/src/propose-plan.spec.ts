import { defaultShortestPeriod } from './default-period';
import { proposePlan } from './propose-plan';
import type { PlanInput, PlanProposal } from './plan-proposal';
import { ScoringError } from './scoring-error';
import { segmentPoints } from './segment-points';
import { DAY, madeLot, onePointLot, SPACING, START_AT } from './testing/made-lots';
import { naiveScore } from './testing/naive-score';
import { normals } from './testing/seeded-random';
import { simulatedLots } from './testing/simulated-lots';
import type { LotOnChannel } from './types';

const COMPONENTS = { betweenLots: 0.64, betweenPoints: 0, betweenReadings: 3.6 };

function channel(lotCount = 100, seed = 31, amplitude = 2.5): LotOnChannel[] {
  const driftAt = (seconds: number) => 60 + amplitude * Math.sin(seconds / (2 * DAY));
  return simulatedLots({
    lotCount,
    pointsPerLot: 1,
    readingsPerPoint: 10,
    components: COMPONENTS,
    driftAt,
    normal: normals(seed),
  });
}

function proposed(input: PlanInput): Extract<PlanProposal, { status: 'proposed' }> {
  const proposal = proposePlan(input);
  if (proposal.status !== 'proposed') throw new Error(proposal.detail);
  return proposal;
}

const reasonOf = (input: PlanInput) => {
  const proposal = proposePlan(input);
  return proposal.status === 'insufficient' ? proposal.reason : null;
};
const codes = (input: PlanInput) => proposed(input).report.cautions.map(({ code }) => code);

describe('default shortest drift period', () => {
  it('is the longer of 3 days and 22 median lot spacings', () => {
    expect(defaultShortestPeriod(channel())).toBe(3 * DAY);
    const daily = channel().map((lot, j) => ({ ...lot, firstAt: START_AT + j * DAY + (j > 50 ? 9 * DAY : 0) }));
    expect(defaultShortestPeriod(daily)).toBe(22 * DAY);
    expect(defaultShortestPeriod([])).toBe(3 * DAY);
  });
});

describe('a proposed plan', () => {
  const lots = channel();
  const { plan, report } = proposed({ lots, tolerance: 20 });

  it('finds scale and components of the channel beside its slow movement', () => {
    // Of 100 lots: standard error 7 % of the scale of a lot mean, whose true value is 1; 2 % of the readings' variance.
    const lotSd = plan.scale * Math.sqrt(plan.components.betweenLots + plan.components.betweenReadings / 10);
    expect(Math.abs(lotSd - 1)).toBeLessThan(0.2);
    expect(Math.abs(plan.components.betweenReadings - 3.6)).toBeLessThan(0.6);
    expect(Math.abs(plan.centre)).toBeLessThan(0.2);
    expect(plan.effectivePeriodSeconds).toBeGreaterThanOrEqual(plan.shortestPeriodSeconds);
    expect(plan.effectivePeriodSeconds).toBeLessThanOrEqual(plan.windowSeconds);
    expect(report.edf).toBeGreaterThan(3);
  });

  it('carries the defaults and the allowance as shares of the tolerance', () => {
    expect(plan).toMatchObject({
      shortestPeriodSeconds: 3 * DAY,
      windowSeconds: 30 * DAY,
      limit: 3,
      referenceLotCount: 100,
      allowanceNotice: 2,
      allowanceCap: 5,
    });
    expect(Math.abs(plan.fallbackNominal - 60)).toBeLessThan(3);
    expect(proposed({ lots }).plan).toMatchObject({ allowanceNotice: null, allowanceCap: null });
    const allowance = { noticeShare: 0.05, capShare: 0.4 };
    expect(proposed({ lots, tolerance: 20, allowance }).plan).toMatchObject({ allowanceNotice: 1, allowanceCap: 8 });
  });

  it('refuses shares that are none, or a cap below its notice', () => {
    for (const allowance of [
      { noticeShare: 0, capShare: 0.2 },
      { noticeShare: NaN, capShare: 0.2 },
      { noticeShare: 0.3, capShare: 0.2 },
      { noticeShare: 0.1, capShare: NaN },
      { noticeShare: 0.1, capShare: Infinity },
    ])
      expect(() => proposePlan({ lots, tolerance: 20, allowance })).toThrow(ScoringError);
  });

  it('has the mean and standard deviation of the scores by dense kriging as centre and scale', () => {
    const points = segmentPoints(lots, plan.components, plan.fallbackNominal);
    const z = lots.map((_, j) => naiveScore(points, () => true, report.lambda, j).z);
    const mean = z.reduce((sum, x) => sum + x, 0) / 100;
    expect(plan.centre).toBeCloseTo(mean, 6);
    expect(plan.scale).toBeCloseTo(Math.sqrt(z.reduce((sum, x) => sum + (x - mean) ** 2, 0) / 99), 6);
    const lambda = report.kappa * (plan.effectivePeriodSeconds / (2 * Math.PI)) ** 4;
    expect(report.lambda / lambda).toBeCloseTo(1, 10);
  });

  it('keeps the individuals chart of the lot means as yardstick', () => {
    const deviations = lots.map((lot) => lot.points[0].mean - plan.fallbackNominal);
    const ranges = deviations.slice(1).map((x, j) => Math.abs(x - deviations[j]));
    const mean = (values: number[]) => values.reduce((sum, x) => sum + x, 0) / values.length;
    expect(plan.constant.centre).toBeCloseTo(mean(deviations), 10);
    expect(plan.constant.halfWidth).toBeCloseTo((3 * mean(ranges)) / 1.128, 10);
  });

  it('reports the cross-validated error against the smoothness, lowest at the choice', () => {
    const least = Math.min(...report.cvCurve.map(({ criterion }) => criterion));
    const best = report.cvCurve.find(({ criterion }) => criterion === least);
    expect(report.cvCurve.length).toBeGreaterThan(10);
    expect(Math.abs(Math.log(best!.lambda / report.lambda))).toBeLessThan(2);
    expect(report.cvCurve[0].effectivePeriodSeconds).toBeCloseTo(3 * DAY, 0);
  });

  it('has a lag-1 correlation near what the fit alone gives when lots are independent', () => {
    expect(report.lag1Expected).toBeLessThan(0);
    expect(Math.abs(report.lag1Correlation! - report.lag1Expected!)).toBeLessThan(0.2);
    expect(report.cautions).toEqual([]);
  });

  it('is the same to the bit when proposed again', () => {
    expect(proposePlan({ lots, tolerance: 20 })).toEqual({ status: 'proposed', plan, report });
  });
});

describe('lots far out in the reference period', () => {
  it('are left out, named, and do not widen the scale', () => {
    const lots = channel();
    const spoilt = lots.map((lot) =>
      [20, 55].includes(lot.lotId) ? { ...lot, points: [{ ...lot.points[0], mean: lot.points[0].mean + 12 }] } : lot,
    );
    const { plan, report } = proposed({ lots: spoilt });
    expect(report.leftOutLotIds).toEqual([20, 55]);
    expect(report.referenceLots).toBe(98);
    expect(report.cautions.map(({ code }) => code)).toEqual(['lots_left_out']);
    const clean = proposed({ lots: lots.filter((lot) => ![20, 55].includes(lot.lotId)) });
    expect(plan.scale).toBeCloseTo(clean.plan.scale, 1);
    expect(plan.components.betweenLots).toBeCloseTo(clean.plan.components.betweenLots, 6);
  });

  it('are not used when they are held or without values', () => {
    const lots = channel().map((lot) => {
      if (lot.lotId === 5) return { ...lot, pulls: false };
      return lot.lotId === 6 ? madeLot(6, [], { firstAt: lot.firstAt, lastAt: lot.lastAt, censoredLow: 3 }) : lot;
    });
    const { report } = proposed({ lots });
    expect(report.unusableLotIds).toEqual([5, 6]);
    expect(report.referenceLots).toBe(98);
  });
});

describe('the reference period', () => {
  it('is the window before the newest lot, or the lots named', () => {
    const lots = channel(200);
    const windowSeconds = 100 * SPACING;
    expect(proposed({ lots, windowSeconds }).plan.referenceLotCount).toBe(101);
    const referenceLotIds = lots.slice(10, 60).map((lot) => lot.lotId);
    expect(proposed({ lots, referenceLotIds }).plan.referenceLotCount).toBe(50);
  });
});

describe('cautions', () => {
  it('say what few reference lots, a short period and a period beyond the window mean', () => {
    expect(codes({ lots: channel(22) })).toContain('few_reference_lots');
    expect(codes({ lots: channel(), shortestPeriodSeconds: 15 * SPACING })).toContain('short_period');
    expect(codes({ lots: channel(), shortestPeriodSeconds: 40 * DAY })).toContain('period_exceeds_window');
  });

  it('say so when neighbouring lots resemble each other faster than T', () => {
    const normal = normals(9);
    let level = 0;
    const lots = Array.from({ length: 150 }, (_, j) => {
      level = 0.75 * level + normal();
      return onePointLot(j, level);
    });
    expect(codes({ lots })).toContain('correlated_scores');
  });

  it('say so when there is no slow movement to be found', () => {
    const many = [1, 2, 3, 4].map((seed) => codes({ lots: channel(300, seed, 0) }));
    expect(many.filter((found) => found.includes('smoothness_at_bound')).length).toBeGreaterThan(0);
  });
});

describe('no plan is proposed', () => {
  it('below 20 reference lots', () => {
    expect(reasonOf({ lots: channel(19) })).toBe('too_few_lots');
    expect(reasonOf({ lots: channel(20) })).toBeNull();
    expect(reasonOf({ lots: [] })).toBe('too_few_lots');
  });

  it('for a period below 8 lot spacings', () => {
    expect(reasonOf({ lots: channel(), shortestPeriodSeconds: 7.9 * SPACING })).toBe('period_too_short');
    expect(reasonOf({ lots: channel(), shortestPeriodSeconds: 8.1 * SPACING })).not.toBe('period_too_short');
  });

  it('from constant lots, whether or not their readings vary', () => {
    const constant = Array.from({ length: 40 }, (_, j) => onePointLot(j, 7));
    expect(reasonOf({ lots: constant })).toBe('constant_data');
    expect(reasonOf({ lots: constant.map((lot) => ({ ...lot, points: [{ ...lot.points[0], sumSquares: 0 }] })) })).toBe(
      'constant_data',
    );
  });

  it('from lots that move on a line without any scatter', () => {
    const exact = Array.from({ length: 40 }, (_, j) =>
      madeLot(j, [{ at: START_AT + j * SPACING, count: 4, mean: j, sumSquares: 0 }]),
    );
    expect(['constant_data', 'ill_posed']).toContain(reasonOf({ lots: exact }));
  });

  it('from values that are not finite', () => {
    expect(reasonOf({ lots: channel().map((lot) => (lot.lotId === 9 ? onePointLot(9, NaN) : lot)) })).toBe(
      'non_finite',
    );
  });

  it('from lots that all start together', () => {
    const together = channel().map((lot) => ({ ...lot, firstAt: START_AT }));
    expect(reasonOf({ lots: together })).toBe('ill_posed');
  });

  it('for arguments that make no sense', () => {
    const lots = channel();
    const wrong: PlanInput[] = [
      { lots: [lots[1], lots[0]] },
      { lots, referenceLotIds: [12345] },
      { lots, windowSeconds: 0 },
      { lots, shortestPeriodSeconds: NaN },
      { lots, limitMultiple: -3 },
      { lots, tolerance: -1 },
    ];
    for (const input of wrong) expect(() => proposePlan(input)).toThrow(ScoringError);
  });
});
