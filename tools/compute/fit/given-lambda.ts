import { lambdaForPeriod, pointDensity } from '@app/baseline';
import { InputError } from '../input-error';
import { NOTHING_CHOSEN, type DecidedSmoothness } from './decided-smoothness';
import type { WeighingRows } from './weighing-rows';

export const LINE_BY_PERIOD = '--shortest-period is longer than the record: the baseline is the straight line';
const INFINITE = 'lambda is infinite, which JSON cannot say and writes as null';

/** The smallest lambda that the shortest period allows: kappa (T / 2 pi)^4; infinite when T is longer than the record. @throws InputError when kappa is 0 */
export function floorLambda({ t, weight, window }: WeighingRows, shortestPeriod: number | undefined): number {
  if (shortestPeriod === undefined) return 0;
  if (shortestPeriod > window) return Infinity;
  const density = pointDensity(t, weight, shortestPeriod);
  if (!(density > 0 && density < Infinity))
    throw new InputError(
      `--shortest-period ${shortestPeriod}: the 90 % quantile of the density of weight, kappa, is ${density}`,
    );
  return lambdaForPeriod(density, shortestPeriod);
}

/** lambda as given, but not below the floor. */
export function givenLambda(rows: WeighingRows, wanted: number, shortestPeriod: number | undefined): DecidedSmoothness {
  const floor = floorLambda(rows, shortestPeriod);
  const lambda = Math.max(floor, wanted);
  const isAtFloor = floor > wanted;
  const warnings: string[] = [];
  if (isAtFloor)
    warnings.push(
      floor === Infinity
        ? `${LINE_BY_PERIOD}; ${INFINITE}`
        : `--lambda ${wanted} is below the floor of --shortest-period ${shortestPeriod}: lambda is ${lambda}`,
    );
  else if (lambda === Infinity) warnings.push(`The baseline is the straight line: ${INFINITE}`);
  return {
    spec: { method: 'smoothing-spline', lambda },
    rule: 'lambda',
    value: lambda === Infinity ? null : lambda,
    isAtFloor,
    criterion: NOTHING_CHOSEN,
    warnings,
  };
}
