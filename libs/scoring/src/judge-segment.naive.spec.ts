import { judgeSegment } from './judge-segment';
import { segmentPoints } from './segment-points';
import { madePlan, onePointLot, SPACING, START_AT } from './testing/made-lots';
import { naiveScore } from './testing/naive-score';
import { normals } from './testing/seeded-random';
import type { LotOnChannel } from './types';

/** T and T_eff of 12 and 16 lot spacings: verdicts look 8 lots past. */
const PLAN = madePlan({
  shortestPeriodSeconds: 12 * SPACING,
  effectivePeriodSeconds: 16 * SPACING,
  windowSeconds: 45 * SPACING,
  centre: 0.05,
  scale: 1.1,
});
/** Of every lot: 1 / (0.9 + 1 / 10). */
const WEIGHT = 1;

/** Sixty lots on an even grid, of which 24, 25 and 41 are far out, 30 is held and 57 is somewhat out. */
function lots(): LotOnChannel[] {
  const normal = normals(71);
  const shift: Record<number, number> = { 24: 8, 25: -9, 30: 15, 41: 7, 57: 4 };
  return Array.from({ length: 60 }, (_, j) =>
    onePointLot(j, 2 * Math.sin(j / 6) + normal() + (shift[j] ?? 0), { pulls: j !== 30 }),
  );
}

/** The rules in words, by dense matrices: whole lots up to the cut and inside the window, two passes at one λ. */
function naive(all: LotOnChannel[], id: number): number {
  const newest = all[all.length - 1].lastAt;
  const endAt = Math.min(all[id].lastAt + 8 * SPACING, newest);
  const used = all.filter((lot) => lot.lastAt <= endAt && lot.lastAt >= endAt - 45 * SPACING);
  const points = segmentPoints(used, PLAN.components, 0);
  // More than T of an even grid: every span of T holds 12 lots.
  const kappa = (12 * WEIGHT) / PLAN.shortestPeriodSeconds;
  const lambda = kappa * ((16 * SPACING) / (2 * Math.PI)) ** 4;
  const score = (place: number, inFit: (lot: number) => boolean) =>
    (naiveScore(points, inFit, lambda, place).z - 0.05) / 1.1;
  const first = used.map((_, place) => score(place, (lot) => used[lot].pulls));
  const place = used.indexOf(all[id]);
  return score(place, (lot) => used[lot].pulls && Math.abs(first[lot]) <= 3);
}

describe('a judged segment', () => {
  const all = lots();
  const ids = [16, 23, 24, 25, 26, 29, 30, 31, 41, 51, 52, 57, 59];

  it('agrees with the rules done by dense matrices, for settled and provisional lots', () => {
    const judged = judgeSegment({
      plan: PLAN,
      lots: all,
      lotIdsToJudge: ids,
      segmentStartsAt: START_AT,
      segmentEndsAt: null,
    }).lots;
    for (const [k, id] of ids.entries()) expect(Math.abs(judged[k].score! - naive(all, id))).toBeLessThan(1e-7);
    expect(judged.filter((lot) => lot.isProvisional).map((lot) => lot.lotId)).toEqual([52, 57, 59]);
    const outside = judged.filter((lot) => lot.controlState === 'outside_control_limits').map((lot) => lot.lotId);
    expect(outside).toEqual(expect.arrayContaining([24, 25, 30, 41]));
    expect(outside).not.toEqual(expect.arrayContaining([23]));
  });
});
