import type { FilteredSeries } from './filtered-series';
import { multiply, type GainProducts } from './gain-products';
import { backwardGain, STATE_SIZE } from './information-state';
import { insertTime } from './inserted-time';

/**
 * Cov(g(s), g(t)) under all points, at sigma^2 = 1: with both times inserted as points without weight and s the earlier,
 * Cov(x_s, x_t) = G_s ... G_(t-1) P_t, G the backward gains from each point to the next and P_t = Var(x_t) (see GainProducts).
 * @param s, t any two times, s, in any order @throws BaselineError 'non-finite', 'ill-posed'
 */
export function timeCovariance(filtered: FilteredSeries, gains: GainProducts, s: number, t: number): number {
  const { obs, pull, timeScale, weightScale } = filtered.series;
  const early = insertTime(filtered, Math.min(s, t));
  const late = insertTime(filtered, Math.max(s, t));
  const { variance, covariance } = late.posterior;
  if (s === t) return variance / weightScale;
  const gain = new Float64Array(4);
  const isSameGap = early.next === late.next;
  const after = isSameGap ? late.t : obs.t[early.next];
  backwardGain(early.ahead, 0, 0, (after - early.t) / timeScale, filtered.q, gain, 0);
  if (!isSameGap) {
    const last = late.next - 1;
    const part = new Float64Array(4);
    gains.product(early.next, last, part);
    multiply(gain, 0, part, 0, gain, 0);
    const d = (late.t - obs.t[last]) / timeScale;
    backwardGain(filtered.forward, STATE_SIZE * last, pull[last], d, filtered.q, part, 0);
    multiply(gain, 0, part, 0, gain, 0);
  }
  return (gain[0] * variance + gain[1] * covariance) / weightScale;
}
