/** Where a lot has no pull left, in scales: 95 % efficiency at the normal distribution (Holland & Welsch 1977, Commun. Statist. A 6:813). */
export const BISQUARE_CONSTANT = 4.685;
/** Scale of a normal distribution over its median absolute value, 1 / 0.6745. */
export const NORMAL_PER_MEDIAN = 1.4826;

/**
 * Bisquare factor (1 - (z / (4.685 s))^2)^2, 0 beyond (Beaton & Tukey 1974, Technometrics 16:147).
 * @param z score @param scale s, > 0
 * @returns 0 .. 1
 * @example bisquareFactor(0, 1) // 1
 */
export function bisquareFactor(z: number, scale: number): number {
  const u = z / (BISQUARE_CONSTANT * scale);
  const rest = 1 - u * u;
  return rest > 0 ? rest * rest : 0;
}

/**
 * Factor of the start, min(1, median / |z|), with the median of |z| put as scale / 1.4826: Huber's weights (1964, Ann. Math. Statist. 35:73) at the constant 0.6745, close
 * to least absolute values.
 * @param z score @param scale s, > 0
 */
export function startFactor(z: number, scale: number): number {
  return Math.min(1, scale / (NORMAL_PER_MEDIAN * Math.abs(z)));
}

/** Median of the absolute values, of an even number the mean of the middle two; 0 of none. */
export function medianAbsolute(x: Float64Array): number {
  const sorted = x.map(Math.abs).sort();
  const half = sorted.length >> 1;
  if (sorted.length === 0) return 0;
  return sorted.length % 2 === 1 ? sorted[half] : 0.5 * (sorted[half - 1] + sorted[half]);
}
