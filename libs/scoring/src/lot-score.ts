import type { DeletedLot } from '@app/baseline';

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
