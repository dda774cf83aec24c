import { requireFinite } from './control-error';
import { quantile } from './quantile';

/** Makes the median absolute deviation of a normal sample estimate its standard deviation: 1 / Φ⁻¹(3/4), rounded as is usual. */
export const MAD_TO_SD = 1.4826;

/**
 * Median, and 1.4826 · median |x − median|: centre and scale that up to half of the values cannot spoil (Hampel 1974).
 *
 * @param values at least one finite number
 * @returns scale 0 when more than half of the values are equal
 * @throws ControlError insufficient-data, non-finite
 * @example robustScale([1, 2, 3, 4, 100]) // { median: 3, scale: 1.4826 }
 */
export function robustScale(values: ArrayLike<number>): { median: number; scale: number } {
  requireFinite(values, 1);
  const median = quantile(values, 0.5);
  const deviations = Array.from(values, (x) => Math.abs(x - median));
  return { median, scale: MAD_TO_SD * quantile(deviations, 0.5) };
}
