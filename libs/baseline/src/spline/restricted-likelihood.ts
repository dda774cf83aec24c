import type { PreparedSeries } from '../prepared-series';

/**
 * The determinant in the restricted likelihood, log|A| - (m - 2) log alpha (Wahba 1985, Ann. Statist. 13:1378), with A = W + alpha K on the m
 * distinct times of pulling points (weights of ties added), time on [0, 1], pulling weights of mean 1, alpha the penalty in these units and
 * K = Q R^-1 Q' (Green & Silverman 1994, 2.1.2).
 *
 * The filter gives D prod delta = |W| |V| |N' V^-1 N|, V = W^-1 + Omega/alpha the covariance of the points under the prior and N = (1, t). Second
 * divided differences have Q' Omega Q = R, hence |A| = |W| alpha^(m-2) |R/alpha + Q' W^-1 Q| / |R| = alpha^(m-2) |W| |Q' V Q| / |R|; and
 * |Q' V Q| = |V| |N' V^-1 N| |Q'Q| / |N'N| with |Q'Q| / |N'N| = prod h_j^-2 over the m - 1 gaps. So
 *
 *   log|A| - (m - 2) log alpha = log D + sum log delta - 2 sum log h_j - log|R|.
 *
 * @param state of the forward pass before the last point @param logDelta what the pass returned
 * @returns log D + sum log delta; with {@link determinantConstant} the whole
 */
export function logDeterminant(series: PreparedSeries, state: Float64Array, logDelta: number): number {
  return Math.log(state[3] + series.pull[series.n - 1] * state[2]) + logDelta;
}

/** Smaller factors are not multiplied with others, lest the product vanish. */
const SMALL_FACTOR = 1e-20;

/** -2 sum log h_j - log|R| over the gaps h_j between the distinct times of pulling points, scaled; the same for every lambda. */
export function determinantConstant(series: PreparedSeries): number {
  const { n, gap, pull } = series;
  let logSum = 0;
  let product = 1;
  let before = 0;
  let pivot = 0;
  let span = 0;
  let isFirst = true;
  for (let k = 0; k < n; k++) {
    if (pull[k] > 0) {
      if (!isFirst && span > 0) {
        if (span > SMALL_FACTOR) product *= span * span;
        else logSum += 2 * Math.log(span);
        if (before > 0) {
          // R has (h_j + h_(j+1))/3 on its diagonal and h_(j+1)/6 beside it; pivot of its factorisation.
          pivot = (before + span) / 3 - (pivot > 0 ? (before * before) / (36 * pivot) : 0);
          if (pivot > SMALL_FACTOR) product *= pivot;
          else logSum += Math.log(pivot);
        }
        before = span;
        if (!(product > 1e-200 && product < 1e200)) {
          logSum += Math.log(product);
          product = 1;
        }
      }
      span = 0;
      isFirst = false;
    }
    span += gap[k];
  }
  return -(logSum + Math.log(product));
}

/**
 * -2 log restricted likelihood, up to a constant of the data's size alone.
 * @param prss in raw units (weights as given) @param logDet see {@link logDeterminant}
 * @returns known: PRSS + logDet (sigma^2 = 1); estimated: (N - 2) log(PRSS/(N - 2)) + logDet (sigma^2 profiled out), N pulling points
 */
export function restrictedDeviance(
  pullCount: number,
  prss: number,
  logDet: number,
): { known: number; estimated: number } {
  const rest = pullCount - 2;
  return { known: prss + logDet, estimated: rest > 0 ? rest * Math.log(prss / rest) + logDet : logDet };
}
