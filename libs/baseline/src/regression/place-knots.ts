import { BaselineError } from '../baseline-error';
import { checkObservations, type Observations } from '../observations';
import { knotsByVariability } from './knots-by-variability';
import { quantileOfSorted } from './quantile';
import { spaceKnots } from './space-knots';

/** Even in time, at quantiles of the distinct pulling times, or more where a pilot fit's residuals vary more. */
export type KnotPlacement = 'even' | 'quantile' | 'variability';

export interface PlaceKnotsOptions {
  /** Least time between neighbouring knots, and between the outer knots and the first and last pulling time, s; half the shortest drift period. Default: none. */
  minimumSpacing?: number;
}

/** Rounding that a spacing which just fits is forgiven, relative. */
const ROUNDING = 1e-12;

/**
 * The most interior knots for a shortest drift period: floor(2 window / T - 1), at least 0, so that knots can be T/2 apart.
 * @param windowSeconds from the first to the last pulling time, s, > 0
 * @param periodSeconds T, s, > 0
 * @throws BaselineError 'bad-argument', 'non-finite'
 * @example mostKnots(30 * 86400, 3 * 86400) // 19
 */
export function mostKnots(windowSeconds: number, periodSeconds: number): number {
  checkPositive(windowSeconds, 'The window');
  checkPositive(periodSeconds, 'The period');
  return knotsThatFit(windowSeconds, periodSeconds / 2);
}

/**
 * Places interior knots for {@link fitNaturalSpline} and {@link fitBSpline}.
 *
 * 'even': equal steps from the first to the last pulling time. 'quantile': R's type 7 quantiles of the *distinct* pulling times at j / (count + 1), so that ties do not
 * draw knots and no two knots coincide. 'variability': see knotsByVariability. With a minimum spacing, knots that come closer to each other or to
 * the ends are moved apart, by as little as possible in squares; when no placement fits, the answer is an error, not fewer knots.
 * @param obs points; only lots that pull count
 * @param count number of interior knots, 0, 1, ...
 * @returns s, strictly increasing, strictly between the first and the last pulling time
 * @throws BaselineError 'bad-argument' (count; a spacing that does not fit, with the number of knots that would), 'ill-posed' (knots so close that
 *   doubles cannot tell them apart), and as checkObservations
 * @example placeKnots(obs, mostKnots(window, T), 'quantile', { minimumSpacing: T / 2 })
 */
export function placeKnots(
  obs: Observations,
  count: number,
  placement: KnotPlacement,
  options: PlaceKnotsOptions = {},
): Float64Array {
  checkObservations(obs);
  if (!(Number.isInteger(count) && count >= 0)) {
    throw new BaselineError('bad-argument', `${count} knots cannot be placed.`);
  }
  const distinct = distinctTimes(obs);
  const start = distinct[0];
  const length = distinct[distinct.length - 1] - start;
  const { minimumSpacing } = options;
  if (minimumSpacing !== undefined) {
    checkPositive(minimumSpacing, 'The spacing');
    const most = knotsThatFit(length, minimumSpacing);
    if (count > most) {
      throw new BaselineError(
        'bad-argument',
        `${count} knots do not fit at least ${minimumSpacing} s apart into ${length} s; ${most} fit.`,
      );
    }
  }
  const quantiles = (k: number) =>
    Float64Array.from({ length: k }, (_, j) => quantileOfSorted(distinct, (j + 1) / (k + 1)));
  let relative: Float64Array;
  if (placement === 'even') relative = Float64Array.from({ length: count }, (_, j) => (length * (j + 1)) / (count + 1));
  else if (placement === 'quantile') relative = quantiles(count).map((t) => t - start);
  else relative = knotsByVariability(obs, distinct, count, quantiles);
  if (minimumSpacing !== undefined) relative = spaceKnots(relative, minimumSpacing, length);
  const knots = relative.map((t) => start + t);
  knots.forEach((knot, j) => {
    if (!(knot > (j > 0 ? knots[j - 1] : start) && knot < start + length)) {
      throw new BaselineError('ill-posed', `${count} knots come too close to be told apart, near ${knot}.`);
    }
  });
  return knots;
}

function distinctTimes({ t, lot, pulls }: Observations): Float64Array {
  return t.filter((_, i) => pulls[lot[i]] > 0).filter((at, i, pulling) => i === 0 || at > pulling[i - 1]);
}

function knotsThatFit(length: number, spacing: number): number {
  return Math.max(0, Math.floor((length / spacing) * (1 + ROUNDING)) - 1);
}

function checkPositive(x: number, what: string): void {
  if (!(x > 0 && x < Infinity))
    throw new BaselineError(Number.isNaN(x) ? 'non-finite' : 'bad-argument', `${what} must be positive and finite.`);
}
