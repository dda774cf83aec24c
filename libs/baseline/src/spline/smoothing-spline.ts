import type { BaselineFit } from '../baseline-fit';
import type { Observations } from '../observations';
import { prepareSeries, type PreparedSeries } from '../prepared-series';
import { FittedSpline } from './fitted-spline';

/** The fitted slow movement. */
export interface SmoothingSplineFit extends BaselineFit {
  readonly spec: { readonly method: 'smoothing-spline'; readonly lambda: number };
  /** As given: weight * s^3. */
  readonly lambda: number;
  /** Integral of g''(t)^2 dt, t in seconds: value^2 / s^3. */
  readonly penalty: number;
  /**
   * -2 log restricted likelihood at sigma^2 = 1: PRSS + log|A| - (m - 2) log alpha, PRSS = weightedRss + lambda * penalty; A and alpha in scaled units (see
   * logDeterminant), m distinct times of pulling points.
   */
  readonly restrictedDeviance: number;
}

/**
 * Smoothing spline: the natural cubic spline g that minimises  sum w_p (y_p - g(t_p))^2 + lambda * integral g''(t)^2 dt, over pulling lots, w the weights
 * times the lots' factors (Green & Silverman 1994, ch. 2).
 *
 * Computed in its state-space form (Wahba 1978; Kohn & Ansley 1987; see information-state) in O(n), which keeps its digits for slow baselines of long
 * series where the banded system of Reinsch (1967) loses them. lambda is in raw units (t in s); SciPy's `lam` is the same, R's `lambda` is
 * lambda / (range^3 * mean weight). Bands are the posterior of the integrated Wiener process (Wahba 1983, JRSS B 45:133) with sigma^2 = 1: the weights
 * are absolute.
 * @param obs points; see Observations
 * @param lambda penalty, weight * s^3, > 0; Infinity gives the weighted straight line
 * @throws BaselineError for input that is mis-sized, non-finite, out of order or too little, and 'ill-posed' when the numbers leave the range of doubles
 * @example
 * const fit = fitSmoothingSpline({ t, y, weight, lot, pulls }, lambdaForPeriod(pointDensity(t, weight, T), T));
 * const { value, standardError } = fit.at(t[0] + 60);
 */
export function fitSmoothingSpline(obs: Observations, lambda: number): SmoothingSplineFit {
  return fitPreparedSpline(prepareSeries(obs), lambda);
}

/** {@link fitSmoothingSpline} of observations that are prepared already, as after a search for lambda. */
export function fitPreparedSpline(series: PreparedSeries, lambda: number): SmoothingSplineFit {
  return new FittedSpline(series, lambda);
}
