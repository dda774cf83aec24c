import { STATE_SIZE } from './information-state';

/** Products above this are turned into a logarithm and started afresh; so are factors above its fourth root. */
const PRODUCT_LIMIT = 1e200;
const FACTOR_LIMIT = 1e50;
// Looked up once: a look-up of Math for every point costs more than the arithmetic where globals are intercepted.
const { log } = Math;

/**
 * States just before each point from the points earlier in time, information-state's recursion over a whole series.
 * @param gap scaled gaps, gap[k] between points k and k+1
 * @param w scaled weight of each point, 0 for points that do not pull
 * @param r values
 * @param q 1/lambda in scaled units; 0 gives the straight line
 * @param forward receives STATE_SIZE numbers a point
 * @returns the sum of log delta over the gaps
 */
export function filterForward(
  gap: Float64Array,
  w: Float64Array,
  r: Float64Array,
  q: number,
  forward: Float64Array,
): number {
  return filterRange(gap, w, r, q, 0, w.length, new Float64Array(STATE_SIZE), forward);
}

/**
 * The forward pass over the points from .. to-1. information-state's `advance` written out, with the state in locals.
 * @param state the state before point `from`; receives that before point `to` (of the last point, when there is none)
 * @param out receives the states before the points, the first at 0
 * @returns the sum of log delta over the gaps crossed
 */
export function filterRange(
  gap: Float64Array,
  w: Float64Array,
  r: Float64Array,
  q: number,
  from: number,
  to: number,
  state: Float64Array,
  out: Float64Array,
): number {
  const last = w.length - 1;
  let a = state[0];
  let b = state[1];
  let c = state[2];
  let det = state[3];
  let h0 = state[4];
  let h1 = state[5];
  let product = 1;
  let logDelta = 0;
  for (let k = from, i = 0; k < to; k++, i += STATE_SIZE) {
    out[i] = a;
    out[i + 1] = b;
    out[i + 2] = c;
    out[i + 3] = det;
    out[i + 4] = h0;
    out[i + 5] = h1;
    if (k === last) break;
    const weight = w[k];
    const d = gap[k];
    const e = q * d;
    a += weight;
    det += weight * c;
    h0 += weight * r[k];
    const ad = a * d;
    const bd = b * d;
    const de = det * e;
    const ded = de * d;
    const delta = 1 + e * (c + d * (b + ad * (1 / 3))) + (ded * e * d) / 12;
    const s = 1 / delta;
    const h = h0;
    h0 = ((1 + e * (c + 0.5 * bd)) * h + e * (b + 0.5 * ad) * h1) * s;
    h1 = ((1 - e * d * (0.5 * b + ad * (1 / 6))) * h1 - d * (1 + e * (0.5 * c + bd * (1 / 6))) * h) * s;
    a = (a + de) * s;
    c = (c + d * (2 * b + ad + ded * (1 / 3))) * s;
    b = (b + ad + 0.5 * ded) * s;
    det *= s;
    if (delta < FACTOR_LIMIT) product *= delta;
    else logDelta += log(delta);
    if (product > PRODUCT_LIMIT) {
      logDelta += log(product);
      product = 1;
    }
  }
  state[0] = a;
  state[1] = b;
  state[2] = c;
  state[3] = det;
  state[4] = h0;
  state[5] = h1;
  return logDelta + log(product);
}

/** States just before each point from the points later in time, for (g, -g'): as {@link filterForward}. */
export function filterBackward(
  gap: Float64Array,
  w: Float64Array,
  r: Float64Array,
  q: number,
  backward: Float64Array,
): void {
  let a = 0;
  let b = 0;
  let c = 0;
  let det = 0;
  let h0 = 0;
  let h1 = 0;
  for (let k = w.length - 1, i = STATE_SIZE * k; k >= 0; k--, i -= STATE_SIZE) {
    backward[i] = a;
    backward[i + 1] = b;
    backward[i + 2] = c;
    backward[i + 3] = det;
    backward[i + 4] = h0;
    backward[i + 5] = h1;
    if (k === 0) break;
    const weight = w[k];
    const d = gap[k - 1];
    const e = q * d;
    a += weight;
    det += weight * c;
    h0 += weight * r[k];
    const ad = a * d;
    const bd = b * d;
    const de = det * e;
    const ded = de * d;
    const s = 1 / (1 + e * (c + d * (b + ad * (1 / 3))) + (ded * e * d) / 12);
    const h = h0;
    h0 = ((1 + e * (c + 0.5 * bd)) * h + e * (b + 0.5 * ad) * h1) * s;
    h1 = ((1 - e * d * (0.5 * b + ad * (1 / 6))) * h1 - d * (1 + e * (0.5 * c + bd * (1 / 6))) * h) * s;
    a = (a + de) * s;
    c = (c + d * (2 * b + ad + ded * (1 / 3))) * s;
    b = (b + ad + 0.5 * ded) * s;
    det *= s;
  }
}
