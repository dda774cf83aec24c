import { BaselineError } from '../baseline-error';
import type { FilteredSeries } from './filtered-series';
import { advance, combine, STATE_SIZE, type Posterior } from './information-state';

/** A time among the points, as a point without weight after all points that are not later. */
export interface InsertedTime {
  t: number;
  /** Index of the first later point; n when there is none. */
  next: number;
  /** State there from the points up to it (one STATE_SIZE). */
  ahead: Float64Array;
  /** What all points say of (g, g') there, scaled, the line taken off. */
  posterior: Posterior;
}

/** @throws BaselineError 'non-finite', 'ill-posed' */
export function insertTime(filtered: FilteredSeries, t: number): InsertedTime {
  if (!Number.isFinite(t)) throw new BaselineError('non-finite', 'The time is not finite.');
  const { n, obs, pull, r, timeScale } = filtered.series;
  const next = firstAfter(obs.t, t);
  const ahead = new Float64Array(STATE_SIZE);
  const behind = new Float64Array(STATE_SIZE);
  if (next > 0) {
    const k = next - 1;
    const d = (t - obs.t[k]) / timeScale;
    advance(filtered.forward, STATE_SIZE * k, ahead, 0, pull[k], pull[k] * r[k], d, filtered.q);
  }
  if (next < n) {
    const d = (obs.t[next] - t) / timeScale;
    advance(filtered.backward, STATE_SIZE * next, behind, 0, pull[next], pull[next] * r[next], d, filtered.q);
  }
  const posterior: Posterior = { value: 0, slope: 0, variance: 0, covariance: 0, slopeVariance: 0 };
  const isDetermined = combine(ahead, 0, behind, 0, 0, 0, posterior);
  if (!(isDetermined && Number.isFinite(posterior.value + posterior.slope + posterior.variance))) {
    throw new BaselineError('ill-posed', `The baseline at ${t} leaves the range of double precision.`);
  }
  return { t, next, ahead, posterior };
}

/** Index of the first time greater than x (n when there is none). */
export function firstAfter(t: Float64Array, x: number): number {
  let low = 0;
  let high = t.length;
  while (low < high) {
    const middle = (low + high) >>> 1;
    if (t[middle] > x) high = middle;
    else low = middle + 1;
  }
  return low;
}
