import { BaselineError } from './baseline-error';
import type { BaselineFit, BaselineSpec } from './baseline-fit';
import type { Observations } from './observations';
import { fitBSpline, fitConstant, fitNaturalSpline, fitPolynomial } from './regression/fit-regression';
import { fitSmoothingSpline } from './spline/smoothing-spline';

/**
 * Fits the baseline that a specification names.
 * @param obs points; see Observations
 * @param spec method and its smoothness, knots or degree; see BaselineSpec for units
 * @throws BaselineError as the method's own function: {@link fitSmoothingSpline}, {@link fitNaturalSpline}, {@link fitBSpline}, {@link fitPolynomial},
 *   {@link fitConstant}; 'bad-argument' for a method there is not
 * @example fitBaseline(obs, { method: 'polynomial', degree: 2 }).edf // 3
 */
export function fitBaseline(obs: Observations, spec: BaselineSpec): BaselineFit {
  switch (spec.method) {
    case 'smoothing-spline':
      return fitSmoothingSpline(obs, spec.lambda);
    case 'natural-spline':
      return fitNaturalSpline(obs, spec.knots);
    case 'b-spline':
      return fitBSpline(obs, spec.knots);
    case 'polynomial':
      return fitPolynomial(obs, spec.degree);
    case 'constant':
      return fitConstant(obs);
    default:
      throw new BaselineError('bad-argument', `There is no method ${(spec as { method: string }).method}.`);
  }
}
