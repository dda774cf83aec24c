import { BaselineError } from '../baseline-error';
import type { BaselineMethod } from '../baseline-fit';
import type { Observations } from '../observations';
import { mostKnots } from '../regression/place-knots';

export type RegressionMethod = Exclude<BaselineMethod, 'smoothing-spline'>;

/** The numbers of knots, or degrees, that may be chosen. */
export interface RegressionRange {
  /** The smoothest: no knots, degree 1; 0 for the constant. */
  fewest: number;
  /** The most that anything allows. */
  most: number;
  /** The shortest drift period set `most`. */
  isMostByPeriod: boolean;
  /** Effective degrees of freedom less the number of knots or the degree. */
  edfOffset: number;
  /** Least distance of adjacent knots, s: T/2. */
  minimumSpacing?: number;
}

/** Most interior knots tried. */
export const MOST_KNOTS = 40;
/** Highest degree tried: beyond, polynomials run away between their last points. */
export const HIGHEST_DEGREE = 4;

const EDF_OFFSET: Record<RegressionMethod, number> = { 'natural-spline': 2, 'b-spline': 4, polynomial: 1, constant: 1 };

/**
 * The range of smoothness of a regression baseline. Degrees of freedom are at most the distinct times of points that pull. With a shortest drift period T
 * knots are at least T/2 apart and at most 2 window/T - 1; a polynomial of degree d, which can turn d - 1 times, has d at most 2 window/T likewise.
 * @throws BaselineError 'bad-argument', 'non-finite' for T; 'insufficient-data' when the distinct times do not even determine the smoothest
 */
export function regressionRange(
  obs: Observations,
  method: RegressionMethod,
  shortestPeriodSeconds?: number,
): RegressionRange {
  const { distinct, window } = pullingTimes(obs);
  const edfOffset = EDF_OFFSET[method];
  const fewest = method === 'polynomial' ? 1 : 0;
  const ceiling = method === 'constant' ? 0 : method === 'polynomial' ? HIGHEST_DEGREE : MOST_KNOTS;
  const byData = Math.min(ceiling, distinct - edfOffset);
  if (byData < fewest)
    throw new BaselineError(
      'insufficient-data',
      `Points that pull have ${distinct} distinct times; ${fewest + edfOffset} are needed.`,
    );
  if (shortestPeriodSeconds === undefined || method === 'constant')
    return { fewest, most: byData, isMostByPeriod: false, edfOffset };
  const knots = mostKnots(window, shortestPeriodSeconds);
  const byPeriod = method === 'polynomial' ? knots + 1 : knots;
  const most = Math.min(byData, byPeriod);
  return { fewest, most, isMostByPeriod: byPeriod < byData, edfOffset, minimumSpacing: shortestPeriodSeconds / 2 };
}

/** Number of distinct times of points that pull, and the time from the first of them to the last. */
export function pullingTimes({ t, lot, pulls }: Observations): { distinct: number; window: number } {
  let distinct = 0;
  let first = 0;
  let last = -Infinity;
  for (let i = 0; i < t.length; i++) {
    if (pulls[lot[i]] === 0 || t[i] === last) continue;
    if (distinct++ === 0) first = t[i];
    last = t[i];
  }
  return { distinct, window: last - first };
}
