import { BaselineError } from '../baseline-error';
import type { FilteredSeries } from './filtered-series';
import { STATE_SIZE } from './information-state';

/**
 * A x = V W (I - S) x: the pulling weights times the residuals of another vector fitted with the same S. The forward matrices are those of the filtered series;
 * only the vectors h are carried through again (see information-state). x has its weighted line taken off first, which A does not see. O(n).
 * @param x one number a point, finite @returns raw weights * (x - S x); 0 for points that do not pull
 * @throws BaselineError 'bad-argument' (length), 'non-finite', 'ill-posed'
 */
export function residualProduct(filtered: FilteredSeries, x: Float64Array): Float64Array {
  const { n, pull, weightScale } = filtered.series;
  if (x.length !== n) throw new BaselineError('bad-argument', `The vector has ${x.length} entries for ${n} points.`);
  for (let i = 0; i < n; i++)
    if (!Number.isFinite(x[i])) throw new BaselineError('non-finite', `Entry ${i} of the vector is not finite.`);
  const r = withoutLine(filtered, x);
  const g = smooth(filtered, r);
  let sum = 0;
  for (let i = 0; i < n; i++) {
    g[i] = pull[i] > 0 ? pull[i] * weightScale * (r[i] - g[i]) : 0;
    sum += g[i];
  }
  if (!Number.isFinite(sum)) throw new BaselineError('ill-posed', 'The product leaves the range of double precision.');
  return g;
}

function withoutLine({ series }: FilteredSeries, x: Float64Array): Float64Array {
  const { n, pull, pullCount, obs, timeScale, lineTime } = series;
  const origin = obs.t[0] + lineTime;
  let level = 0;
  for (let i = 0; i < n; i++) level += (pull[i] / pullCount) * x[i];
  let suu = 0;
  let sux = 0;
  for (let i = 0; i < n; i++) {
    const u = (obs.t[i] - origin) / timeScale;
    suu += pull[i] * u * u;
    sux += pull[i] * u * (x[i] - level);
  }
  const slope = suu > 0 ? sux / suu : 0;
  return x.map((v, i) => v - level - (slope * (obs.t[i] - origin)) / timeScale);
}

/** S r for another vector r. */
function smooth({ series, q, forward }: FilteredSeries, r: Float64Array): Float64Array {
  const { n, gap, pull } = series;
  const g = new Float64Array(n);
  const h = new Float64Array(2 * n);
  let h0 = 0;
  let h1 = 0;
  for (let k = 0, i = 0; k + 1 < n; k++, i += STATE_SIZE) {
    const w = pull[k];
    const d = gap[k];
    const e = q * d;
    const c = forward[i + 2];
    const ad = (forward[i] + w) * d;
    const bd = forward[i + 1] * d;
    const ded = (forward[i + 3] + w * c) * e * d;
    const s = 1 / (1 + e * (c + d * (forward[i + 1] + ad * (1 / 3))) + (ded * e * d) / 12);
    const hh = h0 + w * r[k];
    h0 = ((1 + e * (c + 0.5 * bd)) * hh + e * (forward[i + 1] + 0.5 * ad) * h1) * s;
    h1 = ((1 - e * d * (0.5 * forward[i + 1] + ad * (1 / 6))) * h1 - d * (1 + e * (0.5 * c + bd * (1 / 6))) * hh) * s;
    h[2 * k + 2] = h0;
    h[2 * k + 3] = h1;
  }
  let a = 0;
  let b = 0;
  let c = 0;
  let det = 0;
  h0 = 0;
  h1 = 0;
  for (let k = n - 1, i = STATE_SIZE * k; k >= 0; k--, i -= STATE_SIZE) {
    const w = pull[k];
    const af = forward[i] + w;
    const bf = forward[i + 1];
    const cf = forward[i + 2];
    const total = forward[i + 3] + w * cf + det + af * c + a * cf + 2 * bf * b;
    g[k] = ((cf + c) * (h[2 * k] + w * r[k] + h0) + (bf - b) * (h[2 * k + 1] - h1)) / total;
    if (k === 0) break;
    const d = gap[k - 1];
    const e = q * d;
    a += w;
    det += w * c;
    const hh = h0 + w * r[k];
    const ad = a * d;
    const bd = b * d;
    const ded = det * e * d;
    const s = 1 / (1 + e * (c + d * (b + ad * (1 / 3))) + (ded * e * d) / 12);
    h0 = ((1 + e * (c + 0.5 * bd)) * hh + e * (b + 0.5 * ad) * h1) * s;
    h1 = ((1 - e * d * (0.5 * b + ad * (1 / 6))) * h1 - d * (1 + e * (0.5 * c + bd * (1 / 6))) * hh) * s;
    a = (a + det * e) * s;
    c = (c + d * (2 * b + ad + ded * (1 / 3))) * s;
    b = (b + ad + 0.5 * ded) * s;
    det *= s;
  }
  return g;
}
