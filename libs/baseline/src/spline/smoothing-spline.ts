import { BaselineError } from '../baseline-error';
import { LotDeleter, type DeletedLot, type FilteredSeries } from './deleted-lots';
import { advance, combine, filterBothWays, STATE_SIZE, type Posterior } from './information-filter';
import type { Observations } from '../observations';
import { prepareSeries, type PreparedSeries } from '../prepared-series';
import { penaltyIntegral, restrictedDeviance } from './spline-criteria';

/** The fitted slow movement, per second where slopes are meant, with what scoring needs of it. */
export interface SmoothingSplineFit {
  /** As given: weight * s^3. */
  readonly lambda: number;
  /** Effective degrees of freedom, tr S: between 2 (the line) and the number of distinct times. */
  readonly edf: number;
  /** g and g' (per s) at each point, lots that do not pull included. */
  readonly fitted: Float64Array;
  readonly slope: Float64Array;
  /** Posterior standard deviation of g at each point (sigma^2 = 1). */
  readonly standardError: Float64Array;
  /** S_ii; 0 for points of lots that do not pull. */
  readonly leverage: Float64Array;
  /** Sum w (y - g)^2 over pulling points. */
  readonly weightedRss: number;
  /** Integral of g''(t)^2 dt, t in seconds. */
  readonly penalty: number;
  /** -2 log restricted likelihood at sigma^2 = 1, up to a constant that does not depend on lambda (see restrictedDeviance). */
  readonly restrictedDeviance: number;
  /** Between the points and beyond them, with the straight-line projection and a growing band beyond the ends. */
  at(t: number): { value: number; slope: number; standardError: number };
  /** Each lot (or the named ones; those without points are empty) against the fit without it. */
  deletedLots(lots?: Int32Array): DeletedLot[];
}

/**
 * Smoothing spline: the natural cubic spline g that minimises  sum w_p (y_p - g(t_p))^2 + lambda * integral g''(t)^2 dt, over pulling lots.
 *
 * Computed in its state-space form (see information-filter) in O(n), which keeps its digits for slow baselines of long series where the banded
 * system of Reinsch (1967) loses them. lambda is in raw units (t in s); SciPy's `lam` is the same, R's `lambda` is lambda / (range^3 * mean weight).
 * Bands are the posterior of the integrated Wiener process (Wahba 1983, JRSS B 45:133) with sigma^2 = 1: the weights are absolute.
 * @param obs points; see Observations
 * @param lambda penalty, > 0; Infinity gives the weighted straight line
 * @throws BaselineError for input that is mis-sized, non-finite, out of order or too little, and 'ill-posed' when the numbers leave the range of doubles
 * @example
 * const fit = fitSmoothingSpline({ t, y, weight, lot, pulls }, lambdaForPeriod(pointDensity(t, weight, T), T));
 * const { value, standardError } = fit.at(t[0] + 60);
 */
export function fitSmoothingSpline(obs: Observations, lambda: number): SmoothingSplineFit {
  return new FittedSpline(prepareSeries(obs), lambda);
}

/** 1/lambda for scaled time and weight. */
export function scaledInverse(series: PreparedSeries, lambda: number): number {
  if (!(lambda > 0))
    throw new BaselineError(Number.isNaN(lambda) ? 'non-finite' : 'bad-argument', 'lambda must be positive.');
  return ((series.timeScale * series.timeScale) / lambda) * series.timeScale * series.weightScale;
}

function outOfRange(lambda: number): BaselineError {
  return new BaselineError('ill-posed', `With lambda ${lambda} the fit leaves the range of double precision.`);
}

class FittedSpline implements SmoothingSplineFit {
  readonly edf: number;
  readonly fitted: Float64Array;
  readonly slope: Float64Array;
  readonly standardError: Float64Array;
  readonly leverage: Float64Array;
  readonly weightedRss: number;
  readonly penalty: number;
  readonly restrictedDeviance: number;
  private readonly filtered: FilteredSeries;

  constructor(
    private readonly series: PreparedSeries,
    readonly lambda: number,
  ) {
    const { n, gap, pull, r, obs, timeScale, weightScale, lineLevel, lineSlope, lineTime } = series;
    const q = scaledInverse(series, lambda);
    const forward = new Float64Array(STATE_SIZE * n);
    const backward = new Float64Array(STATE_SIZE * n);
    const logDelta = filterBothWays(gap, pull, r, q, forward, backward);
    const fitted = new Float64Array(n);
    const slope = new Float64Array(n);
    const standardError = new Float64Array(n);
    const leverage = new Float64Array(n);
    const p: Posterior = { value: 0, slope: 0, variance: 0, covariance: 0, slopeVariance: 0 };
    let edf = 0;
    let rss = 0;
    for (let i = 0, k = 0; i < n; i++, k += STATE_SIZE) {
      const w = pull[i];
      if (!combine(forward, k, backward, k, w, w * r[i], p)) throw outOfRange(lambda);
      const e = r[i] - p.value;
      rss += w * e * e;
      leverage[i] = w * p.variance;
      edf += leverage[i];
      fitted[i] = lineLevel + lineSlope * (obs.t[i] - obs.t[0] - lineTime) + p.value;
      slope[i] = lineSlope + p.slope / timeScale;
      standardError[i] = Math.sqrt(p.variance / weightScale);
    }
    this.fitted = fitted;
    this.slope = slope;
    this.standardError = standardError;
    this.leverage = leverage;
    this.edf = edf;
    this.weightedRss = rss * weightScale;
    this.filtered = { series, q, forward, backward };
    this.penalty = penaltyIntegral(this.filtered);
    this.restrictedDeviance = restrictedDeviance(this.filtered, logDelta).known;
    const check =
      edf + rss + this.penalty + this.restrictedDeviance + slope[0] + slope[n - 1] + fitted[0] + fitted[n - 1];
    if (!Number.isFinite(check)) throw outOfRange(lambda);
  }

  at(t: number): { value: number; slope: number; standardError: number } {
    if (!Number.isFinite(t)) throw new BaselineError('non-finite', 'The time is not finite.');
    const { series, filtered } = this;
    const { n, obs, pull, r, timeScale, weightScale, lineLevel, lineSlope, lineTime } = series;
    const next = firstAfter(obs.t, t);
    const ahead = new Float64Array(STATE_SIZE);
    const behind = new Float64Array(STATE_SIZE);
    if (next > 0) {
      const k = next - 1;
      advance(
        filtered.forward,
        STATE_SIZE * k,
        ahead,
        0,
        pull[k],
        pull[k] * r[k],
        (t - obs.t[k]) / timeScale,
        filtered.q,
      );
    }
    if (next < n) {
      const d = (obs.t[next] - t) / timeScale;
      advance(filtered.backward, STATE_SIZE * next, behind, 0, pull[next], pull[next] * r[next], d, filtered.q);
    }
    const p: Posterior = { value: 0, slope: 0, variance: 0, covariance: 0, slopeVariance: 0 };
    const isDetermined = combine(ahead, 0, behind, 0, 0, 0, p);
    const value = lineLevel + lineSlope * (t - obs.t[0] - lineTime) + p.value;
    const standardError = Math.sqrt(p.variance / weightScale);
    if (!(isDetermined && Number.isFinite(value + standardError))) {
      throw new BaselineError('ill-posed', `The baseline at ${t} leaves the range of double precision.`);
    }
    return { value, slope: lineSlope + p.slope / timeScale, standardError };
  }

  deletedLots(lots?: Int32Array): DeletedLot[] {
    const { lotStart, pointsByLot, obs } = this.series;
    const deleter = new LotDeleter(this.filtered);
    const lotCount = obs.pulls.length;
    const count = lots === undefined ? lotCount : lots.length;
    let points = 0;
    let squares = 0;
    for (let k = 0; k < count; k++) {
      const lot = lots === undefined ? k : lots[k];
      if (!(lot >= 0 && lot < lotCount)) throw new BaselineError('bad-argument', `There is no lot ${lot}.`);
      const m = lotStart[lot + 1] - lotStart[lot];
      points += m;
      squares += m * m;
    }
    const indices = pointsByLot.slice();
    const residuals = new Float64Array(points);
    const covariances = new Float64Array(squares);
    const result: DeletedLot[] = [];
    for (let k = 0, p = 0, s = 0; k < count; k++) {
      const lot = lots === undefined ? k : lots[k];
      const m = lotStart[lot + 1] - lotStart[lot];
      const residual = residuals.subarray(p, (p += m));
      const covariance = covariances.subarray(s, (s += m * m));
      deleter.delete(lot, residual, covariance);
      result.push({ lot, indices: indices.subarray(lotStart[lot], lotStart[lot + 1]), residual, covariance });
    }
    return result;
  }
}

/** Index of the first time greater than x (n when there is none). */
function firstAfter(t: Float64Array, x: number): number {
  let low = 0;
  let high = t.length;
  while (low < high) {
    const middle = (low + high) >>> 1;
    if (t[middle] > x) high = middle;
    else low = middle + 1;
  }
  return low;
}
