import { BaselineError } from '../baseline-error';
import type { BaselineFit, BaselineSpec } from '../baseline-fit';
import { fitBaseline } from '../fit-baseline';
import type { Observations } from '../observations';
import { placeKnots, type KnotPlacement } from '../regression/place-knots';
import type { ChooseBaselineOptions, ChosenBaseline, SmoothnessBound } from './chosen-baseline';
import {
  GCV_INFLATION,
  generalisedCrossValidation,
  leaveLotOutCriterion,
  type Candidate,
  type LotCriterion,
} from './criteria';
import { smoothestWithinOneStandardError } from './one-standard-error';
import { HIGHEST_DEGREE, regressionRange, type RegressionMethod, type RegressionRange } from './regression-range';
import { bestOf } from './search-lambda';

interface Tried extends Candidate {
  spec: BaselineSpec;
  standardError: number;
}

/** Chooses the number of knots or the degree by fitting every candidate, or takes the one that has the degrees of freedom asked for; see chooseBaseline. */
export function chooseRegression(
  obs: Observations,
  method: RegressionMethod,
  options: ChooseBaselineOptions,
): ChosenBaseline {
  const { rule, placement = 'quantile' } = options;
  if (rule === 'reml')
    throw new BaselineError(
      'bad-argument',
      'REML chooses the penalty of a smoothing spline; it does not compare unpenalised fits.',
    );
  const range = regressionRange(obs, method, options.shortestPeriodSeconds);
  if (rule === 'edf') return withEdf(obs, method, options.edf, placement, range);

  const curve: Tried[] = [];
  for (let smoothness = range.fewest; smoothness <= range.most; smoothness++) {
    const tried = determined(() => {
      return tryCandidate(obs, rule, specOf(obs, method, smoothness, placement, range), smoothness);
    });
    if (tried !== undefined) curve.push(tried);
  }
  const best = bestOf([...curve].reverse()) as Tried | undefined;
  if (best === undefined) throw new BaselineError('insufficient-data', 'No smoothness leaves anything to judge it by.');
  const smoother = curve.filter((c) => c.smoothness < best.smoothness).reverse();
  const chosen = options.hasOneStandardError
    ? (smoothestWithinOneStandardError(best, best.standardError, smoother) as Tried)
    : best;
  return {
    spec: chosen.spec,
    rule,
    smoothness: chosen.smoothness,
    edf: chosen.edf,
    criterion: { name: rule, value: chosen.value, curve: curve.map(candidate) },
    minima: curve.filter((_, i) => isLocalMinimum(curve, i)).map(candidate),
    ...where(chosen.smoothness, method, range),
    ...(options.hasOneStandardError
      ? { oneStandardError: { ...candidate(best), standardError: best.standardError } }
      : {}),
  };
}

function candidate({ smoothness, edf, value }: Candidate): Candidate {
  return { smoothness, edf, value };
}

/** Of a plateau only the smoothest is a minimum. */
function isLocalMinimum(curve: readonly Candidate[], i: number): boolean {
  const { value } = curve[i];
  return (i === 0 || value < curve[i - 1].value) && (i === curve.length - 1 || value <= curve[i + 1].value);
}

/** The spec of a candidate. */
function specOf(
  obs: Observations,
  method: RegressionMethod,
  smoothness: number,
  placement: KnotPlacement,
  range: RegressionRange,
): BaselineSpec {
  if (method === 'constant') return { method };
  if (method === 'polynomial') return { method, degree: smoothness };
  const { minimumSpacing } = range;
  return { method, knots: placeKnots(obs, smoothness, placement, { minimumSpacing }) };
}

/** A candidate's criterion; undefined when it is inadmissible: the points or the other lots do not determine it, or it leaves nothing to judge it by. */
function tryCandidate(
  obs: Observations,
  rule: 'lot-cv' | 'gcv' | 'gcv14',
  spec: BaselineSpec,
  smoothness: number,
): Tried | undefined {
  const fit = fitBaseline(obs, spec);
  const lots = criterionOf(obs, fit, rule);
  if (lots === undefined || !Number.isFinite(lots.value)) return undefined;
  return { spec, smoothness, edf: fit.edf, ...lots };
}

function criterionOf(obs: Observations, fit: BaselineFit, rule: 'lot-cv' | 'gcv' | 'gcv14'): LotCriterion | undefined {
  if (rule === 'lot-cv') return leaveLotOutCriterion(obs, fit.scoreLots(obs.weight));
  const inflation = rule === 'gcv14' ? GCV_INFLATION : 1;
  const value = generalisedCrossValidation(fit.pullCount, fit.weightedRss, fit.edf, inflation);
  return { value, standardError: 0 };
}

/** What a function answers, or undefined when the data do not determine it. */
function determined<T>(run: () => T): T | undefined {
  try {
    return run();
  } catch (error) {
    if (error instanceof BaselineError && (error.code === 'insufficient-data' || error.code === 'ill-posed'))
      return undefined;
    throw error;
  }
}

function withEdf(
  obs: Observations,
  method: RegressionMethod,
  edf: number | undefined,
  placement: KnotPlacement,
  range: RegressionRange,
): ChosenBaseline {
  const { fewest, edfOffset } = range;
  const unlimited = regressionRange(obs, method);
  const wanted = (edf ?? NaN) - edfOffset;
  if (!(Number.isInteger(wanted) && wanted >= fewest && wanted <= unlimited.most))
    throw new BaselineError(
      'bad-argument',
      `A ${method} has ${fewest + edfOffset} to ${unlimited.most + edfOffset} degrees of freedom here, in whole numbers.`,
    );
  const smoothness = Math.min(wanted, range.most);
  const spec = specOf(obs, method, smoothness, placement, range);
  const fit = fitBaseline(obs, spec);
  return {
    spec,
    rule: 'edf',
    smoothness,
    edf: fit.edf,
    criterion: { name: 'edf', value: fit.edf, curve: [] },
    minima: [],
    isAtFloor: smoothness < wanted,
    isAtBound: smoothness < wanted && smoothness === fewest && method !== 'b-spline' ? 'line' : null,
  };
}

function where(smoothness: number, method: RegressionMethod, range: RegressionRange) {
  const isAtMost = smoothness === range.most && method !== 'constant';
  return { isAtFloor: isAtMost && range.isMostByPeriod, isAtBound: boundOf(smoothness, method, range, isAtMost) };
}

function boundOf(
  smoothness: number,
  method: RegressionMethod,
  range: RegressionRange,
  isAtMost: boolean,
): SmoothnessBound | null {
  if (method === 'constant') return null;
  if (smoothness === range.fewest) return method === 'b-spline' ? 'no-knots' : 'line';
  if (!isAtMost || range.isMostByPeriod) return null;
  return method === 'polynomial' && smoothness === HIGHEST_DEGREE ? 'highest-degree' : 'most-knots';
}
