import { BaselineError } from '../baseline-error';
import type { BaselineFit, BaselineSpec, LotScores } from '../baseline-fit';
import { fitBaseline } from '../fit-baseline';
import { checkObservations, type Observations } from '../observations';
import { bisquareFactor, medianAbsolute, NORMAL_PER_MEDIAN, startFactor } from './bisquare';
import { refitKeeping } from './refit-keeping';

export interface FitRobustOptions {
  /** Weight of each point in its lot's mean (readings it stands for); default: all alike. */
  count?: Float64Array;
  /** Most refits, those of the start included; default 25. */
  maxPasses?: number;
}

/** A baseline that lots far from it do not pull. */
export interface RobustFit {
  /** With the factors in its lots' pulls. */
  fit: BaselineFit;
  /** By lot, 0 .. 1: what its given pull was multiplied by. 1 for lots that do not pull, are empty, or were kept. */
  factor: Float64Array;
  /** Lots whose factor is 0, in order. */
  setDown: number[];
  /** Pulling lots kept in full since without them the others determine no baseline. */
  kept: number[];
  /** Refits after the first fit. */
  passes: number;
  /** The last pass changed no factor by more than 1e-6. */
  hasConverged: boolean;
  /** s of the last pass, in the unit of the scores; 0 where more than half the lots lie on the baseline, so that no lot was reweighted. */
  scale: number;
}

const MAX_PASSES = 25;
/** Refits of the start. Five bring a baseline back to the 70 % from 30 % of lots far off on one side. */
const START_PASSES = 5;
/** Largest change of a factor that counts as none. */
const FACTOR_TOLERANCE = 1e-6;
/** A scale below this share of the values' own size, in scores, is rounding: the lots lie on the baseline. */
const ROUNDING_SHARE = 1e-12;

/**
 * Fits a baseline by bisquare reweighting of whole lots, at one smoothness.
 *
 * Each pass scores every pulling lot against the baseline without it, z_j = r_j / sqrt(Var r_j), sets
 *
 *   s = 1.4826 median |z_j|,   v_j = (1 - (z_j / (4.685 s))^2)^2, 0 beyond 4.685 s
 *
 * (Beaton & Tukey 1974, Technometrics 16:147; 4.685: Holland & Welsch 1977, Commun. Statist. A 6:813), and refits with v_j times the lot's given pull, until
 * no factor changes by more than 1e-6 or 25 refits are made; hasConverged says which. Deleted scores are used, not residuals: a lot cannot hide by pulling
 * the baseline to itself. A lot is judged as one, by its mean: the readings within it are not reweighted.
 * The median is taken about 0, the baseline, not about its own value: at least half the lots then keep a factor above 0.95.
 *
 * As all redescending weights do, these depend on where they start. The first five refits use v_j = min(1, median / |z|), close to least absolute values: from
 * there, 30 % of lots shifted to one side, scattered in time, are set down; 40 % are not, nor is a stretch longer than the baseline's memory.
 *
 * Lots without which the others determine no baseline are kept in full, of several the nearest to the baseline. When s is 0 to rounding (more than half the lots
 * on the baseline exactly), nothing is reweighted: scale is 0. A lot's own variance stays that of its points: its factor says how much it pulls, not how
 * precise it is.
 * @param obs points; see Observations. Lots that do not pull stay so
 * @param baseline what to fit: a spec, or a function that fits it (at the same smoothness at each call)
 * @returns the fit with its factors, deterministically: the same points give the same bits
 * @throws BaselineError as fitBaseline; 'bad-argument' for maxPasses below 1
 * @example fitRobust(obs, chooseBaseline(obs, { method: 'smoothing-spline', rule: 'lot-cv' }).spec).setDown
 */
export function fitRobust(
  obs: Observations,
  baseline: BaselineSpec | ((obs: Observations) => BaselineFit),
  options: FitRobustOptions = {},
): RobustFit {
  const { maxPasses = MAX_PASSES, count } = options;
  if (!(Number.isInteger(maxPasses) && maxPasses >= 1))
    throw new BaselineError('bad-argument', 'At least one pass is needed.');
  checkObservations(obs);
  const refit = typeof baseline === 'function' ? baseline : (changed: Observations) => fitBaseline(changed, baseline);
  const kept = new Set<number>();
  let factor = new Float64Array(obs.pulls.length).fill(1);
  let fit = refit(obs);
  let passes = 0;
  for (;;) {
    const { z, judged, rounding } = standardise(obs, fit.scoreLots(count), kept);
    const scale = NORMAL_PER_MEDIAN * medianAbsolute(Float64Array.from(judged, (j) => z[j]));
    if (!(scale > rounding)) return result(passes > 0 ? refit(obs) : fit, factor.fill(1), kept, passes, true, 0);
    const isStart = passes < START_PASSES;
    const wanted = new Float64Array(factor.length).fill(1);
    for (const j of judged) wanted[j] = isStart ? startFactor(z[j], scale) : bisquareFactor(z[j], scale);
    const hasConverged = !isStart && wanted.every((v, j) => Math.abs(v - factor[j]) <= FACTOR_TOLERANCE);
    if (hasConverged || passes === maxPasses) return result(fit, factor, kept, passes, hasConverged, scale);
    fit = refitKeeping(obs, refit, wanted, z, kept);
    factor = wanted;
    passes++;
  }
}

function result(
  fit: BaselineFit,
  factor: Float64Array,
  kept: Set<number>,
  passes: number,
  hasConverged: boolean,
  scale: number,
): RobustFit {
  const setDown = Array.from(factor.keys()).filter((j) => factor[j] === 0);
  return { fit, factor, setDown, kept: [...kept].sort((a, b) => a - b), passes, hasConverged, scale };
}

/**
 * Scores of the lots that pull and can be left out, none of them kept; the others that pull join `kept`. rounding: the score of a residual that is only rounding of the values.
 */
function standardise(obs: Observations, scores: LotScores, kept: Set<number>) {
  const { residual, variance, undetermined } = scores;
  for (const j of undetermined) if (obs.pulls[j] > 0) kept.add(j);
  const z = new Float64Array(obs.pulls.length);
  const judged: number[] = [];
  let smallest = Infinity;
  for (let j = 0; j < z.length; j++) {
    if (!(obs.pulls[j] > 0 && variance[j] < Infinity) || kept.has(j)) continue;
    z[j] = residual[j] / Math.sqrt(variance[j]);
    smallest = Math.min(smallest, variance[j]);
    judged.push(j);
  }
  const size = obs.y.reduce((most, y) => Math.max(most, Math.abs(y)), 0);
  return { z, judged: Int32Array.from(judged), rounding: (ROUNDING_SHARE * size) / Math.sqrt(smallest) };
}
