import { ControlError } from './control-error';
import type { VarianceEstimate } from './variance-estimate';

/**
 * Pooled variance within groups: Σ (sums of squares about each group's mean) / Σ (count − 1).
 *
 * @param groups count (at least 1) and sum of squared deviations from the group's own mean, unit squared
 * @returns terms 0 when no group has two values
 * @throws ControlError non-finite, bad-argument
 * @example pooledVariance([{ count: 3, sumSquares: 2 }]) // { variance: 1, wasNegative: false, terms: 2 }
 */
export function pooledVariance(groups: readonly { count: number; sumSquares: number }[]): VarianceEstimate {
  let squares = 0;
  let terms = 0;
  for (const { count, sumSquares } of groups) {
    if (!Number.isFinite(count) || !Number.isFinite(sumSquares))
      throw new ControlError('non-finite', 'A count or a sum of squares is not a finite number.');
    if (!(count >= 1 && sumSquares >= 0))
      throw new ControlError('bad-argument', 'A group has at least one value and no negative sum of squares.');
    squares += sumSquares;
    terms += count - 1;
  }
  return { variance: terms > 0 ? squares / terms : 0, wasNegative: false, terms };
}
