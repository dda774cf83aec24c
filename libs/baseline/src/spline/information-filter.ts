/**
 * The state-space form of the smoothing spline: (g, g') is an integrated Wiener process with transition [[1, d], [0, 1]] and noise
 * q [[d^3/3, d^2/2], [d^2/2, d]], q = 1/lambda, with a diffuse start (Wahba 1978; Wecker & Ansley 1983, JASA 78:81; Kohn & Ansley 1987).
 *
 * What the points on one side say about the state at a time is kept as information: matrix [[a, -b], [-b, c]], its determinant D, and
 * vector (h0, h1) = matrix * mean. With the sign of b chosen so, adding a point and crossing a gap add, multiply and divide
 * non-negative numbers only: a, b, c and D lose no digits however slow the baseline or long the series, zero information
 * is an exact start, and D is never formed as a c - b^2. A series read backwards is the same recursion for the state (g, -g').
 *
 * A state is six numbers [a, b, c, D, h0, h1] in a Float64Array.
 */
export const STATE_SIZE = 6;

/**
 * Adds a point (weight w, w*y) to the state src[i..i+5], crosses the gap d and writes the state there to dst[j..j+5] (which may be the same place).
 * Crossing: M' = (M + D adj Q) / delta, D' = D / delta, delta = det(I + M Q), M = F^-T L F^-1.
 * @returns delta >= 1, whose logarithms make up the restricted likelihood.
 */
export function advance(
  src: Float64Array,
  i: number,
  dst: Float64Array,
  j: number,
  w: number,
  wy: number,
  d: number,
  q: number,
): number {
  const a = src[i] + w;
  const b = src[i + 1];
  const c = src[i + 2];
  const det = src[i + 3] + w * c;
  const h0 = src[i + 4] + wy;
  const h1 = src[i + 5];
  const e = q * d;
  const ad = a * d;
  const bd = b * d;
  const de = det * e;
  const ded = de * d;
  const delta = 1 + e * (c + d * (b + ad * (1 / 3))) + (ded * e * d) / 12;
  const s = 1 / delta;
  dst[j] = (a + de) * s;
  dst[j + 1] = (b + ad + 0.5 * ded) * s;
  dst[j + 2] = (c + d * (2 * b + ad + ded * (1 / 3))) * s;
  dst[j + 3] = det * s;
  dst[j + 4] = ((1 + e * (c + 0.5 * bd)) * h0 + e * (b + 0.5 * ad) * h1) * s;
  dst[j + 5] = ((1 - e * d * (0.5 * b + ad * (1 / 6))) * h1 - d * (1 + e * (0.5 * c + bd * (1 / 6))) * h0) * s;
  return delta;
}

/**
 * Writes into out[j..j+3] (row-major) the matrix G with E[x before the gap | x after it, earlier points] = const + G x,
 * for the state src[i..i+5] with a point of weight w added. G is the transpose of the map that takes h across the gap.
 */
export function backwardGain(
  src: Float64Array,
  i: number,
  w: number,
  d: number,
  q: number,
  out: Float64Array,
  j: number,
): void {
  const a = src[i] + w;
  const b = src[i + 1];
  const c = src[i + 2];
  const det = src[i + 3] + w * c;
  const e = q * d;
  const ad = a * d;
  const bd = b * d;
  const s = 1 / (1 + e * (c + d * (b + ad * (1 / 3))) + (det * e * d * e * d) / 12);
  out[j] = (1 + e * (c + 0.5 * bd)) * s;
  out[j + 1] = -d * (1 + e * (0.5 * c + bd * (1 / 6))) * s;
  out[j + 2] = e * (b + 0.5 * ad) * s;
  out[j + 3] = (1 - e * d * (0.5 * b + ad * (1 / 6))) * s;
}

/**
 * States just before each point, from the points earlier in time (forward) and later in time (backward, for (g, -g')).
 * @param gap scaled gaps, gap[k] between points k and k+1
 * @param w scaled weight of each point, 0 for points that do not pull
 * @param r values
 * @param q 1/lambda in scaled units; 0 gives the straight line
 * @param forward, backward receive STATE_SIZE numbers a point
 * @returns the sum of log delta over the forward pass
 */
export function filterBothWays(
  gap: Float64Array,
  w: Float64Array,
  r: Float64Array,
  q: number,
  forward: Float64Array,
  backward: Float64Array,
): number {
  filterBackward(gap, w, r, q, backward);
  return filterForward(gap, w, r, q, forward);
}

/** Products above this are turned into a logarithm and started afresh; so are factors above its fourth root. */
const PRODUCT_LIMIT = 1e200;
const FACTOR_LIMIT = 1e50;
// Looked up once: a look-up of Math for every point costs more than the arithmetic where globals are intercepted.
const { log } = Math;

/** The forward half of {@link filterBothWays}, enough for the restricted likelihood. */
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
 * The forward pass over the points from .. to-1. {@link advance} written out, with the state in locals.
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

/** The backward half of {@link filterBothWays}. */
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

/** Posterior of (g, g') from what both sides and a point say. */
export interface Posterior {
  value: number;
  slope: number;
  variance: number;
  covariance: number;
  slopeVariance: number;
}

/**
 * Combines a forward state, a backward state and a point of weight w (0: without it) at one time. The determinant of the sum is again a sum of
 * non-negative terms: Df + Db + af cb + ab cf + 2 bf bb.
 * @returns false when the two sides do not determine a line (out is then not written).
 */
export function combine(
  f: Float64Array,
  i: number,
  g: Float64Array,
  j: number,
  w: number,
  wy: number,
  out: Posterior,
): boolean {
  const af = f[i] + w;
  const bf = f[i + 1];
  const cf = f[i + 2];
  const df = f[i + 3] + w * cf;
  const ab = g[j];
  const bb = g[j + 1];
  const cb = g[j + 2];
  const det = df + g[j + 3] + af * cb + ab * cf + 2 * bf * bb;
  if (!(det > 0)) return false;
  const s = 1 / det;
  const c = cf + cb;
  const a = af + ab;
  const b = bf - bb;
  const h0 = f[i + 4] + wy + g[j + 4];
  const h1 = f[i + 5] - g[j + 5];
  out.value = (c * h0 + b * h1) * s;
  out.slope = (a * h1 + b * h0) * s;
  out.variance = c * s;
  out.covariance = b * s;
  out.slopeVariance = a * s;
  return true;
}
