/** Which baseline: what it is made of, not how that was chosen. Times in s, as in the observations. */
export type BaselineSpec =
  /** Penalty lambda > 0 of sum w (y - g)^2 + lambda * integral g''(t)^2 dt, weight * s^3; Infinity is the straight line. */
  | { readonly method: 'smoothing-spline'; readonly lambda: number }
  /** Interior knots, increasing, strictly between the first and the last pulling time; linear beyond those two. None is the straight line. */
  | { readonly method: 'natural-spline'; readonly knots: Float64Array }
  /** The same knots, without natural ends; none is the cubic. */
  | { readonly method: 'b-spline'; readonly knots: Float64Array }
  | { readonly method: 'polynomial'; readonly degree: number }
  | { readonly method: 'constant' };

export type BaselineMethod = BaselineSpec['method'];

/** The baseline at one time. Slope and curvature are g' (per s) and g'' (per s^2); standardError is that of g at sigma^2 = 1. */
export interface BaselinePoint {
  value: number;
  slope: number;
  curvature: number;
  standardError: number;
}

/** The curve as a piecewise cubic: between breaks k and k+1, g(t) = c[4k] + c[4k+1] x + c[4k+2] x^2 + c[4k+3] x^3 with x = t - breaks[k]. */
export interface PiecewiseCubic {
  /** s, increasing, length m + 1. */
  breaks: Float64Array;
  /** Length 4 m. */
  coefficients: Float64Array;
}

/** A lot against the baseline fitted without it, at the same smoothness. */
export interface DeletedLot {
  lot: number;
  /** Its points, in time order. */
  indices: Int32Array;
  /** e = y - g without the lot, at each of its points. */
  residual: Float64Array;
  /** m x m, row-major: W_I^-1 + Cov(g_I | all other pulling lots), W the weights as given. */
  covariance: Float64Array;
}

/** Every lot against the baseline fitted without it. */
export interface LotScores {
  /** Each point's value minus the baseline without its whole lot; 0 for points of undetermined lots. Length n. */
  deletedResidual: Float64Array;
  /** By lot: r = a' e, with a the lot's count weights (summing to 1); 0 for empty and undetermined lots. */
  residual: Float64Array;
  /** By lot: Var r = a' Cov a at sigma^2 = 1; Infinity for empty and undetermined lots. The score is r / sqrt(Var r). */
  variance: Float64Array;
  /** Lots without which the others do not determine a baseline: there is nothing to score them against. */
  undetermined: number[];
}

/** For each point k, the step that begins there: x = 0 before point k and 1 from it on (in the order of the points). Length n each. */
export interface StepEstimates {
  /** x' A y / x' A x, A = W (I - S), by generalised least squares with the baseline free to follow; 0 where x' A x has no digits. */
  estimate: Float64Array;
  /** 1 / sqrt(x' A x), at sigma^2 = 1; Infinity where the baseline follows the step entirely (as at k = 0). */
  standardError: Float64Array;
}

/**
 * A fitted baseline g = S y, whatever the method. Everything is at sigma^2 = 1: the weights are absolute. Where they are only relative, multiply
 * standard errors by sigma and variances by sigma^2 (see residualVariance). C is the posterior covariance of g (smoothing spline: of the
 * integrated Wiener process; regression: sampling), S = C V W with V the lots' factors.
 */
export interface BaselineFit {
  readonly spec: BaselineSpec;
  /** Effective degrees of freedom, tr S. */
  readonly edf: number;
  /** N: points that pull. */
  readonly pullCount: number;
  /** Sum over pulling points of (weight * factor) (y - g)^2. */
  readonly weightedRss: number;
  /** g, g' (per s), g'' (per s^2) and standard error of g at each point, points that do not pull included. */
  readonly fitted: Float64Array;
  readonly slope: Float64Array;
  readonly curvature: Float64Array;
  readonly standardError: Float64Array;
  /** S_ii; 0 for points of lots that do not pull. */
  readonly leverage: Float64Array;
  /** Whether g may be read beyond the points: natural ends and constants, not polynomials and splines without natural ends. */
  readonly isProjectable: boolean;
  /** g at any time; beyond the points a straight line with a growing band where allowed. @throws BaselineError 'no-projection', 'non-finite' */
  at(t: number): BaselinePoint;
  /** Cov(g(a), g(b)) at sigma^2 = 1, for any two times. @throws as at */
  covariance(a: number, b: number): number;
  /** The curve between the first and the last point. */
  pieces(): PiecewiseCubic;
  /** S_II of a lot's m points: m x m, row-major, S_pq = C_pq * pulling weight_q. Zero for a lot that does not pull. */
  smootherBlock(lot: number): Float64Array;
  /** Each lot (or the named ones; those without points are empty) against the fit without it. @throws BaselineError 'insufficient-data' for an undetermined lot */
  deletedLots(lots?: Int32Array): DeletedLot[];
  /** All lots at once, in flat arrays. @param count weight of each point in its lot's mean (readings it stands for); default: all alike */
  scoreLots(count?: Float64Array): LotScores;
  /** A x = V W (I - S) x for a vector of one number a point, with the same S; the building stone of statistics of steps and ramps. */
  residualProduct(x: Float64Array): Float64Array;
  /** The step beginning at each point, in O(n) for the smoothing spline and O(n K) for regression. */
  stepEstimates(): StepEstimates;
}
