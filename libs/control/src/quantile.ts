import { requireFinite, ControlError } from './control-error';

/**
 * Sample quantile by linear interpolation between order statistics, position (n − 1) p: type 7 of Hyndman & Fan (1996), the
 * default of R. Their type 8 is the rival; in samples of 20 or more they hardly differ.
 *
 * @param values at least one finite number, any order; left as they are
 * @param p between 0 and 1
 * @throws ControlError insufficient-data, non-finite, bad-argument
 * @example quantile([4, 1, 3, 2], 0.5) // 2.5
 */
export function quantile(values: ArrayLike<number>, p: number): number {
  requireFinite(values, 1);
  if (!(p >= 0 && p <= 1)) throw new ControlError('bad-argument', 'A quantile is between 0 and 1.');
  const sorted = Float64Array.from(values).sort();
  const position = (sorted.length - 1) * p;
  const below = Math.floor(position);
  const above = Math.min(below + 1, sorted.length - 1);
  return sorted[below] + (position - below) * (sorted[above] - sorted[below]);
}
