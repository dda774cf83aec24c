import { BaselineError } from '../baseline-error';
import type { PreparedSeries } from '../prepared-series';
import type { Candidate } from './criteria';
import { ExactCriterion, type PenaltyRule } from './exact-criterion';
import { checkEdf, penaltyForEdf } from './fixed-edf';
import { smoothestWithinOneStandardError, type WithinOneStandardError } from './one-standard-error';
import { reducedStart, searchReduced } from './search-reduced';
import { bestOf, isNear, searchLambda, type Evaluate, type LambdaSearch } from './search-lambda';

/** What decides when the criterion has no minimum inside the range of lambda. */
export type PenaltyBound = 'interpolation' | 'line';

export interface ChosenPenalty extends LambdaSearch {
  chosen: Candidate;
  isAtFloor: boolean;
  isAtBound: PenaltyBound | null;
  oneStandardError?: WithinOneStandardError;
}

/** At lambda = 10 * (sum w) * range^3 the fit has 2.0003 degrees of freedom (free beam: sum of 1/mu_j = 1/500.6 + 1/3804 + ... = 0.0024). */
const LINE_LAMBDA = 10;
/** At lambda = 0.001 of a point's weight times the cubed spacing, an even series is interpolated. */
const INTERPOLATION_LAMBDA = 1e-3;
/** A line that leaves less than (1e-14)^2 of the sum of squares leaves rounding only. */
const EXACT_LINE_SHARE = 1e-28;

/** Series with more points are searched on a reduced basis; below, the exact search is as fast. */
const LONG_SERIES = 3000;

/** The penalties searched: from the floor (or, without one, near interpolation) to the straight line. */
export function penaltyRange(series: PreparedSeries, floorLambda: number): { low: number; high: number } {
  const high = LINE_LAMBDA * series.totalWeight * series.timeScale ** 3;
  const low = floorLambda > 0 ? floorLambda : (INTERPOLATION_LAMBDA * high) / (LINE_LAMBDA * series.pullCount ** 4);
  return { low, high };
}

/**
 * Chooses the smoothing spline's penalty by a criterion, between the floor and the straight line.
 * @param floorLambda weight * s^3, >= 0; 0: none
 * @param atBest the criterion, for where a search on a reduced basis evaluates it once (default: ExactCriterion; see KeptFit)
 * @throws BaselineError as ExactCriterion; 'bad-argument', 'non-finite' for the floor
 */
export function choosePenalty(
  series: PreparedSeries,
  rule: PenaltyRule,
  floorLambda: number,
  hasOneStandardError = false,
  atBest?: Evaluate,
): ChosenPenalty {
  checkFloor(floorLambda);
  let made: ExactCriterion | undefined;
  const exact = () => (made ??= new ExactCriterion(series));
  const evaluate = (lambda: number) => exact().evaluate(lambda, rule);
  const { low, high } = penaltyRange(series, floorLambda);
  if (low >= high) {
    const chosen = admissible(evaluate(low));
    return { chosen, curve: [chosen], minima: [chosen], isAtFloor: true, isAtBound: 'line' };
  }
  const isLine = series.lineRss <= EXACT_LINE_SHARE * series.sumSquares;
  const isLong = rule.rule !== 'lot-cv' && series.n > LONG_SERIES;
  const search =
    (isLong && !isLine ? searchReduced(series, rule, low, high, evaluate, atBest) : undefined) ??
    searchLambda(low, high, () => evaluate);
  if (isLine) {
    const line = admissible(evaluate(high));
    return { ...search, minima: [line], chosen: line, isAtFloor: false, isAtBound: 'line' };
  }
  const best = admissible(bestOf(search.minima));
  if (!hasOneStandardError) return { ...search, chosen: best, ...where(best.smoothness, low, high, floorLambda) };
  const { standardError } = exact().lotCriterion(best.smoothness);
  const smoother = search.curve.filter((c) => c.smoothness > best.smoothness);
  const smoothest = smoothestWithinOneStandardError(best, standardError, smoother, evaluate);
  return {
    ...search,
    chosen: smoothest,
    ...where(smoothest.smoothness, low, high, floorLambda),
    oneStandardError: { ...best, standardError },
  };
}

/**
 * The penalty of given effective degrees of freedom, or the floor where it binds.
 * @param edf inside (2, distinct) @param distinct distinct times of points that pull
 * @throws BaselineError as penaltyForEdf
 */
export function penaltyWithEdf(
  series: PreparedSeries,
  edf: number,
  distinct: number,
  floorLambda: number,
): { lambda: number; edf: number; isAtFloor: boolean } {
  checkFloor(floorLambda);
  checkEdf(edf, distinct);
  const exact = new ExactCriterion(series);
  if (floorLambda > 0) {
    const most = exact.edfAt(floorLambda);
    if (edf >= most) return { lambda: floorLambda, edf: most, isAtFloor: true };
  }
  const even = evenPenalty(series, edf);
  const { start, slope } = (series.n > LONG_SERIES && reducedStart(series, edf, distinct, even)) || { start: even };
  const found = penaltyForEdf((lambda) => exact.edfAt(lambda), edf, distinct, start, slope);
  return { lambda: found.lambda, edf: found.edf, isAtFloor: false };
}

/** The penalty that has these degrees of freedom were the points even in time: (sum w) range^3 / (2 sqrt 2 (edf - 1))^4 (see ReducedCriterion). */
function evenPenalty(series: PreparedSeries, edf: number): number {
  return (series.totalWeight * series.timeScale ** 3) / (2 * Math.SQRT2 * (edf - 1)) ** 4;
}

function admissible(candidate: Candidate | undefined): Candidate {
  if (candidate !== undefined && Number.isFinite(candidate.value)) return candidate;
  throw new BaselineError('ill-posed', 'No penalty has a criterion within the range of double precision.');
}

function checkFloor(floorLambda: number): void {
  if (!(floorLambda >= 0))
    throw new BaselineError(
      Number.isNaN(floorLambda) ? 'non-finite' : 'bad-argument',
      'The floor must not be negative.',
    );
}

function where(lambda: number, low: number, high: number, floorLambda: number) {
  const isAtLow = isNear(lambda, low);
  const isAtBound: PenaltyBound | null = isNear(lambda, high)
    ? 'line'
    : isAtLow && floorLambda === 0
      ? 'interpolation'
      : null;
  return { isAtFloor: isAtLow && floorLambda > 0, isAtBound };
}
