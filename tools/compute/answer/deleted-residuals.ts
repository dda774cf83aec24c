import type { BaselineFit, LotScores } from '@app/baseline';
import type { ArrangedSeries } from '../series/arranged';

/**
 * Each point's residual from the fit without its whole lot, NaN for points of lots without which nothing is determined. A row of weight 0 that
 * belongs to a pulling lot is measured against the fit without that lot too: with e the deleted residuals of the lot's own points,
 * g(t) = g_without(t) + sum_i Cov(g(t), g(t_i)) w_i e_i, the gain of the lot's readings in terms of the posterior covariance
 * (Anderson & Moore 1979, Optimal Filtering, ch. 3).
 */
export function deletedResiduals(series: ArrangedSeries, fit: BaselineFit, scores: LotScores): Float64Array {
  const { obs, homeLot, homeCount } = series;
  const deleted = Float64Array.from(scores.deletedResidual);
  const isUndetermined = new Uint8Array(homeCount);
  for (const lot of scores.undetermined) if (lot < homeCount) isUndetermined[lot] = 1;
  const idleOf = new Map<number, number[]>();
  for (let i = 0; i < deleted.length; i++) {
    const home = homeLot[i];
    if (home < 0) continue;
    if (isUndetermined[home]) deleted[i] = NaN;
    else if (obs.lot[i] !== home) {
      const idle = idleOf.get(home);
      if (idle) idle.push(i);
      else idleOf.set(home, [i]);
    }
  }
  if (idleOf.size === 0) return deleted;
  for (let i = 0; i < deleted.length; i++) {
    const idle = idleOf.get(obs.lot[i]);
    const pull = obs.weight[i] * obs.pulls[obs.lot[i]];
    for (const k of idle ?? []) deleted[k] += fit.covariance(obs.t[k], obs.t[i]) * pull * scores.deletedResidual[i];
  }
  return deleted;
}
