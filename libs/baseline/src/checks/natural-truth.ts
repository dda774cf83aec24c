/**
 * A natural cubic spline with knots k_0 < ... < k_m in truncated powers (Hastie, Tibshirani & Friedman 2009, eq. 5.4-5.5): level + slope x + sum c_j (d_j(x) - d_(m-1)(x)),
 * d_j(x) = ((x - k_j)_+^3 - (x - k_m)_+^3) / (k_m - k_j). Linear beyond k_0 and k_m.
 * @param knots length m + 1, increasing, ends included @param c length m - 1
 */
export function naturalTruth(
  knots: ArrayLike<number>,
  level: number,
  slope: number,
  c: number[],
): (x: number) => number {
  const m = knots.length - 1;
  const cube = (x: number) => Math.max(0, x) ** 3;
  const d = (j: number, x: number) => (cube(x - knots[j]) - cube(x - knots[m])) / (knots[m] - knots[j]);
  return (x) => c.reduce((sum, cj, j) => sum + cj * (d(j, x) - d(m - 1, x)), level + slope * x);
}
