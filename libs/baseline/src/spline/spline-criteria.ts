import type { FilteredSeries } from './deleted-lots';
import { combine, STATE_SIZE, type Posterior } from './information-filter';

/**
 * Integral of g''^2, exactly, gap by gap: with e = x_(k+1) - F x_k the integral over a gap d is 12 e0^2/d^3 - 12 e0 e1/d^2 + 4 e1^2/d.
 * Where the penalty is large against the information times d^2 the same is taken from the costate p = L x - h (e = Q p), which does not
 * difference neighbouring values.
 * @returns value^2 / s^3 (raw time)
 */
export function penaltyIntegral({ series, q, forward, backward }: FilteredSeries): number {
  const { n, gap, pull, r, timeScale } = series;
  if (!(q > 0)) return 0;
  const p: Posterior = { value: 0, slope: 0, variance: 0, covariance: 0, slopeVariance: 0 };
  let integral = 0;
  let value = 0;
  let slope = 0;
  for (let k = 0; k < n; k++) {
    const i = STATE_SIZE * k;
    combine(forward, i, backward, i, pull[k], pull[k] * r[k], p);
    const d = k > 0 ? gap[k - 1] : 0;
    if (d > 0) {
      const a = forward[i];
      if (a * d * d * q < 1) {
        const b = forward[i + 1];
        const p0 = a * p.value - b * p.slope - forward[i + 4];
        const p1 = forward[i + 2] * p.slope - b * p.value - forward[i + 5];
        integral += q * q * d * ((p0 * p0 * d * d) / 3 + p0 * p1 * d + p1 * p1);
      } else {
        const e0 = (p.value - value - d * slope) / d;
        const e1 = p.slope - slope;
        integral += (12 * e0 * e0 - 12 * e0 * e1 + 4 * e1 * e1) / d;
      }
    }
    value = p.value;
    slope = p.slope;
  }
  return Math.max(0, integral) / (timeScale * timeScale * timeScale);
}

/**
 * -2 log restricted likelihood (Wahba 1985, Ann. Statist. 13:1378) up to a constant: the forward filter's
 * log D_n + sum log delta equals log|A| - (n - 2) log lambda + const, and its prediction errors give PRSS = RSS + lambda * integral g''^2.
 * @returns known: PRSS + log-determinant (sigma^2 = 1); estimated: (N - 2) log(PRSS/(N - 2)) + log-determinant (sigma^2 profiled out); N pulling points
 */
export function restrictedDeviance(
  { series, forward }: Pick<FilteredSeries, 'series' | 'forward'>,
  logDelta: number,
): { known: number; estimated: number; prss: number } {
  const { n, pull, r, weightScale, pullCount } = series;
  let prss = 0;
  for (let k = 0, i = 0; k < n; k++, i += STATE_SIZE) {
    const w = pull[k];
    if (w === 0) continue;
    const a = forward[i];
    const c = forward[i + 2];
    const det = forward[i + 3];
    if (det > 0) {
      const v = r[k] - (c * forward[i + 4] + forward[i + 1] * forward[i + 5]) / det;
      prss += w * (det / (det + w * c)) * v * v;
    } else if (a > 0 && !(c > 0)) {
      const v = r[k] - forward[i + 4] / a;
      prss += w * (a / (a + w)) * v * v;
    }
  }
  const last = STATE_SIZE * (n - 1);
  const logDet = Math.log(forward[last + 3] + pull[n - 1] * forward[last + 2]) + logDelta;
  const rest = pullCount - 2;
  return {
    known: prss * weightScale + logDet,
    estimated: rest > 0 ? rest * Math.log((prss * weightScale) / rest) + logDet : logDet,
    prss: prss * weightScale,
  };
}
