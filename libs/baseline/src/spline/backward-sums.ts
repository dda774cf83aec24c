import type { PreparedSeries } from '../prepared-series';
import { STATE_SIZE } from './information-state';

/**
 * Adds what the points from .. to-1 contribute to edf, RSS and PRSS (the latter as the squared standardised prediction errors of the forward pass, whose sum is
 * RSS + alpha * integral g''^2; all in scaled weights), carrying the
 * information of later points backwards.
 * @param states before the points, that of `from` first @param later state after point to-1; receives that before `from`
 */
export function addBackward(
  series: PreparedSeries,
  q: number,
  from: number,
  to: number,
  states: Float64Array,
  later: Float64Array,
  sums: Float64Array,
): void {
  const { gap, pull, r } = series;
  let a = later[0];
  let b = later[1];
  let c = later[2];
  let det = later[3];
  let h0 = later[4];
  let h1 = later[5];
  let edf = sums[0];
  let rss = sums[1];
  let prss = sums[2];
  for (let k = to - 1, i = STATE_SIZE * (k - from); k >= from; k--, i -= STATE_SIZE) {
    const w = pull[k];
    const y = r[k];
    if (w > 0) {
      const af = states[i];
      const bf = states[i + 1];
      const cf = states[i + 2];
      const df = states[i + 3];
      const f0 = states[i + 4];
      const f1 = states[i + 5];
      const own = df + w * cf;
      const total = own + det + (af + w) * c + a * cf + 2 * bf * b;
      const scale = 1 / total;
      const both = cf + c;
      const e = y - (both * (f0 + w * y + h0) + (bf - b) * (f1 - h1)) * scale;
      edf += w * both * scale;
      rss += w * e * e;
      if (df > 0) {
        const v = y - (cf * f0 + bf * f1) / df;
        prss += w * (df / own) * v * v;
      } else if (af > 0 && !(cf > 0)) {
        const v = y - f0 / af;
        prss += w * (af / (af + w)) * v * v;
      }
    }
    if (k === 0) break;
    const d = gap[k - 1];
    const eq = q * d;
    a += w;
    det += w * c;
    h0 += w * y;
    const ad = a * d;
    const bd = b * d;
    const de = det * eq;
    const ded = de * d;
    const s = 1 / (1 + eq * (c + d * (b + ad * (1 / 3))) + (ded * eq * d) / 12);
    const h = h0;
    h0 = ((1 + eq * (c + 0.5 * bd)) * h + eq * (b + 0.5 * ad) * h1) * s;
    h1 = ((1 - eq * d * (0.5 * b + ad * (1 / 6))) * h1 - d * (1 + eq * (0.5 * c + bd * (1 / 6))) * h) * s;
    a = (a + de) * s;
    c = (c + d * (2 * b + ad + ded * (1 / 3))) * s;
    b = (b + ad + 0.5 * ded) * s;
    det *= s;
  }
  later[0] = a;
  later[1] = b;
  later[2] = c;
  later[3] = det;
  later[4] = h0;
  later[5] = h1;
  sums[0] = edf;
  sums[1] = rss;
  sums[2] = prss;
}
