import { type BaselineFit, fitSmoothingSpline, lambdaForPeriod, type Observations, pointDensity } from '@app/baseline';

import { allScores, type LotScore, scoresOf } from './lot-score';
import { planBaseline } from './plan-baseline';
import { choosePoints, type ChosenPoints, type SegmentPoints } from './segment-points';
import type { PlanParameters } from './types';

/** Fewest lots that a baseline may be judged by. */
export const LEAST_LOTS = 8;
/** Fewest lots for each effective degree of freedom. */
export const LOTS_PER_EDF = 3;

/** The baseline of one set of lots, after those beyond their limits have left it. */
export interface TwoPassFit {
  chosen: ChosenPoints;
  fit: BaselineFit;
  /** By place among the chosen, against the final fit; null for a lot without which the others do not determine a baseline. */
  scores: (LotScore | null)[];
  kappa: number;
  lambda: number;
  /** Lots that pull the final fit. */
  lotCount: number;
  isLearning: boolean;
}

export type TwoPassResult =
  | ({ status: 'fitted' } & TwoPassFit)
  | { status: 'too-few-lots'; lotCount: number; kappa: number }
  | { status: 'constant'; lotCount: number; kappa: number };

/** λ = κ (T_eff / 2π)⁴, never below the floor of T; the straight line when T exceeds the plan's window. */
export function lambdaOf(
  plan: Pick<PlanParameters, 'shortestPeriodSeconds' | 'effectivePeriodSeconds' | 'windowSeconds'>,
  kappa: number,
): number {
  if (plan.shortestPeriodSeconds > plan.windowSeconds) return Infinity;
  return lambdaForPeriod(kappa, Math.max(plan.effectivePeriodSeconds, plan.shortestPeriodSeconds));
}

/**
 * Fits the chosen lots, takes those beyond their limits out of the fit that judges their neighbours, and fits once more with
 * the same κ, λ and, where the plan reweights lots, factors; the minima are counted after that.
 */
export function fitTwice(
  points: SegmentPoints,
  pulls: Uint8Array,
  isChosen: (lot: number) => boolean,
  plan: PlanParameters,
): TwoPassResult {
  const chosen = choosePoints(points, pulls.length, isChosen, pulls);
  const { observations } = chosen;
  const kappa =
    chosen.lots.length > 0 ? pointDensity(observations.t, observations.weight, plan.shortestPeriodSeconds) : 0;
  const pulling = countPulling(observations.pulls);
  if (pulling < LEAST_LOTS) return { status: 'too-few-lots', lotCount: pulling, kappa };
  if (observations.y.every((value) => value === observations.y[0]))
    return { status: 'constant', lotCount: pulling, kappa };
  const lambda = lambdaOf(plan, kappa);
  const { fit: first, pulls: staying } = planBaseline(chosen, lambda, plan);
  const scores = allScores(first, chosen);
  let isFinal = true;
  scores.forEach((score, place) => {
    if (staying[place] === 0 || !isBeyond(score, plan)) return;
    staying[place] = 0;
    isFinal = false;
  });
  const lotCount = countPulling(staying);
  if (lotCount < LEAST_LOTS) return { status: 'too-few-lots', lotCount, kappa };
  const fit = isFinal ? first : fitSmoothingSpline({ ...observations, pulls: staying }, lambda);
  const isLearning = !(lotCount >= LOTS_PER_EDF * fit.edf);
  return {
    status: 'fitted',
    chosen,
    fit,
    scores: isFinal ? scores : scoresOf(fit, chosen),
    kappa,
    lambda,
    lotCount,
    isLearning,
  };
}

/** The score that is compared with the limit. */
export const standardised = (score: LotScore, plan: PlanParameters): number => (score.z - plan.centre) / plan.scale;

/** True unless the score is within ±L, so that a score that is not a number counts as beyond. */
export const isBeyond = (score: LotScore, plan: PlanParameters): boolean =>
  !(Math.abs(standardised(score, plan)) <= plan.limit);

function countPulling(pulls: Observations['pulls']): number {
  let count = 0;
  for (const pull of pulls) if (pull > 0) count += 1;
  return count;
}
