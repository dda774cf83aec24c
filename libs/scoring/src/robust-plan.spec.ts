import { judgeSegment } from './judge-segment';
import { proposePlan } from './propose-plan';
import { DAY, madePlan, onePointLot, SPACING, START_AT } from './testing/made-lots';
import { normals } from './testing/seeded-random';

/** A slow wave of lots with SD 1, some of them off by 8 to one side. */
function troubled(isBad: (j: number) => boolean) {
  const normal = normals(8);
  const truth = (j: number) => 2 * Math.sin(j / 25);
  const lots = Array.from({ length: 120 }, (_, j) => onePointLot(j, truth(j) + normal() + (isBad(j) ? 8 : 0)));
  return { lots, truth };
}

describe('a plan that reweights outlying lots', () => {
  const isBad = (j: number) => [1, 4, 8].includes(j % 10);
  const { lots, truth } = troubled(isBad);
  const ids = lots.map((lot) => lot.lotId);
  const judge = (isRobust: boolean) =>
    judgeSegment({
      plan: madePlan({ isRobust, shortestPeriodSeconds: 4 * DAY, effectivePeriodSeconds: 4 * DAY }),
      lots,
      lotIdsToJudge: ids,
      segmentStartsAt: START_AT,
      segmentEndsAt: START_AT + 200 * SPACING,
    });
  const distance = ({ curve }: ReturnType<typeof judge>) =>
    Math.sqrt(curve.value.reduce((sum, g, j) => sum + (g - truth(j)) ** 2, 0) / curve.value.length);

  it('follows the good lots where three in ten are bad on one side, and the other does so less', () => {
    expect(distance(judge(true))).toBeLessThan(0.5);
    expect(distance(judge(false))).toBeGreaterThan(2 * distance(judge(true)));
  });

  it('has every bad lot outside its control limits and nearly every good one within', () => {
    const { lots: judged } = judge(true);
    for (const lot of judged.filter(({ lotId }) => isBad(lotId)))
      expect(lot.controlState).toBe('outside_control_limits');
    const good = judged.filter(({ lotId }) => !isBad(lotId));
    expect(good.filter((lot) => lot.controlState === 'outside_control_limits').length).toBeLessThanOrEqual(2);
  });

  it('is proposed when it is asked for, and names the lots that it left out', () => {
    const made = { lots: troubled((j) => j % 12 === 5).lots, shortestPeriodSeconds: 4 * DAY };
    const proposal = proposePlan({ ...made, isRobust: true });
    if (proposal.status !== 'proposed') throw new Error(proposal.detail);
    expect(proposal.plan.isRobust).toBe(true);
    expect(proposal.report.leftOutLotIds).toEqual(ids.filter((j) => j % 12 === 5));
    expect(proposal.plan.scale).toBeGreaterThan(0.8);
    expect(proposal.plan.scale).toBeLessThan(1.2);
    const ordinary = proposePlan(made);
    expect(ordinary.status === 'proposed' && ordinary.plan.isRobust).toBe(false);
  });
});
