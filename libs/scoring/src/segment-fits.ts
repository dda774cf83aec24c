import { BaselineError } from '@app/baseline';

import type { LotScore } from './lot-score';
import { segmentPoints } from './segment-points';
import { timelineOf, type LotSet, type Timeline } from './segment-timeline';
import { fitTwice, LEAST_LOTS, type TwoPassResult } from './two-pass-fit';
import type { LotOnChannel, PlanParameters } from './types';

export type SetResult = TwoPassResult | { status: 'ill-posed'; detail: string };

/** The fits of one segment, each made once. */
export interface SegmentFits {
  timeline: Timeline;
  at(set: LotSet): SetResult;
  /** Score of the lot (index in the segment) in a fitted set; null when the others do not determine a baseline. */
  score(result: Extract<SetResult, { status: 'fitted' }>, lot: number): LotScore | null;
  /** Baseline at the segment's start by the data up to `endAt`, as deviation from nominal; null when nothing can be fitted. */
  startLevel(endAt: number): number | null;
  /** True once later lots can no longer change the start level. */
  isStartComplete: boolean;
}

/** @param knownStartLevel used instead of a fit of the first lots when it is a number */
export function segmentFits(
  lots: readonly LotOnChannel[],
  plan: PlanParameters,
  knownStartLevel: number | null,
): SegmentFits {
  const pulls = Uint8Array.from(lots, (lot) => (lot.pulls ? 1 : 0));
  const points = segmentPoints(lots, plan.components, plan.fallbackNominal);
  const timeline = timelineOf(lots, points, pulls, plan);
  const made = new Map<string, SetResult>();
  const at = (set: LotSet): SetResult => {
    const known = made.get(set.key);
    if (known) return known;
    const isChosen = (lot: number) => lots[lot].lastAt >= set.fromAt && lots[lot].lastAt <= set.toAt;
    const result = orIllPosed(() => fitTwice(points, pulls, isChosen, plan));
    made.set(set.key, result);
    return result;
  };
  const levels = new Map<string, number | null>();
  const firstSpanEndAt = endOfFirstSpan(lots, pulls, points.lot, plan);
  const startLevel = (endAt: number): number | null => {
    if (knownStartLevel !== null) return knownStartLevel;
    const set = timeline.setUpTo(Math.min(endAt, firstSpanEndAt));
    const known = levels.get(set.key);
    if (known !== undefined) return known;
    const result = at(set);
    const level = result.status === 'fitted' ? result.fit.at(result.chosen.observations.t[0]).value : null;
    levels.set(set.key, level);
    return level;
  };
  const isStartComplete = knownStartLevel !== null || timeline.newestEndAt > firstSpanEndAt;
  return { timeline, at, score: scoreIn, startLevel, isStartComplete };
}

function scoreIn(result: Extract<SetResult, { status: 'fitted' }>, lot: number): LotScore | null {
  const place = result.chosen.place[lot];
  return place < 0 ? null : result.scores[place];
}

function orIllPosed(compute: () => TwoPassResult): SetResult {
  try {
    return compute();
  } catch (error) {
    if (error instanceof BaselineError) return { status: 'ill-posed', detail: error.message };
    throw error;
  }
}

/** End of the lots that the level at the segment's start is told from: one T_eff of them, and at least twice the fewest that can be judged by. */
function endOfFirstSpan(
  lots: readonly LotOnChannel[],
  pulls: Uint8Array,
  lotOfPoints: Int32Array,
  plan: PlanParameters,
): number {
  const order = [...new Set(lotOfPoints)].filter((lot) => pulls[lot] === 1);
  if (order.length < 2 * LEAST_LOTS) return Infinity;
  const spanEndAt = lots[order[0]].firstAt + Math.min(plan.effectivePeriodSeconds, plan.windowSeconds);
  return Math.max(spanEndAt, lots[order[2 * LEAST_LOTS - 1]].lastAt);
}
