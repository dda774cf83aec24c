import { BaselineError } from '../baseline-error';
import type { LotScores } from '../baseline-fit';
import type { FilteredSeries } from './filtered-series';
import { LotDeleter } from './lot-deletion';

// Looked up once, as in smoothing-pass.
const { abs } = Math;

/** From this leverage on, the residual without a point is worked out without it: 1 - h loses digits. */
const LARGE_LEVERAGE = 0.5;

/**
 * Every lot against the fit without it. A lot of one point with leverage h below a half: e = (y - g)/(1 - h), Var = 1/weight + C/(1 - h), with C the posterior
 * variance of g there and h = factor * weight * C (also for factors below 1, 0 included); all others by LotDeleter.
 * @param fit the fit with all pulling lots @param count weight of each point in its lot's mean, >= 0, a positive sum in each lot
 * @throws BaselineError 'bad-argument', 'non-finite' for counts, 'ill-posed'
 */
export function scoreLots(
  filtered: FilteredSeries,
  fit: { fitted: Float64Array; standardError: Float64Array; leverage: Float64Array },
  count?: Float64Array,
): LotScores {
  const { n, obs, pointsByLot, lotStart } = filtered.series;
  if (count !== undefined) checkCounts(filtered, count);
  const lotCount = obs.pulls.length;
  const deletedResidual = new Float64Array(n);
  const residual = new Float64Array(lotCount);
  const variance = new Float64Array(lotCount).fill(Infinity);
  const undetermined: number[] = [];
  const deleter = new LotDeleter(filtered);
  for (let lot = 0; lot < lotCount; lot++) {
    const from = lotStart[lot];
    const m = lotStart[lot + 1] - from;
    if (m === 0) continue;
    const i = pointsByLot[from];
    if (m === 1 && fit.leverage[i] < LARGE_LEVERAGE) {
      const s = 1 / (1 - fit.leverage[i]);
      residual[lot] = deletedResidual[i] = (obs.y[i] - fit.fitted[i]) * s;
      variance[lot] = 1 / obs.weight[i] + fit.standardError[i] * fit.standardError[i] * s;
    } else if (deleter.score(lot, count)) {
      for (let s = 0; s < m; s++) deletedResidual[pointsByLot[from + s]] = deleter.residual[s];
      residual[lot] = deleter.mean;
      variance[lot] = deleter.variance;
    } else {
      undetermined.push(lot);
      continue;
    }
    if (!(abs(residual[lot] + variance[lot]) < Infinity))
      throw new BaselineError('ill-posed', `Without lot ${lot} the fit leaves the range of double precision.`);
  }
  return { deletedResidual, residual, variance, undetermined };
}

function checkCounts({ series }: FilteredSeries, count: Float64Array): void {
  const { n, pointsByLot, lotStart } = series;
  if (count.length !== n) throw new BaselineError('bad-argument', `There are ${count.length} counts for ${n} points.`);
  for (let lot = 0; lot + 1 < lotStart.length; lot++) {
    let total = 0;
    for (let s = lotStart[lot]; s < lotStart[lot + 1]; s++) {
      const c = count[pointsByLot[s]];
      if (!Number.isFinite(c))
        throw new BaselineError('non-finite', `The count of point ${pointsByLot[s]} is not finite.`);
      if (c < 0) throw new BaselineError('bad-argument', `The count of point ${pointsByLot[s]} is negative.`);
      total += c;
    }
    if (lotStart[lot] < lotStart[lot + 1] && !(total > 0 && total < Infinity))
      throw new BaselineError('bad-argument', `The counts of lot ${lot} have no usable sum.`);
  }
}
