import { BaselineError } from '../baseline-error';
import { LotDeleter, type FilteredSeries } from '../spline/deleted-lots';
import { combine, filterBothWays, STATE_SIZE, type Posterior } from '../spline/information-filter';
import { minimiseInside } from './minimise';
import type { Observations } from '../observations';
import { prepareSeries, type PreparedSeries } from '../prepared-series';
import { scaledInverse } from '../spline/smoothing-spline';
import { restrictedDeviance } from '../spline/spline-criteria';

/** How the smoothness is chosen: leave-one-lot-out cross-validation, generalised cross-validation, restricted maximum likelihood. */
export type LambdaRule = 'lot-cv' | 'gcv' | 'reml';

export interface ChooseLambdaOptions {
  rule: LambdaRule;
  /** Smallest lambda allowed (weight * s^3): that of the shortest drift period. 0: none. */
  floorLambda: number;
  /** Inflation gamma of GCV (default 1; 1.4: Kim & Gu 2004, JRSS B 66:337). */
  gcvInflation?: number;
  /** For REML: sigma^2 = 1, since the weights are absolute (default), or estimated with lambda. */
  remlVariance?: 'known' | 'estimated';
}

export interface ChosenLambda {
  lambda: number;
  /** The rule's value there. */
  criterion: number;
  /** The grid that was looked at, in increasing lambda. */
  curve: { lambda: number; edf: number; value: number }[];
  /** The floor decided. */
  isAtFloor: boolean;
  /** The straight line (or, without a floor, near interpolation) decided: the criterion has no minimum inside. */
  isAtBound: boolean;
}

/** Points of the grid in log lambda before Brent's method refines the best. */
const GRID_POINTS = 25;
/** Precision of log lambda: 0.01 % of lambda moves no fitted value by more than 3e-5 of the part that is smoothed away. */
const LOG_TOLERANCE = 1e-4;
/** At lambda = 10 * (sum w) * range^3 the fit has 2.0003 degrees of freedom (free beam: sum of 1/mu_j = 1/500.6 + 1/3804 + ... = 0.0024). */
const LINE_LAMBDA = 10;
/** At lambda = 0.001 of a point's weight times the cubed spacing, an even series is interpolated. */
const INTERPOLATION_LAMBDA = 1e-3;
/** A line that leaves less than (1e-14)^2 of the sum of squares leaves rounding only. */
const EXACT_LINE_SHARE = 1e-28;

/**
 * Chooses the penalty of the smoothing spline, never below a floor.
 *
 * - 'lot-cv': sum over pulling lots of W_j (sum_p w_p e_p / W_j)^2, e the lot's residuals from the baseline without it, W_j the sum of its weights:
 *   each lot's mean counts once, with the lot's weight (the rival, each point squared by itself, rewards following a lot's own level).
 * - 'gcv': N RSS / (N - gamma edf)^2 over the N pulling points, +Infinity once gamma edf >= N (Craven & Wahba 1979, Numer. Math. 31:377).
 * - 'reml': -2 log restricted likelihood (Wahba 1985, Ann. Statist. 13:1378).
 *
 * Looks at 25 points in log lambda between the floor and the straight line, then refines the best by Brent's method: the criteria can have several
 * minima. Every evaluation is exact and O(n) (plus, for lots that interleave with others, the spans they cover). When the points lie on
 * a line to rounding, no criterion has a minimum, and the line is chosen.
 * @throws BaselineError as fitSmoothingSpline; 'bad-argument' for a negative floor or inflation below 1; 'insufficient-data' for 'lot-cv'
 *   when a lot holds all but one of the distinct times
 * @example chooseLambda(obs, { rule: 'lot-cv', floorLambda: lambdaForPeriod(kappa, T) })
 */
export function chooseLambda(obs: Observations, options: ChooseLambdaOptions): ChosenLambda {
  const { floorLambda, gcvInflation = 1 } = options;
  if (!(floorLambda >= 0))
    throw new BaselineError(
      Number.isNaN(floorLambda) ? 'non-finite' : 'bad-argument',
      'The floor must not be negative.',
    );
  if (!(gcvInflation >= 1 && gcvInflation < Infinity))
    throw new BaselineError('bad-argument', 'The inflation must be at least 1.');
  const series = prepareSeries(obs);
  const evaluate = evaluator(series, options);
  const cube = series.timeScale ** 3;
  const high = LINE_LAMBDA * series.totalWeight * cube;
  const low = floorLambda > 0 ? floorLambda : (INTERPOLATION_LAMBDA * high) / (LINE_LAMBDA * series.pullCount ** 4);
  if (low >= high) {
    const { value, edf } = evaluate(low);
    return { lambda: low, criterion: value, curve: [{ lambda: low, edf, value }], isAtFloor: true, isAtBound: true };
  }
  const curve = Array.from({ length: GRID_POINTS }, (_, i) => {
    const lambda = i === 0 ? low : i === GRID_POINTS - 1 ? high : low * (high / low) ** (i / (GRID_POINTS - 1));
    return { lambda, ...evaluate(lambda) };
  });
  const isLine = series.lineRss <= EXACT_LINE_SHARE * series.sumSquares;
  const best = isLine ? GRID_POINTS - 1 : smallest(curve);
  if (isLine) return { lambda: high, criterion: curve[best].value, curve, isAtFloor: false, isAtBound: true };
  const from = Math.log(curve[Math.max(0, best - 1)].lambda);
  const to = Math.log(curve[Math.min(GRID_POINTS - 1, best + 1)].lambda);
  const refined = minimiseInside((x) => evaluate(Math.exp(x)).value, from, to, LOG_TOLERANCE);
  const isInside = refined.value < curve[best].value;
  const lambda = isInside ? Math.min(high, Math.max(low, Math.exp(refined.x))) : curve[best].lambda;
  const isAtLow = lambda <= low * (1 + 4 * LOG_TOLERANCE);
  return {
    lambda: isAtLow ? low : lambda,
    criterion: isAtLow ? curve[0].value : isInside ? refined.value : curve[best].value,
    curve,
    isAtFloor: isAtLow && floorLambda > 0,
    isAtBound: lambda >= high * (1 - 4 * LOG_TOLERANCE) || (isAtLow && floorLambda === 0),
  };
}

/** Index of the smallest value; of equal ones the smoothest. */
function smallest(curve: { value: number }[]): number {
  let best = 0;
  for (let i = 1; i < curve.length; i++) if (curve[i].value <= curve[best].value) best = i;
  return best;
}

/** The rule as a function of lambda, with buffers of its own. */
function evaluator(
  series: PreparedSeries,
  options: ChooseLambdaOptions,
): (lambda: number) => { edf: number; value: number } {
  const { n, gap, pull, r } = series;
  const filtered: FilteredSeries = {
    series,
    q: 0,
    forward: new Float64Array(STATE_SIZE * n),
    backward: new Float64Array(STATE_SIZE * n),
  };
  const deleter = new LotDeleter(filtered);
  return (lambda) => {
    filtered.q = scaledInverse(series, lambda);
    const logDelta = filterBothWays(gap, pull, r, filtered.q, filtered.forward, filtered.backward);
    const { edf, rss } = summarise(filtered);
    const value = criterion(filtered, deleter, options, edf, rss, logDelta);
    if (!Number.isFinite(edf) || Number.isNaN(value)) {
      throw new BaselineError('ill-posed', `With lambda ${lambda} the fit leaves the range of double precision.`);
    }
    return { edf, value };
  };
}

function criterion(
  filtered: FilteredSeries,
  deleter: LotDeleter,
  options: ChooseLambdaOptions,
  edf: number,
  rss: number,
  logDelta: number,
): number {
  const { series } = filtered;
  if (options.rule === 'lot-cv') return lotCrossValidation(series, deleter);
  if (options.rule === 'reml') return restrictedDeviance(filtered, logDelta)[options.remlVariance ?? 'known'];
  const rest = series.pullCount - (options.gcvInflation ?? 1) * edf;
  return rest > 0 ? (series.pullCount * rss * series.weightScale) / (rest * rest) : Infinity;
}

function summarise({ series, forward, backward }: FilteredSeries): { edf: number; rss: number } {
  const { n, pull, r } = series;
  const p: Posterior = { value: 0, slope: 0, variance: 0, covariance: 0, slopeVariance: 0 };
  let edf = 0;
  let rss = 0;
  for (let k = 0, i = 0; k < n; k++, i += STATE_SIZE) {
    const w = pull[k];
    if (w === 0) continue;
    combine(forward, i, backward, i, w, w * r[k], p);
    edf += w * p.variance;
    rss += w * (r[k] - p.value) * (r[k] - p.value);
  }
  return { edf, rss };
}

function lotCrossValidation(series: PreparedSeries, deleter: LotDeleter): number {
  const { pull, pointsByLot, lotStart, weightScale } = series;
  let total = 0;
  for (let lot = 0; lot + 1 < lotStart.length; lot++) {
    if (lotStart[lot + 1] === lotStart[lot] || pull[pointsByLot[lotStart[lot]]] === 0) continue;
    let weight = 0;
    for (let s = lotStart[lot]; s < lotStart[lot + 1]; s++) weight += pull[pointsByLot[s]];
    const mean = deleter.meanResidual(lot);
    total += weight * mean * mean;
  }
  return total * weightScale;
}
