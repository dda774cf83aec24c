import { BaselineError } from '../baseline-error';
import type { PreparedSeries } from '../prepared-series';
import { BandedLeastSquares, RANK_TOLERANCE } from './banded-least-squares';
import { BasisRow, type Basis } from './basis';

/** The points' rows in a basis, and the least-squares system of those that pull. Weights are scaled as in the series. */
export interface RegressionSystem {
  readonly series: PreparedSeries;
  readonly basis: Basis;
  /** First and last pulling time (s), the time between them, and u of each point. */
  readonly origin: number;
  readonly end: number;
  readonly range: number;
  readonly u: Float64Array;
  /** Row i: functions first[i] .. first[i] + width - 1, values at width * i. */
  readonly first: Int32Array;
  readonly rows: Float64Array;
  /** Values less what is added back (the weighted line, or the mean). */
  readonly y: Float64Array;
  readonly fit: BandedLeastSquares;
}

/** u = 0 at the first and 1 at the last pulling point, formed from the raw stamps. */
export interface PullingTimes {
  readonly origin: number;
  readonly end: number;
  readonly range: number;
  readonly u: Float64Array;
  readonly distinct: number;
}

/** Times of the points on the scale of a basis. */
export function pullingTimes(series: PreparedSeries): PullingTimes {
  const { obs, n, pull } = series;
  let from = -1;
  let to = 0;
  let distinct = 0;
  for (let i = 0; i < n; i++) {
    if (!(pull[i] > 0)) continue;
    if (from < 0 || obs.t[i] > obs.t[to]) distinct++;
    if (from < 0) from = i;
    to = i;
  }
  const origin = obs.t[from];
  const end = obs.t[to];
  const range = end - origin;
  return { origin, end, range, u: obs.t.map((t) => (t - origin) / range), distinct };
}

/** @throws BaselineError 'insufficient-data' when there are fewer distinct times than functions */
export function requireDistinct({ distinct }: PullingTimes, functions: number): void {
  if (distinct >= functions) return;
  throw new BaselineError(
    'insufficient-data',
    `Points that pull have ${distinct} distinct times; ${functions} are needed.`,
  );
}

/**
 * Fits the points in a basis.
 * @param y values, what is added back taken off
 * @throws BaselineError 'insufficient-data' (fewer distinct times than functions), 'ill-posed' (a stretch between knots without points)
 */
export function solveRegression(
  series: PreparedSeries,
  times: PullingTimes,
  basis: Basis,
  y: Float64Array,
): RegressionSystem {
  requireDistinct(times, basis.dimension);
  const { n } = series;
  const { width } = basis;
  const first = new Int32Array(n);
  const rows = new Float64Array(width * n);
  const row = new BasisRow(width);
  for (let i = 0; i < n; i++) {
    basis.evaluate(times.u[i], row);
    first[i] = row.first;
    for (let d = 0; d < width; d++) rows[width * i + d] = row.value[d];
  }
  const fit = new BandedLeastSquares(basis.dimension, width);
  const system = { series, basis, ...times, first, rows, y, fit };
  addPoints(system, fit, y, -1);
  const column = undetermined(system, fit, -1);
  if (column >= 0) {
    const { from, to } = basis.support(column);
    const [a, b] = [times.origin + times.range * from, times.origin + times.range * to];
    throw new BaselineError('ill-posed', `The points that pull do not determine the curve between ${a} and ${b}.`);
  }
  return system;
}

/** Takes in all pulling points but those of one lot. */
export function addPoints(system: RegressionSystem, fit: BandedLeastSquares, y: Float64Array, without: number): void {
  const { series, first, rows } = system;
  const { n, pull, obs } = series;
  const { width } = fit;
  for (let i = 0; i < n; i++) {
    if (pull[i] > 0 && obs.lot[i] !== without) fit.add(first[i], rows, width * i, Math.sqrt(pull[i]), y[i]);
  }
}

/**
 * The first function that pulling points (without one lot) do not determine, or -1. First by the condition of Schoenberg & Whitney (de Boor 1978,
 * ch. XIII-XIV): distinct times tau_1 < tau_2 < ... exist with b_j(tau_j) not 0. It holds for the natural basis too: its functions are
 * B-splines times a totally positive matrix. Then by the numbers: too small a pivot, or a function next to nothing at all times (they are of the order of 1).
 */
export function undetermined(system: RegressionSystem, fit: BandedLeastSquares, without: number): number {
  const { series, first, rows } = system;
  const { n, pull, obs } = series;
  const { width, dimension } = fit;
  const largest = new Float64Array(dimension);
  let next = 0;
  let last = -Infinity;
  for (let i = 0; i < n; i++) {
    if (!(pull[i] > 0) || obs.lot[i] === without) continue;
    if (next < dimension && system.u[i] > last && isWithin(system, next, system.u[i])) {
      next++;
      last = system.u[i];
    }
    for (let d = 0; d < width; d++) {
      const j = first[i] + d;
      const x = Math.abs(rows[width * i + d]);
      if (x > largest[j]) largest[j] = x;
    }
  }
  if (next < dimension) return next;
  const column = fit.undeterminedColumn();
  return column >= 0 ? column : largest.findIndex((x) => !(x > RANK_TOLERANCE));
}

/** Whether a function is not 0 at a time of [0, 1]. */
function isWithin({ basis }: RegressionSystem, column: number, u: number): boolean {
  const { from, to } = basis.support(column);
  return (u > from || (column === 0 && u === 0)) && (u < to || (column === basis.dimension - 1 && u === 1));
}
