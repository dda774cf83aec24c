import type { BaselineMethod, BaselineSpec } from '../baseline-fit';
import type { KnotPlacement } from '../regression/place-knots';
import type { Candidate } from './criteria';
import type { WithinOneStandardError } from './one-standard-error';

/**
 * How the smoothness is chosen: leave-one-lot-out cross-validation, generalised cross-validation, the same with inflation 1.4, restricted maximum
 * likelihood, or effective degrees of freedom as given.
 */
export type SmoothnessRule = 'lot-cv' | 'gcv' | 'gcv14' | 'reml' | 'edf';

/**
 * The end of the range that decided, where the criterion has no minimum inside: near interpolation, the straight line, no interior knots (a b-spline is
 * then one cubic), as many knots as were tried, or the highest degree that was tried.
 */
export type SmoothnessBound = 'interpolation' | 'line' | 'no-knots' | 'most-knots' | 'highest-degree';

export interface ChooseBaselineOptions {
  readonly method: BaselineMethod;
  readonly rule: SmoothnessRule;
  /** For the rule 'edf': smoothing spline, between 2 and the number of distinct pulling times; otherwise one that a count of knots or a degree gives. */
  readonly edf?: number;
  /** T, s: nothing faster is followed. Omitted: no floor. */
  readonly shortestPeriodSeconds?: number;
  /** Smallest lambda (smoothing spline only; weight * s^3), instead of or, the larger of both, beside T. */
  readonly floorLambda?: number;
  /** Of interior knots; default 'quantile'. */
  readonly placement?: KnotPlacement;
  /** The smoothest candidate within one standard error of the minimum; with 'lot-cv' only. */
  readonly hasOneStandardError?: boolean;
  /** For 'reml': sigma^2 = 1, since the weights are absolute (default), or estimated with lambda. */
  readonly remlVariance?: 'known' | 'estimated';
}

export interface ChosenBaseline {
  readonly spec: BaselineSpec;
  readonly rule: SmoothnessRule;
  /** lambda, number of interior knots, or degree (constant: 0). */
  readonly smoothness: number;
  /** Of the exact fit. */
  readonly edf: number;
  readonly criterion: {
    readonly name: SmoothnessRule;
    /** At the choice; for 'edf' the effective degrees of freedom. */
    readonly value: number;
    /** What was looked at, in increasing smoothness value, without inadmissible candidates; empty for 'edf'. */
    readonly curve: readonly Candidate[];
  };
  /** Every local minimum of the curve, for lambda refined; the best decides. Empty for 'edf'. */
  readonly minima: readonly Candidate[];
  /** The shortest drift period (or floorLambda) decided. */
  readonly isAtFloor: boolean;
  readonly isAtBound: SmoothnessBound | null;
  /** With hasOneStandardError: the minimum from which one standard error was allowed. */
  readonly oneStandardError?: WithinOneStandardError;
}
