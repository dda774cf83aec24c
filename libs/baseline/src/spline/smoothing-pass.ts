import { STATE_SIZE } from './information-state';
import type { PreparedSeries } from '../prepared-series';

// Looked up once: a look-up of Math for every point costs more than the arithmetic where globals are intercepted.
const { abs, sqrt } = Math;

/** What a pass writes: a number a point, in raw units (see BaselineFit). */
export interface SmoothedPoints {
  fitted: Float64Array;
  slope: Float64Array;
  curvature: Float64Array;
  standardError: Float64Array;
  leverage: Float64Array;
}

/** What is carried from a point to the one before it: the backward state, sums so far, and value, slope, curvature there. */
export interface BackwardCarry {
  state: Float64Array;
  /** tr S. */
  edf: number;
  /** Sum of scaled weight * (r - g)^2. */
  rss: number;
  /** Integral of g''^2 over scaled time. */
  penalty: number;
  value: number;
  slope: number;
  bend: number;
  bendSize: number;
}

/**
 * Carries the information of later points backwards over the points to-1 .. from, combines it at each with the stored forward state and writes the fit.
 *
 * Curvature. The Wiener process that drives g' has at the best path the derivative g'' = q (p1 + p0 (t_k - s)) in the gap before point k, with
 * the costate p = L x - h from the information (L, h) before point k: so g'' = q p1 at the points, linear between them, and 0 where one side says
 * nothing. The same number comes from the later points' information, -q (L' x - h')_1, and from differences of values and slopes over the next gap
 * d, (6 e0/d - 2 e1)/d with e = x_(k+1) - F x_k. Each is a small difference of larger numbers somewhere (the costates where lambda is small,
 * differences where it is large): of the three the one with the smallest terms is taken.
 *
 * Penalty: g'' linear from A to B over a gap d contributes d (A^2 + A B + B^2)/3.
 * @param forward states before the points, that of `from` first @param carry what comes from point `to`; receives what goes on to the one before `from`
 * @returns false when the numbers leave the range of doubles
 */
export function smoothBackward(
  series: PreparedSeries,
  q: number,
  from: number,
  to: number,
  forward: Float64Array,
  carry: BackwardCarry,
  out: SmoothedPoints,
): boolean {
  const { n, gap, pull, r, timeScale, weightScale, lineLevel, lineSlope, lineTime } = series;
  const t = series.obs.t;
  const { fitted, slope, curvature, standardError, leverage } = out;
  const origin = t[0] + lineTime;
  const perTime = 1 / timeScale;
  const perWeight = 1 / weightScale;
  const { state } = carry;
  let a = state[0];
  let b = state[1];
  let c = state[2];
  let det = state[3];
  let h0 = state[4];
  let h1 = state[5];
  let edf = carry.edf;
  let rss = carry.rss;
  let penalty = carry.penalty;
  let nextValue = carry.value;
  let nextSlope = carry.slope;
  let nextBend = carry.bend;
  let nextSize = carry.bendSize;
  for (let k = to - 1, i = STATE_SIZE * (k - from); k >= from; k--, i -= STATE_SIZE) {
    const w = pull[k];
    const y = r[k];
    const af = forward[i];
    const bf = forward[i + 1];
    const cf = forward[i + 2];
    const h1f = forward[i + 5];
    const total = forward[i + 3] + w * cf + det + (af + w) * c + a * cf + 2 * bf * b;
    if (!(total > 0)) return false;
    const scale = 1 / total;
    const g0 = forward[i + 4] + w * y + h0;
    const g1 = h1f - h1;
    const bs = bf - b;
    const variance = (cf + c) * scale;
    const value = ((cf + c) * g0 + bs * g1) * scale;
    const dg = ((af + w + a) * g1 + bs * g0) * scale;

    const d = gap[k];
    const x1 = cf * dg;
    const x2 = bf * value;
    const z1 = c * dg;
    const z2 = b * value;
    let size = q * (abs(x1) + abs(x2) + abs(h1f));
    let bend = q * (x1 - x2 - h1f);
    const sizeAfter = q * (abs(z1) + abs(z2) + abs(h1));
    if (sizeAfter < size) {
      size = sizeAfter;
      bend = 0 - q * (z1 + z2 + h1);
    }
    if (d > 0) {
      const perGap = 1 / d;
      const e0 = (nextValue - value) * perGap;
      const sizeBetween = perGap * (6 * perGap * (abs(value) + abs(nextValue)) + 4 * abs(dg) + 2 * abs(nextSlope));
      if (sizeBetween < size) {
        size = sizeBetween;
        bend = perGap * (6 * e0 - 4 * dg - 2 * nextSlope);
      }
      penalty += d * (1 / 3) * (bend * bend + bend * nextBend + nextBend * nextBend);
    } else if (k < n - 1 && nextSize < size) {
      size = nextSize;
      bend = nextBend;
    }
    nextValue = value;
    nextSlope = dg;
    nextBend = bend;
    nextSize = size;

    const e = y - value;
    const h = w * variance;
    rss += w * e * e;
    edf += h;
    leverage[k] = h;
    fitted[k] = lineLevel + lineSlope * (t[k] - origin) + value;
    slope[k] = lineSlope + dg * perTime;
    curvature[k] = bend * perTime * perTime;
    standardError[k] = sqrt(variance * perWeight);
    if (k === 0) break;

    const g = gap[k - 1];
    const eq = q * g;
    a += w;
    det += w * c;
    h0 += w * y;
    const ad = a * g;
    const bd = b * g;
    const de = det * eq;
    const ded = de * g;
    const s = 1 / (1 + eq * (c + g * (b + ad * (1 / 3))) + (ded * eq * g) / 12);
    const hh = h0;
    h0 = ((1 + eq * (c + 0.5 * bd)) * hh + eq * (b + 0.5 * ad) * h1) * s;
    h1 = ((1 - eq * g * (0.5 * b + ad * (1 / 6))) * h1 - g * (1 + eq * (0.5 * c + bd * (1 / 6))) * hh) * s;
    a = (a + de) * s;
    c = (c + g * (2 * b + ad + ded * (1 / 3))) * s;
    b = (b + ad + 0.5 * ded) * s;
    det *= s;
  }
  state[0] = a;
  state[1] = b;
  state[2] = c;
  state[3] = det;
  state[4] = h0;
  state[5] = h1;
  carry.edf = edf;
  carry.rss = rss;
  carry.penalty = penalty;
  carry.value = nextValue;
  carry.slope = nextSlope;
  carry.bend = nextBend;
  carry.bendSize = nextSize;
  return true;
}
