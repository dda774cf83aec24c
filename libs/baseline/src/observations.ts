import { BaselineError } from './baseline-error';

/** Points in non-decreasing time order. Points of lots may interleave in time, and lots may share a time. */
export interface Observations {
  /** Time of each point, seconds since 1970-01-01 UTC (any origin will do; gaps are formed from the raw stamps). */
  t: Float64Array;
  /** Value of each point. */
  y: Float64Array;
  /** Weight of each point, > 0, absolute: 1/variance, so that sigma^2 = 1. */
  weight: Float64Array;
  /** Lot index of each point, 0 .. lotCount-1. */
  lot: Int32Array;
  /** Per lot (length lotCount): the factor on its weights in the fit, 0 .. 1. 1 = pulls the fit, 0 = scored only, between: set down by robust reweighting. */
  pulls: Uint8Array | Float64Array;
}

/** Fewest distinct times of pulling points: with two, every smoothness gives the same line. */
export const MIN_DISTINCT_TIMES = 3;

/**
 * Checks sizes, finiteness, order, weights, lot indices and factors.
 * @throws BaselineError 'bad-argument' (sizes, lot index, weight <= 0, factor outside 0 .. 1), 'non-finite', 'not-increasing',
 *   'insufficient-data' (fewer than three distinct times of points that pull).
 */
export function checkObservations(obs: Observations): void {
  const { t, y, weight, lot, pulls } = obs;
  const n = t.length;
  if (y.length !== n || weight.length !== n || lot.length !== n) {
    throw new BaselineError(
      'bad-argument',
      `t, y, weight and lot differ in length: ${n}, ${y.length}, ${weight.length}, ${lot.length}.`,
    );
  }
  for (let j = 0; j < pulls.length; j++) {
    if (!(pulls[j] >= 0 && pulls[j] <= 1))
      throw new BaselineError(
        Number.isNaN(pulls[j]) ? 'non-finite' : 'bad-argument',
        `Lot ${j} pulls by ${pulls[j]}, which is not between 0 and 1.`,
      );
  }
  let distinct = 0;
  let last = -Infinity;
  for (let i = 0; i < n; i++) {
    if (!(Number.isFinite(t[i]) && Number.isFinite(y[i]) && Number.isFinite(weight[i]))) {
      throw new BaselineError('non-finite', `Point ${i} has a time, value or weight that is not finite.`);
    }
    if (i > 0 && !(t[i] >= t[i - 1]))
      throw new BaselineError('not-increasing', `Point ${i} is earlier than point ${i - 1}.`);
    if (!(weight[i] > 0)) throw new BaselineError('bad-argument', `The weight of point ${i} is not positive.`);
    if (!(lot[i] >= 0 && lot[i] < pulls.length))
      throw new BaselineError('bad-argument', `Point ${i} names lot ${lot[i]} of ${pulls.length}.`);
    if (pulls[lot[i]] > 0 && t[i] > last) {
      distinct++;
      last = t[i];
    }
  }
  if (distinct < MIN_DISTINCT_TIMES) {
    throw new BaselineError(
      'insufficient-data',
      `Points that pull have ${distinct} distinct times; ${MIN_DISTINCT_TIMES} are needed.`,
    );
  }
}
