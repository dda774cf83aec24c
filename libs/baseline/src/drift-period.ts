import { BaselineError } from './baseline-error';

/** Share of the window in which the density of weight is at most kappa. */
export const DENSITY_QUANTILE = 0.9;

/**
 * Density kappa of weight in time: the 90 % quantile, over all positions of a span [s, s + T) inside the window, of (sum of weights in the
 * span) / T. The positions are continuous, so the quantile is exact and weighted by time; half-open spans make an even grid of
 * spacing h give w/h. A window no longer than T is one span.
 * @param t times in s, non-decreasing
 * @param weight weights, >= 0, of the same length
 * @param periodSeconds T, the plan's shortest drift period, s, > 0
 * @returns kappa, weight per second
 * @throws BaselineError 'bad-argument', 'non-finite', 'not-increasing', 'insufficient-data' (no points)
 * @example pointDensity(Float64Array.of(0, 10, 20, 30), Float64Array.of(2, 2, 2, 2), 20) // 0.2
 */
export function pointDensity(t: Float64Array, weight: Float64Array, periodSeconds: number): number {
  const n = t.length;
  checkDensityInput(t, weight, periodSeconds);
  let total = 0;
  const before = new Float64Array(n + 1);
  for (let i = 0; i < n; i++) before[i + 1] = total += weight[i];
  const positions = t[n - 1] - t[0] - periodSeconds;
  if (!(positions > 0)) return total / periodSeconds;
  // A point leaves as s passes t[i] and enters as s passes t[i] - T: between two such instants the sum is constant.
  const content = new Float64Array(2 * n + 1);
  const length = new Float64Array(2 * n + 1);
  let count = 0;
  let first = 0;
  let end = 0;
  for (let s = 0; s < positions; count++) {
    while (t[first] - t[0] <= s) first++;
    while (end < n && t[end] - t[0] - periodSeconds <= s) end++;
    const leaves = t[first] - t[0];
    const enters = end < n ? t[end] - t[0] - periodSeconds : Infinity;
    const next = Math.min(leaves > s ? leaves : Infinity, enters, positions);
    length[count] = next - s;
    content[count] = before[end] - before[first];
    s = next;
  }
  return weightedQuantile(content, length, count, DENSITY_QUANTILE * positions) / periodSeconds;
}

/** Smallest of the first n values whose shares, with those of all smaller values, reach `wanted`. Selects in place, O(n) on average. */
function weightedQuantile(value: Float64Array, share: Float64Array, n: number, wanted: number): number {
  let from = 0;
  let to = n;
  let below = 0;
  while (to - from > 1) {
    const pivot = value[(from + to) >>> 1];
    let low = from;
    let high = to;
    let lowShare = 0;
    let equalShare = 0;
    for (let i = from; i < high;) {
      if (value[i] < pivot) {
        lowShare += share[i];
        swap(value, share, i++, low++);
      } else if (value[i] > pivot) {
        swap(value, share, i, --high);
      } else {
        equalShare += share[i++];
      }
    }
    if (below + lowShare >= wanted && low > from) {
      to = low;
    } else if (below + lowShare + equalShare >= wanted || high === to) {
      return pivot;
    } else {
      below += lowShare + equalShare;
      from = high;
    }
  }
  return value[from];
}

function swap(value: Float64Array, share: Float64Array, i: number, j: number): void {
  const v = value[i];
  const s = share[i];
  value[i] = value[j];
  share[i] = share[j];
  value[j] = v;
  share[j] = s;
}

function checkDensityInput(t: Float64Array, weight: Float64Array, periodSeconds: number): void {
  if (weight.length !== t.length) throw new BaselineError('bad-argument', 'Times and weights differ in length.');
  if (t.length === 0) throw new BaselineError('insufficient-data', 'There are no points.');
  checkPositive(periodSeconds, 'The period');
  for (let i = 0; i < t.length; i++) {
    if (!(Number.isFinite(t[i]) && Number.isFinite(weight[i])))
      throw new BaselineError('non-finite', `Point ${i} is not finite.`);
    if (!(weight[i] >= 0)) throw new BaselineError('bad-argument', `The weight of point ${i} is negative.`);
    if (i > 0 && !(t[i] >= t[i - 1]))
      throw new BaselineError('not-increasing', `Point ${i} is earlier than point ${i - 1}.`);
  }
}

function checkPositive(x: number, what: string): void {
  if (!(x > 0 && x < Infinity))
    throw new BaselineError(Number.isFinite(x) ? 'bad-argument' : 'non-finite', `${what} must be positive and finite.`);
}

/**
 * The penalty at which the smoothing spline passes half the amplitude of a sinusoid of a period: lambda = kappa (T / 2 pi)^4. The gain at
 * period P is 1 / (1 + (T/P)^4): 1/17 at T/2, 16/17 at 2 T (equivalent kernel: Silverman 1984, Ann. Statist. 12:898).
 * @param kappa density of weight, per second, > 0 @param periodSeconds T, s, > 0
 * @returns lambda in weight * s^3, for the objective sum w (y - g)^2 + lambda * integral g''(t)^2 dt with t in seconds
 * @example lambdaForPeriod(1 / 600, 3 * 86400)
 */
export function lambdaForPeriod(kappa: number, periodSeconds: number): number {
  checkPositive(kappa, 'The density');
  checkPositive(periodSeconds, 'The period');
  return kappa * (periodSeconds / (2 * Math.PI)) ** 4;
}

/**
 * The period whose half amplitude a penalty passes: T_eff = 2 pi (lambda / kappa)^(1/4), the inverse of {@link lambdaForPeriod}.
 * @param lambda weight * s^3, > 0; Infinity gives Infinity @param kappa weight per second, > 0
 */
export function effectivePeriod(lambda: number, kappa: number): number {
  checkPositive(kappa, 'The density');
  if (lambda === Infinity) return Infinity;
  checkPositive(lambda, 'lambda');
  return 2 * Math.PI * (lambda / kappa) ** 0.25;
}
