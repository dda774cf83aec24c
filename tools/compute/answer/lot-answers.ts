import type { LotScores } from '@app/baseline';
import type { ArrangedSeries } from '../series/arranged';
import type { LotAnswer } from './answer';

const orNull = (value: number): number | null => (Number.isFinite(value) ? value : null);

/**
 * The named lots: residual r = mean of the deleted residuals of the rows that weigh, each counting once; variance = sigma^2 a' Cov a;
 * score = r / sqrt(variance), null where the residuals are only rounding. A lot whose rows all weigh nothing has the mean of its rows' residuals and no variance.
 */
export function lotAnswers(
  series: ArrangedSeries,
  scores: LotScores,
  deleted: Float64Array,
  { sigma2, factor, isRounding }: { sigma2: number; factor?: Float64Array; isRounding: boolean },
): LotAnswer[] {
  const { obs, homeLot, lotNames } = series;
  const sum = new Float64Array(lotNames.length);
  const count = new Float64Array(lotNames.length);
  const weighing = new Float64Array(lotNames.length);
  for (let i = 0; lotNames.length > 0 && i < homeLot.length; i++) {
    sum[homeLot[i]] += deleted[i];
    count[homeLot[i]]++;
    if (obs.lot[i] === homeLot[i]) weighing[homeLot[i]]++;
  }
  const isUndetermined = new Set(scores.undetermined);
  return lotNames.map((lot, j) => {
    const weight = factor ? { weight: factor[j] } : {};
    if (isUndetermined.has(j)) return { lot, residual: null, variance: null, score: null, ...weight };
    const residual = weighing[j] > 0 ? scores.residual[j] : sum[j] / count[j];
    const variance = weighing[j] > 0 ? sigma2 * scores.variance[j] : NaN;
    const score = variance > 0 && !isRounding ? residual / Math.sqrt(variance) : NaN;
    return { lot, residual: orNull(residual), variance: orNull(variance), score: orNull(score), ...weight };
  });
}
