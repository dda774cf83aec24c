import type { Observations } from '../observations';
import { fitNaturalSpline } from './fit-regression';

/** Knots of the pilot fit, at most; fewer when fewer are asked for. */
const PILOT_KNOTS = 5;
/** Share of the knots' density that does not depend on the residuals, and the most that local variability counts, in its means. */
const UNIFORM_SHARE = 0.5;
const MOST_VARIABLE = 4;

/**
 * Knots, relative to the first distinct time, at equal shares of a density over the points: half uniform, half in proportion to the local standard deviation of the
 * residuals of a pilot fit, counted up to four times its mean. So a span holds between a fifth of and twice the number of distinct times of equal shares.
 *
 * The pilot is a natural spline with at most five knots at quantiles. Its local variance at a distinct time is the sum of w v e^2 over that of v (1 - h) (w weights,
 * v the lots' factors, e residuals, h leverages) over the times nearest to it, as many on either side as a quarter of a span will hold,
 * at least two. Weighting keeps a noisy but lightly weighted stretch from drawing knots. That variability should draw knots is common practice
 * (equal shares of the error: de Boor 1978, ch. XII, by a power of the fourth derivative, which residuals do not give); this rule is our own.
 * @param distinct distinct pulling times, s
 * @param quantiles places `count` knots at quantiles of the distinct times
 */
export function knotsByVariability(
  obs: Observations,
  distinct: Float64Array,
  count: number,
  quantiles: (count: number) => Float64Array,
): Float64Array {
  const n = distinct.length;
  const pilotKnots = Math.max(0, Math.min(count, PILOT_KNOTS, n - 3));
  const deviation = localDeviation(
    obs,
    distinct,
    quantiles(pilotKnots),
    Math.max(2, Math.round(n / (4 * (count + 1)))),
  );
  const mean = deviation.reduce((a, b) => a + b, 0) / n;
  const density = deviation.map(
    (s) => UNIFORM_SHARE + (1 - UNIFORM_SHARE) * (mean > 0 ? Math.min(MOST_VARIABLE, s / mean) : 1),
  );
  const before = new Float64Array(n);
  for (let i = 1; i < n; i++) before[i] = before[i - 1] + (density[i - 1] + density[i]) / 2;
  const knots = new Float64Array(count);
  for (let j = 0, i = 0; j < count; j++) {
    const share = (before[n - 1] * (j + 1)) / (count + 1);
    while (i < n - 2 && before[i + 1] <= share) i++;
    const part = (share - before[i]) / (before[i + 1] - before[i]);
    knots[j] = distinct[i] - distinct[0] + part * (distinct[i + 1] - distinct[i]);
  }
  return knots;
}

/** Square root of the pilot's residual variance around each distinct time. */
function localDeviation(obs: Observations, distinct: Float64Array, knots: Float64Array, reach: number): Float64Array {
  const pilot = fitNaturalSpline(obs, knots);
  const n = distinct.length;
  const squares = new Float64Array(n + 1);
  const freedom = new Float64Array(n + 1);
  for (let i = 0, k = 0; i < obs.t.length; i++) {
    const factor = obs.pulls[obs.lot[i]];
    if (!(factor > 0)) continue;
    while (distinct[k] < obs.t[i]) k++;
    squares[k + 1] += obs.weight[i] * factor * (obs.y[i] - pilot.fitted[i]) ** 2;
    freedom[k + 1] += factor * (1 - pilot.leverage[i]);
  }
  for (let k = 0; k < n; k++) {
    squares[k + 1] += squares[k];
    freedom[k + 1] += freedom[k];
  }
  return distinct.map((_, k) => {
    const from = Math.max(0, k - reach);
    const to = Math.min(n, k + reach + 1);
    const left = freedom[to] - freedom[from];
    return left > 0 ? Math.sqrt(Math.max(0, squares[to] - squares[from]) / left) : 0;
  });
}
