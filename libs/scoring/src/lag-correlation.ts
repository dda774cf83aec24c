import { fitSmoothingSpline, type Observations } from '@app/baseline';
import { Matrix, inverse } from 'ml-matrix';

/**
 * Correlation of each lot's score with the next lot's that the fit alone causes, under the spline's own prior. With
 * Cov(y − ĝ) = (I − S) W⁻¹ and e₋ⱼ = (I − Sⱼⱼ)⁻¹ (y − ĝ)ⱼ, rⱼ = aⱼᵀ e₋ⱼ:
 * Cov(rⱼ, rₖ) = aⱼᵀ (I − Sⱼⱼ)⁻¹ [(I − S) W⁻¹]ⱼₖ (I − Sₖₖ)⁻ᵀ aₖ. The blocks of S are had by deleting the two lots together: the
 * covariance of that deletion is C = (I − S_II)⁻¹ W_I⁻¹, hence (I − S_II) W_I⁻¹ = W_I⁻¹ C⁻¹ W_I⁻¹. Two fits, in which lots 0+1, 2+3, …
 * and 1+2, 3+4, … go by one name, give every pair.
 *
 * @param observations every lot pulls; lots numbered in time order
 * @param count readings of each point
 * @returns one correlation for each pair of neighbours
 * @throws BaselineError when two lots are all there is
 */
export function neighbourCorrelations(observations: Observations, count: Float64Array, lambda: number): Float64Array {
  const lotCount = observations.pulls.length;
  const correlations = new Float64Array(Math.max(lotCount - 1, 0));
  for (const offset of [0, 1]) {
    const pairOf = (lot: number) => (lot + offset) >> 1;
    const pairs = pairOf(lotCount - 1) + 1;
    const joined = { ...observations, lot: observations.lot.map(pairOf), pulls: new Uint8Array(pairs).fill(1) };
    for (const { lot: pair, indices, covariance } of fitSmoothingSpline(joined, lambda).deletedLots()) {
      const first = 2 * pair - offset;
      if (first < 0 || first + 1 >= lotCount) continue;
      const members = Array.from(indices, (i) => observations.lot[i] - first);
      const weights = Array.from(indices, (i) => observations.weight[i]);
      const counts = Array.from(indices, (i) => count[i]);
      correlations[first] = pairCorrelation(members, weights, counts, covariance);
    }
  }
  return correlations;
}

/** @param members 0 or 1 for each point: first or second lot of the pair */
function pairCorrelation(members: number[], weights: number[], counts: number[], covariance: Float64Array): number {
  const m = members.length;
  const precision = inverse(Matrix.from1DArray(m, m, covariance));
  const rest = new Matrix(m, m);
  for (let p = 0; p < m; p += 1)
    for (let q = 0; q < m; q += 1) rest.set(p, q, precision.get(p, q) / (weights[p] * weights[q]));
  const [first, second] = [0, 1].map((member) => {
    const own = members.flatMap((of, p) => (of === member ? [p] : []));
    const total = own.reduce((sum, p) => sum + counts[p], 0);
    const a = Matrix.columnVector(own.map((p) => counts[p] / total));
    // I − Sⱼⱼ = [(I − S) W⁻¹]ⱼⱼ Wⱼ; the row is aᵀ (I − Sⱼⱼ)⁻¹.
    const block = rest.selection(own, own).mmul(Matrix.diag(own.map((p) => weights[p])));
    return { own, row: inverse(block).transpose().mmul(a).transpose() };
  });
  const along = (j: typeof first, k: typeof first) =>
    j.row.mmul(rest.selection(j.own, k.own)).mmul(k.row.transpose()).get(0, 0);
  return along(first, second) / Math.sqrt(along(first, first) * along(second, second));
}

/** Lag-1 correlation of scores in time order: Σ (zⱼ − z̄)(z₍ⱼ₊₁₎ − z̄) / Σ (zⱼ − z̄)². */
export function lagOneCorrelation(scores: readonly number[]): number {
  const mean = scores.reduce((sum, z) => sum + z, 0) / scores.length;
  let products = 0;
  let squares = 0;
  scores.forEach((z, j) => {
    squares += (z - mean) ** 2;
    if (j > 0) products += (z - mean) * (scores[j - 1] - mean);
  });
  return products / squares;
}
