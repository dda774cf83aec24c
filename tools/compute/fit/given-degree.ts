import { InputError } from '../input-error';
import { NOTHING_CHOSEN, type DecidedSmoothness } from './decided-smoothness';
import type { WeighingRows } from './weighing-rows';

/**
 * A polynomial's degree as given. One of degree d can turn d - 1 times, so that d is at most 2 window / T, and always at least 1.
 * @throws InputError when the shortest period allows less
 */
export function givenDegree(
  { window }: WeighingRows,
  degree: number,
  shortestPeriod: number | undefined,
): DecidedSmoothness {
  if (shortestPeriod !== undefined) {
    const most = shortestPeriod > window ? 1 : Math.floor((2 * window) / shortestPeriod);
    if (degree > most)
      throw new InputError(
        `--degree ${degree} is faster than --shortest-period ${shortestPeriod}: at most ${most} over this record`,
      );
  }
  return {
    spec: { method: 'polynomial', degree },
    rule: 'degree',
    value: degree,
    isAtFloor: false,
    criterion: NOTHING_CHOSEN,
    warnings: [],
  };
}
