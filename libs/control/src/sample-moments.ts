import { requireFinite } from './control-error';

/**
 * Mean and sample standard deviation √(Σ (x − x̄)² / (n − 1)), in two passes.
 *
 * @param values at least two finite numbers
 * @throws ControlError insufficient-data, non-finite
 * @example sampleMoments([1, 2, 3]) // { mean: 2, standardDeviation: 1 }
 */
export function sampleMoments(values: ArrayLike<number>): { mean: number; standardDeviation: number } {
  requireFinite(values, 2);
  const n = values.length;
  let sum = 0;
  for (let i = 0; i < n; i += 1) sum += values[i];
  const mean = sum / n;
  let squares = 0;
  for (let i = 0; i < n; i += 1) squares += (values[i] - mean) ** 2;
  return { mean, standardDeviation: Math.sqrt(squares / (n - 1)) };
}
