import { ControlError, requireFinite } from './control-error';
import { D2_OF_TWO } from './individuals-chart';

/**
 * Standard deviation of correlated scores from their moving range: mean of |z₍ⱼ₊₁₎ − z₍ⱼ₎| / (1.128 √(1 − rⱼ)). Scores against a
 * smoother are negatively correlated, which widens their moving range; without the correction the scale comes out too large.
 *
 * @param scores in time order, at least two
 * @param correlations of each score with the next, one fewer than the scores, each below 1
 * @throws ControlError insufficient-data, non-finite, bad-argument
 * @example movingRangeScale([0, 1.128], [0]) // 1
 */
export function movingRangeScale(scores: ArrayLike<number>, correlations: ArrayLike<number>): number {
  requireFinite(scores, 2);
  if (correlations.length !== scores.length - 1)
    throw new ControlError('bad-argument', 'One correlation for each pair of neighbours is needed.');
  let sum = 0;
  for (let i = 0; i < correlations.length; i += 1) {
    if (!(correlations[i] < 1)) throw new ControlError('bad-argument', 'A correlation is below 1.');
    sum += Math.abs(scores[i + 1] - scores[i]) / (D2_OF_TWO * Math.sqrt(1 - correlations[i]));
  }
  return sum / correlations.length;
}
