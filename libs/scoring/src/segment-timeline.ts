import { whyUnusable } from './lot-values';
import type { SegmentPoints } from './segment-points';
import type { LotOnChannel, PlanParameters } from './types';

/** Which lots a fit at a certain end of the data consists of. */
export interface LotSet {
  fromAt: number;
  toAt: number;
  /** Sets with equal keys hold the same lots. */
  key: string;
}

/** When lots of a segment end, and what lies after them. */
export interface Timeline {
  /** End of the newest usable lot; −∞ without one. */
  newestEndAt: number;
  /** T_eff / 2, at most half of the window: how far past a lot its verdict looks. */
  reachSeconds: number;
  /** Lots that end within the window before `endAt`, and not after it: whole lots, so that no later reading can change them. */
  setUpTo(endAt: number): LotSet;
  /** End of the data that a settled verdict on the lot uses. */
  cutOf(lot: LotOnChannel): number;
  /** Weight of pulling points after an instant. */
  weightAfter(at: number): number;
}

export function timelineOf(
  lots: readonly LotOnChannel[],
  points: SegmentPoints,
  pulls: Uint8Array,
  plan: PlanParameters,
): Timeline {
  const ends = Float64Array.from(
    lots.filter((lot) => whyUnusable(lot) === null),
    (lot) => lot.lastAt,
  ).sort();
  const n = points.t.length;
  const weightFrom = new Float64Array(n + 1);
  for (let i = n - 1; i >= 0; i -= 1) weightFrom[i] = weightFrom[i + 1] + pulls[points.lot[i]] * points.weight[i];
  const reachSeconds = Math.min(plan.effectivePeriodSeconds, plan.windowSeconds) / 2;
  return {
    newestEndAt: ends.length > 0 ? ends[ends.length - 1] : -Infinity,
    reachSeconds,
    setUpTo: (endAt) => {
      const fromAt = endAt - plan.windowSeconds;
      return { fromAt, toAt: endAt, key: `${countBefore(ends, fromAt, false)}:${countBefore(ends, endAt, true)}` };
    },
    cutOf: (lot) => lot.lastAt + reachSeconds,
    weightAfter: (at) => weightFrom[countBefore(points.t, at, true)],
  };
}

/** Number of sorted values below `limit`, or up to and with it. */
function countBefore(sorted: Float64Array, limit: number, isWith: boolean): number {
  let low = 0;
  let high = sorted.length;
  while (low < high) {
    const middle = (low + high) >>> 1;
    if (sorted[middle] < limit || (isWith && sorted[middle] === limit)) low = middle + 1;
    else high = middle;
  }
  return low;
}
