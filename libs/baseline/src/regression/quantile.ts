/**
 * Quantile of sorted numbers, R's type 7 (definition 7 of Hyndman & Fan 1996, Am. Stat. 50:361): with h = (n - 1) p and k = floor(h) it is
 * x_k + (h - k)(x_(k+1) - x_k), counted from 0. Strictly increasing in p where the numbers are.
 * @param sorted numbers in non-decreasing order, at least one
 * @param p probability, 0 .. 1
 * @example quantileOfSorted(Float64Array.of(1, 2, 4), 0.75) // 3
 */
export function quantileOfSorted(sorted: Float64Array, p: number): number {
  const h = (sorted.length - 1) * p;
  const k = Math.min(Math.floor(h), sorted.length - 1);
  const next = Math.min(k + 1, sorted.length - 1);
  return sorted[k] + (h - k) * (sorted[next] - sorted[k]);
}
