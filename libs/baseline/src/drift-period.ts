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
  const positions = t[n - 1] - t[0] - periodSeconds;
  if (!(positions > 0)) return sum(weight, 0, n) / periodSeconds;
  // As the span slides right, points leave at s = t[i] (just after) and enter at s = t[i] - T (just after): between such instants the sum is constant.
  const length: number[] = [];
  const content: number[] = [];
  let first = 0;
  let end = 0;
  let s = 0;
  while (s < positions) {
    while (t[first] - t[0] <= s && s > 0) first++;
    while (end < n && t[end] - t[0] - periodSeconds <= s) end++;
    const leaves = t[first] - t[0];
    const enters = end < n ? t[end] - t[0] - periodSeconds : Infinity;
    const next = Math.min(leaves > s ? leaves : Infinity, enters, positions);
    length.push(next - s);
    content.push(first);
    content.push(end);
    s = next;
  }
  return quantileOfSpans(weight, length, content) / periodSeconds;
}

function quantileOfSpans(weight: Float64Array, length: number[], content: number[]): number {
  const cumulative = new Float64Array(weight.length + 1);
  for (let i = 0; i < weight.length; i++) cumulative[i + 1] = cumulative[i] + weight[i];
  const order = length.map((_, i) => i);
  const value = length.map((_, i) => cumulative[content[2 * i + 1]] - cumulative[content[2 * i]]);
  order.sort((i, j) => value[i] - value[j] || i - j);
  const total = length.reduce((x, y) => x + y, 0);
  let reached = 0;
  for (const i of order) {
    reached += length[i];
    if (reached >= DENSITY_QUANTILE * total) return sum(weight, content[2 * i], content[2 * i + 1]);
  }
  const i = order[order.length - 1];
  return sum(weight, content[2 * i], content[2 * i + 1]);
}

function sum(x: Float64Array, from: number, to: number): number {
  let total = 0;
  for (let i = from; i < to; i++) total += x[i];
  return total;
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
