import { BaselineError } from '../baseline-error';
import { lambdaForPeriod, pointDensity } from '../drift-period';
import type { BaselineFit } from '../baseline-fit';
import { fitBaseline } from '../fit-baseline';
import { checkObservations, type Observations } from '../observations';
import { prepareSeries, type PreparedSeries } from '../prepared-series';
import { fitPreparedSpline } from '../spline/smoothing-spline';
import { choosePenalty, penaltyWithEdf } from './choose-penalty';
import { chooseRegression } from './choose-regression';
import type { ChooseBaselineOptions, ChosenBaseline, SmoothnessRule } from './chosen-baseline';
import { GCV_INFLATION } from './criteria';
import type { PenaltyRule } from './exact-criterion';
import { KeptFit } from './kept-fit';
import { pullingTimes } from './regression-range';
import type { Evaluate } from './search-lambda';

/**
 * Chooses how smooth a baseline is: the penalty of a smoothing spline, the number of interior knots of a regression spline, the degree of a polynomial.
 *
 * Rules, each to be minimised:
 * - 'lot-cv', leave-one-lot-out cross-validation: (1/J) sum over the J pulling lots of W_j (sum_p w_p e_p / W_j)^2, e the lot's residuals from the baseline
 *   without it, W_j the sum of its weights in the fit: each lot's mean counts once, with the lot's weight (the rival, each point squared by itself, rewards
 *   following a lot's own level). With weights of 1 and lots of one point it is ordinary leave-one-out cross-validation.
 * - 'gcv': N RSS / (N - edf)^2 over the N pulling points (Craven & Wahba 1979, Numer. Math. 31:377); 'gcv14': N RSS / (N - 1.4 edf)^2, inadmissible once
 *   1.4 edf >= N (Kim & Gu 2004, J. R. Statist. Soc. B 66:337).
 * - 'reml': -2 log restricted likelihood (Wahba 1985, Ann. Statist. 13:1378); smoothing spline only.
 * - 'edf': nothing is minimised; the fit has the degrees of freedom asked for, for the smoothing spline to 1e-10.
 *
 * Smoothing spline: 25 penalties evenly spaced in log lambda, from the floor (without one: near interpolation) to the straight line, then Brent's method from
 * every local minimum among them, to 1e-4 of lambda; all are returned, the best decides. When the points lie on a line to rounding, no
 * criterion has a minimum, and the line is chosen. Regression: every number of knots up to 40 (degree 1 to 4) that the distinct times allow. Ties go to the smoother.
 * Candidates for which a pulling lot cannot be left out, or which the points do not determine, are left out of the curve.
 *
 * In series of more than 3,000 points GCV and REML are looked for on penalised cubic B-splines on equal intervals, at least 10 a degree of freedom, and the best is
 * then evaluated exactly: its edf and value are those of the exact fit. Against the exact search (4,000 to 20,000 points, even, in shifts and clustered) lambda
 * differs by less than 0.2 %, edf by less than 0.05 %, the criterion by less than 1e-9 of itself; values on the rest of the curve by less than 1e-5. The exact edf
 * must agree to 0.1 %, or the search is made exactly. Above 20,000 points penalties with more than 1,600 degrees of freedom are looked at only if the criterion
 * still falls there; the curve then ends before them. 'lot-cv' is exact at any length, and 'edf' polished exactly.
 *
 * With a shortest drift period T, lambda is at least kappa (T/2 pi)^4 (see lambdaForPeriod; kappa from the weights as given, over all points) and the number of
 * knots at most 2 window/T - 1, at least T/2 apart (degree at most 2 window/T); when T exceeds the window, the answer is the straight line (for a b-spline, which
 * has none, the polynomial of degree 1). isAtFloor says that this decided.
 * @param obs points; see Observations. Lots that do not pull take no part
 * @param options see ChooseBaselineOptions; times in the unit of obs.t
 * @returns the spec to fit, and how it came about; every number in it is finite except lambda = Infinity for the straight line
 * @throws BaselineError as fitBaseline; 'bad-argument' for options that do not go together; 'insufficient-data' when there is no admissible candidate
 * @example
 * const chosen = chooseBaseline(obs, { method: 'smoothing-spline', rule: 'lot-cv', shortestPeriodSeconds: 3 * 86400 });
 * const fit = fitBaseline(obs, chosen.spec);
 */
export function chooseBaseline(obs: Observations, options: ChooseBaselineOptions): ChosenBaseline {
  checkOptions(options);
  const { method, rule, shortestPeriodSeconds: period } = options;
  if (method === 'smoothing-spline') return chooseSmoothingSpline(prepareSeries(obs), options);
  checkObservations(obs);
  const isLine = period !== undefined && period > pullingTimes(obs).window;
  if (!(isLine && method === 'b-spline')) return chooseRegression(obs, method, options);
  const found = chooseRegression(obs, 'polynomial', rule === 'edf' ? { ...options, edf: 2 } : options);
  return { ...found, isAtFloor: true, isAtBound: 'line' };
}

/**
 * Chooses as {@link chooseBaseline} and fits what was chosen. For a long series this is faster than one after the other: its points are checked and scaled
 * once, and the exact evaluation at the best penalty is the fit.
 * @param obs points; see Observations @param options see ChooseBaselineOptions
 * @returns the choice, and the fit of its spec
 * @throws BaselineError as chooseBaseline and fitBaseline
 * @example const { fit, chosen } = chooseAndFit(obs, { method: 'smoothing-spline', rule: 'gcv' });
 */
export function chooseAndFit(
  obs: Observations,
  options: ChooseBaselineOptions,
): { chosen: ChosenBaseline; fit: BaselineFit } {
  if (options.method !== 'smoothing-spline') {
    const chosen = chooseBaseline(obs, options);
    return { chosen, fit: fitBaseline(obs, chosen.spec) };
  }
  checkOptions(options);
  const series = prepareSeries(obs);
  const rule = options.rule === 'edf' ? undefined : penaltyRule(options);
  if (rule === undefined || rule.rule === 'lot-cv') {
    const chosen = chooseSmoothingSpline(series, options);
    return { chosen, fit: fitPreparedSpline(series, chosen.smoothness) };
  }
  const kept = new KeptFit(series, rule);
  const chosen = chooseSmoothingSpline(series, options, (lambda) => kept.evaluate(lambda));
  return { chosen, fit: kept.at(chosen.smoothness) };
}

function chooseSmoothingSpline(
  series: PreparedSeries,
  options: ChooseBaselineOptions,
  atBest?: Evaluate,
): ChosenBaseline {
  const { rule, edf, floorLambda = 0, shortestPeriodSeconds, hasOneStandardError } = options;
  const { obs } = series;
  const isLine = shortestPeriodSeconds !== undefined && shortestPeriodSeconds > pullingTimes(obs).window;
  const floor = isLine ? Infinity : Math.max(floorLambda, periodFloor(obs, shortestPeriodSeconds));
  if (rule === 'edf') {
    const found = penaltyWithEdf(series, edf ?? NaN, pullingTimes(obs).distinct, floor);
    return {
      spec: { method: 'smoothing-spline', lambda: found.lambda },
      rule,
      smoothness: found.lambda,
      edf: found.edf,
      criterion: { name: rule, value: found.edf, curve: [] },
      minima: [],
      isAtFloor: found.isAtFloor,
      isAtBound: found.lambda === Infinity ? 'line' : null,
    };
  }
  const found = choosePenalty(series, penaltyRule(options), floor, hasOneStandardError, atBest);
  const { chosen, curve, minima, isAtFloor, isAtBound, oneStandardError } = found;
  return {
    spec: { method: 'smoothing-spline', lambda: chosen.smoothness },
    rule,
    smoothness: chosen.smoothness,
    edf: chosen.edf,
    criterion: { name: rule, value: chosen.value, curve },
    minima,
    isAtFloor,
    isAtBound,
    ...(oneStandardError === undefined ? {} : { oneStandardError }),
  };
}

function periodFloor({ t, weight }: Observations, period: number | undefined): number {
  return period === undefined ? 0 : lambdaForPeriod(pointDensity(t, weight, period), period);
}

function penaltyRule({ rule, remlVariance = 'known' }: ChooseBaselineOptions): PenaltyRule {
  if (rule === 'reml') return { rule, variance: remlVariance };
  if (rule === 'gcv') return { rule, inflation: 1 };
  return rule === 'gcv14' ? { rule: 'gcv', inflation: GCV_INFLATION } : { rule: 'lot-cv' };
}

const RULES: readonly SmoothnessRule[] = ['lot-cv', 'gcv', 'gcv14', 'reml', 'edf'];

function checkOptions(options: ChooseBaselineOptions): void {
  const { method, rule, edf, floorLambda, hasOneStandardError } = options;
  if (!RULES.includes(rule)) throw new BaselineError('bad-argument', `There is no rule ${String(rule)}.`);
  const refuse = (message: string) => {
    throw new BaselineError('bad-argument', message);
  };
  if (hasOneStandardError && rule !== 'lot-cv')
    refuse("The one-standard-error rule goes with 'lot-cv': the other criteria are not means over lots.");
  if (rule === 'edf' && edf === undefined) refuse("The rule 'edf' needs the degrees of freedom.");
  if (rule !== 'edf' && edf !== undefined)
    refuse(`The rule '${rule}' finds the degrees of freedom; they cannot be given.`);
  if (floorLambda !== undefined && method !== 'smoothing-spline')
    refuse(`A ${method} has no lambda that a floor could bind.`);
}
