import { BaselineError } from '../baseline-error';
import type { BaselineFit } from '../baseline-fit';
import type { Observations } from '../observations';
import { prepareSeries } from '../prepared-series';
import { BSplineBasis } from './b-spline-basis';
import { NaturalBasis } from './natural-basis';
import { PolynomialBasis } from './polynomial-basis';
import { PolynomialFit } from './polynomial-fit';
import { RegressionFit } from './regression-fit';
import { pullingTimes, type PullingTimes } from './regression-system';

/** Highest degree that is fitted. Plans offer 1 to 4; 5 is there so that NIST's certified quintics can be run. */
export const MAX_DEGREE = 5;

/**
 * Natural cubic regression spline: the weighted least-squares fit among natural cubic splines with the given interior knots, straight beyond the
 * first and the last pulling time (its boundary knots). K knots take K + 2 degrees of freedom. As R's lm(y ~ splines::ns(t, knots = knots)).
 *
 * Banded B-spline basis, O(n) for the fit and O(n K) for its standard errors; see {@link RegressionFit} and BandedLeastSquares.
 * @param obs points; see Observations
 * @param knots s, strictly increasing, strictly between the first and the last pulling time; none gives the straight line
 * @returns a projectable fit: linear on both sides, with the band of that line
 * @throws BaselineError 'bad-argument' (knots out of order or outside), 'non-finite', 'not-increasing', 'insufficient-data' (fewer distinct pulling
 *   times than K + 2), 'ill-posed' (a stretch between knots without points: the message names it)
 * @see Green & Silverman 1994, Nonparametric Regression and Generalized Linear Models, ch. 2; de Boor 1978, A Practical Guide to Splines, ch. XIV
 * @example fitNaturalSpline(obs, placeKnots(obs, 5, 'quantile')).at(obs.t[obs.t.length - 1] + 3600)
 */
export function fitNaturalSpline(obs: Observations, knots: Float64Array): BaselineFit {
  const series = prepareSeries(obs);
  const times = pullingTimes(series);
  const inner = scaledKnots(knots, times);
  const basis = inner.length > 0 ? new NaturalBasis(inner) : new PolynomialBasis(1, times.u, series.pull);
  return new RegressionFit({ method: 'natural-spline', knots: knots.slice() }, series, times, basis, true);
}

/**
 * Cubic B-spline regression: the weighted least-squares fit among cubic splines with the given interior knots, without conditions at the ends.
 * K knots take K + 4 degrees of freedom. As R's lm(y ~ splines::bs(t, knots = knots)). Not read beyond the points, where cubics run away.
 * @param obs points; see Observations
 * @param knots s, strictly increasing, strictly between the first and the last pulling time; none gives the cubic
 * @throws BaselineError as {@link fitNaturalSpline}, with K + 4 in place of K + 2
 * @see de Boor 1978, ch. XIV
 * @example fitBSpline(obs, placeKnots(obs, 5, 'even')).standardError
 */
export function fitBSpline(obs: Observations, knots: Float64Array): BaselineFit {
  const series = prepareSeries(obs);
  const times = pullingTimes(series);
  const basis = new BSplineBasis(scaledKnots(knots, times));
  return new RegressionFit({ method: 'b-spline', knots: knots.slice() }, series, times, basis, false);
}

/**
 * Weighted polynomial regression on a basis that is orthogonal over the weighted points (Forsythe 1957, J. SIAM 5:74), made so to the last digit by
 * rotations. As R's lm(y ~ poly(t, degree)). Not read beyond the points, but for degree 0.
 * @param obs points; see Observations
 * @param degree 0 .. 5, an integer; plans offer 1 to 4. 0 is {@link fitConstant}.
 * @throws BaselineError 'bad-argument' (degree), 'insufficient-data' (no more distinct pulling times than the degree), 'ill-posed' (times in a few clusters so
 *   close that doubles cannot tell the degrees apart), 'non-finite', 'not-increasing'
 * @example fitPolynomial(obs, 2).powers(obs.t[0]).coefficients // level, slope, half the curvature at the first point
 */
export function fitPolynomial(obs: Observations, degree: number): PolynomialFit {
  if (!(Number.isInteger(degree) && degree >= 0 && degree <= MAX_DEGREE)) {
    throw new BaselineError('bad-argument', `The degree is ${degree}; it must be an integer from 0 to ${MAX_DEGREE}.`);
  }
  const series = prepareSeries(obs);
  return new PolynomialFit({ method: 'polynomial', degree }, series, pullingTimes(series), degree === 0);
}

/**
 * The weighted mean as a baseline: no movement is taken out. One degree of freedom; the same at all times, with the standard error 1 / sqrt(sum w).
 * @param obs points; see Observations
 * @throws BaselineError as prepareSeries
 * @example fitConstant(obs).scoreLots() // each lot against the mean of all others
 */
export function fitConstant(obs: Observations): BaselineFit {
  const series = prepareSeries(obs);
  return new PolynomialFit({ method: 'constant' }, series, pullingTimes(series), true);
}

function scaledKnots(knots: Float64Array, { origin, range }: PullingTimes): Float64Array {
  const scaled = knots.map((knot) => (knot - origin) / range);
  for (let j = 0; j < knots.length; j++) {
    if (!Number.isFinite(knots[j])) throw new BaselineError('non-finite', `Knot ${j} is not finite.`);
    if (!(scaled[j] > (j > 0 ? scaled[j - 1] : 0) && scaled[j] < 1)) {
      throw new BaselineError(
        'bad-argument',
        `Knot ${j} at ${knots[j]} is not after the one before it and between the first and the last pulling time, ${origin} and ${origin + range}.`,
      );
    }
  }
  return scaled;
}
