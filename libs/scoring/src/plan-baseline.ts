import { type BaselineFit, fitRobust, fitSmoothingSpline } from '@app/baseline';

import type { ChosenPoints } from './segment-points';
import type { PlanParameters } from './types';

/**
 * The plan's baseline through the chosen lots: a smoothing spline, and with `isRobust` its lots reweighted by their distance from the
 * baseline fitted without them.
 *
 * @returns the fit, and by place among the chosen what each lot pulls it by: its own pull times its factor
 * @throws BaselineError when nothing can be fitted
 */
export function planBaseline(
  { observations, count }: ChosenPoints,
  lambda: number,
  { isRobust }: Pick<PlanParameters, 'isRobust'>,
): { fit: BaselineFit; pulls: Float64Array } {
  const given = Float64Array.from(observations.pulls);
  if (!isRobust) return { fit: fitSmoothingSpline(observations, lambda), pulls: given };
  const { fit, factor } = fitRobust(observations, { method: 'smoothing-spline', lambda }, { count });
  return { fit, pulls: given.map((pull, place) => pull * factor[place]) };
}
