import type { DeletedLot, Observations, SmoothingSplineFit } from '@app/baseline';

import type { ChosenPoints } from './segment-points';

/** A lot against the baseline fitted without it. */
export interface LotScore {
  /** r = aᵀ e₋ⱼ, lot mean minus that baseline, unit. */
  residual: number;
  /** √(aᵀ Cov a), unit. */
  sd: number;
  /** z = r / √Var r, before the reference period's centre and scale. */
  z: number;
}

/**
 * Score of one lot: with a the count weights of its points, r = aᵀ e₋ⱼ, Var r = aᵀ Cov(e₋ⱼ) a, z = r / √Var r.
 *
 * @param deleted residuals from, and covariance against, the baseline without the lot
 * @param count readings of each point of the series that `deleted.indices` counts in
 */
export function lotScore(deleted: DeletedLot, count: Float64Array): LotScore {
  const { indices, residual, covariance } = deleted;
  const m = indices.length;
  let total = 0;
  for (let p = 0; p < m; p += 1) total += count[indices[p]];
  let r = 0;
  let variance = 0;
  for (let p = 0; p < m; p += 1) {
    const a = count[indices[p]] / total;
    r += a * residual[p];
    for (let q = 0; q < m; q += 1) variance += a * (count[indices[q]] / total) * covariance[p * m + q];
  }
  const sd = Math.sqrt(variance);
  return { residual: r, sd, z: r / sd };
}

/** Up to this leverage (1 − h) loses no digit that matters. */
const SAFE_LEVERAGE = 0.5;

/**
 * Scores of all chosen lots. A lot of one point of leverage h needs no deletion: e₋ = (y − ĝ) / (1 − h) with variance
 * 1 / (w (1 − h)); when it does not pull, y − ĝ with variance 1/w + se². The others are deleted one by one.
 *
 * @returns by place among the chosen
 */
export function allScores(
  fit: SmoothingSplineFit,
  { observations, count }: ChosenPoints,
  pulls: Observations['pulls'],
): LotScore[] {
  const { y, weight, lot } = observations;
  const scores = new Array<LotScore>(pulls.length);
  const size = new Int32Array(pulls.length);
  for (const place of lot) size[place] += 1;
  const others: number[] = [];
  for (let i = 0; i < y.length; i += 1) {
    const place = lot[i];
    const h = fit.leverage[i];
    if (size[place] > 1 || !(h < SAFE_LEVERAGE)) {
      if (others[others.length - 1] !== place) others.push(place);
      continue;
    }
    const stays = 1 - h;
    const se = fit.standardError[i];
    const residual = (y[i] - fit.fitted[i]) / stays;
    const sd = Math.sqrt(pulls[place] === 1 ? 1 / (weight[i] * stays) : 1 / weight[i] + se * se);
    scores[place] = { residual, sd, z: residual / sd };
  }
  for (const deleted of fit.deletedLots(Int32Array.from(new Set(others))))
    scores[deleted.lot] = lotScore(deleted, count);
  return scores;
}
