import { BaselineError } from '../baseline-error';
import type { Observations } from '../observations';
import { prepareSeries } from '../prepared-series';
import { choosePenalty } from './choose-penalty';
import type { PenaltyRule } from './exact-criterion';

/** How the smoothness is chosen: leave-one-lot-out cross-validation, generalised cross-validation, restricted maximum likelihood. */
export type LambdaRule = 'lot-cv' | 'gcv' | 'reml';

export interface ChooseLambdaOptions {
  rule: LambdaRule;
  /** Smallest lambda allowed (weight * s^3): that of the shortest drift period. 0: none. */
  floorLambda: number;
  /** Inflation gamma of GCV (default 1; 1.4: Kim & Gu 2004, JRSS B 66:337). */
  gcvInflation?: number;
  /** For REML: sigma^2 = 1, since the weights are absolute (default), or estimated with lambda. */
  remlVariance?: 'known' | 'estimated';
}

export interface ChosenLambda {
  lambda: number;
  /** The rule's value there. */
  criterion: number;
  /** The grid that was looked at, in increasing lambda; penalties at which the rule has no value are left out. */
  curve: { lambda: number; edf: number; value: number }[];
  /** The floor decided. */
  isAtFloor: boolean;
  /** The straight line (or, without a floor, near interpolation) decided: the criterion has no minimum inside. */
  isAtBound: boolean;
}

/**
 * Chooses the penalty of the smoothing spline, never below a floor: chooseBaseline for a smoothing spline whose floor is a penalty.
 * See {@link chooseBaseline} for the rules, the search and its precision.
 * @throws BaselineError as fitSmoothingSpline; 'bad-argument' for a negative floor or inflation below 1; 'insufficient-data' for 'lot-cv'
 *   when a lot holds all but one of the distinct times
 * @example chooseLambda(obs, { rule: 'lot-cv', floorLambda: lambdaForPeriod(kappa, T) })
 */
export function chooseLambda(obs: Observations, options: ChooseLambdaOptions): ChosenLambda {
  const { gcvInflation = 1 } = options;
  if (!(gcvInflation >= 1 && gcvInflation < Infinity))
    throw new BaselineError('bad-argument', 'The inflation must be at least 1.');
  const found = choosePenalty(prepareSeries(obs), penaltyRule(options), options.floorLambda);
  return {
    lambda: found.chosen.smoothness,
    criterion: found.chosen.value,
    curve: found.curve.map(({ smoothness, edf, value }) => ({ lambda: smoothness, edf, value })),
    isAtFloor: found.isAtFloor,
    isAtBound: found.isAtBound !== null,
  };
}

function penaltyRule({ rule, gcvInflation = 1, remlVariance = 'known' }: ChooseLambdaOptions): PenaltyRule {
  if (rule === 'gcv') return { rule, inflation: gcvInflation };
  return rule === 'reml' ? { rule, variance: remlVariance } : { rule };
}
