import { fitSmoothingSpline, type Observations } from '@app/baseline';
import { Matrix, solve } from 'ml-matrix';

/**
 * Correlation of each lot's score with the next lot's that the fit alone causes, under the spline's own prior. With
 * Cov(y − ĝ) = (I − S) W⁻¹ and e₋ⱼ = (I − Sⱼⱼ)⁻¹ (y − ĝ)ⱼ, rⱼ = aⱼᵀ e₋ⱼ:
 * Cov(rⱼ, rₖ) = aⱼᵀ (I − Sⱼⱼ)⁻¹ [(I − S) W⁻¹]ⱼₖ (I − Sₖₖ)⁻ᵀ aₖ. Two fits, in which lots 0+1, 2+3, … and 1+2, 3+4, … go by one name, have the
 * blocks of S of every pair.
 *
 * @param observations every lot pulls; lots numbered in time order
 * @param count readings of each point
 * @returns one correlation for each pair of neighbours
 * @throws BaselineError when nothing can be fitted
 */
export function neighbourCorrelations(observations: Observations, count: Float64Array, lambda: number): Float64Array {
  const lotCount = observations.pulls.length;
  const correlations = new Float64Array(Math.max(lotCount - 1, 0));
  for (const offset of [0, 1]) {
    const pairOf = (lot: number) => (lot + offset) >> 1;
    const pairs = pairOf(lotCount - 1) + 1;
    const joined = { ...observations, lot: observations.lot.map(pairOf), pulls: new Uint8Array(pairs).fill(1) };
    const fit = fitSmoothingSpline(joined, lambda);
    const members = Array.from({ length: pairs }, (): number[] => []);
    joined.lot.forEach((pair, i) => members[pair].push(i));
    for (let pair = 0; pair < pairs; pair += 1) {
      const first = 2 * pair - offset;
      if (first < 0 || first + 1 >= lotCount) continue;
      const points = members[pair].map((i) => ({
        isSecond: observations.lot[i] > first,
        weight: observations.weight[i],
        count: count[i],
      }));
      correlations[first] = pairCorrelation(points, fit.smootherBlock(pair));
    }
  }
  return correlations;
}

interface PairPoint {
  isSecond: boolean;
  weight: number;
  count: number;
}

/** @param block S of the two lots' points together */
function pairCorrelation(points: PairPoint[], block: Float64Array): number {
  const m = points.length;
  const stays = Matrix.sub(Matrix.eye(m, m), Matrix.from1DArray(m, m, block));
  const rest = stays.mmul(Matrix.diag(points.map(({ weight }) => 1 / weight)));
  const [first, second] = [false, true].map((isSecond) => {
    const own = points.flatMap((point, p) => (point.isSecond === isSecond ? [p] : []));
    const total = own.reduce((sum, p) => sum + points[p].count, 0);
    const a = Matrix.columnVector(own.map((p) => points[p].count / total));
    // The row is aᵀ (I − Sⱼⱼ)⁻¹.
    return { own, row: solve(stays.selection(own, own).transpose(), a).transpose() };
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
