import { BaselineError, mostKnots, placeKnots } from '@app/baseline';
import { InputError } from '../input-error';
import type { FitOptions } from '../options/fit-options';
import type { ArrangedSeries } from '../series/arranged';
import { NOTHING_CHOSEN, type DecidedSmoothness } from './decided-smoothness';
import type { WeighingRows } from './weighing-rows';

/** Interior knots to the number given, at least half a shortest period apart. @throws InputError when they cannot be placed, or are faster than the shortest period */
export function givenKnots(
  { obs }: ArrangedSeries,
  rows: WeighingRows,
  count: number,
  { method, placement, shortestPeriod }: FitOptions,
): DecidedSmoothness {
  const degreesOfFreedom = count + (method === 'b-spline' ? 4 : 2);
  if (degreesOfFreedom > rows.distinctTimes)
    throw new InputError(
      `--knots ${count} gives --method ${method} ${degreesOfFreedom} degrees of freedom; the rows have ${rows.distinctTimes} distinct times`,
    );
  refuseTooMany(rows, count, method, shortestPeriod);
  const minimumSpacing = shortestPeriod === undefined ? undefined : shortestPeriod / 2;
  const knots = place(() => placeKnots(obs, count, placement, { minimumSpacing }), count, placement);
  return {
    spec: { method: method === 'b-spline' ? 'b-spline' : 'natural-spline', knots },
    rule: 'knots',
    value: count,
    isAtFloor: false,
    criterion: NOTHING_CHOSEN,
    warnings: [],
  };
}

function refuseTooMany({ window }: WeighingRows, count: number, method: string, shortestPeriod?: number): void {
  if (shortestPeriod === undefined) return;
  const faster = `--knots ${count} is faster than --shortest-period ${shortestPeriod}`;
  if (shortestPeriod > window && (count > 0 || method === 'b-spline'))
    throw new InputError(
      `${faster}, which is longer than the record: only the straight line is left (natural-spline without knots)`,
    );
  const most = mostKnots(window, shortestPeriod);
  if (count > most) throw new InputError(`${faster}: at most ${most} over this record`);
}

function place(run: () => Float64Array, count: number, placement: string): Float64Array {
  try {
    return run();
  } catch (error) {
    if (!(error instanceof BaselineError)) throw error;
    throw new InputError(`--knots ${count} cannot be placed with --placement ${placement}: ${error.message}`);
  }
}
