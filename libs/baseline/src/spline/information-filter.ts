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
 * Writes into out (4 numbers, row-major) the matrix G with E[x before the gap | x after it, earlier points] = const + G x,
 * for the state src[i..i+5] with a point of weight w added. G is the transpose of the map that takes h across the gap.
 */
export function backwardGain(src: Float64Array, i: number, w: number, d: number, q: number, out: Float64Array): void {
  const a = src[i] + w;
  const b = src[i + 1];
  const c = src[i + 2];
  const det = src[i + 3] + w * c;
  const e = q * d;
  const ad = a * d;
  const bd = b * d;
  const s = 1 / (1 + e * (c + d * (b + ad * (1 / 3))) + (det * e * d * e * d) / 12);
  out[0] = (1 + e * (c + 0.5 * bd)) * s;
  out[1] = -d * (1 + e * (0.5 * c + bd * (1 / 6))) * s;
  out[2] = e * (b + 0.5 * ad) * s;
  out[3] = (1 - e * d * (0.5 * b + ad * (1 / 6))) * s;
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
  const logDelta = filterForward(gap, w, r, q, forward);
  const n = w.length;
  backward.fill(0, STATE_SIZE * (n - 1), STATE_SIZE * n);
  for (let k = n - 1; k > 0; k--) {
    advance(backward, STATE_SIZE * k, backward, STATE_SIZE * (k - 1), w[k], w[k] * r[k], gap[k - 1], q);
  }
  return logDelta;
}

/** Products above this are turned into a logarithm and started afresh. */
const PRODUCT_LIMIT = 1e200;

/** The forward half of {@link filterBothWays}, enough for the restricted likelihood. */
export function filterForward(
  gap: Float64Array,
  w: Float64Array,
  r: Float64Array,
  q: number,
  forward: Float64Array,
): number {
  const n = w.length;
  forward.fill(0, 0, STATE_SIZE);
  let product = 1;
  let logDelta = 0;
  for (let k = 0; k + 1 < n; k++) {
    const delta = advance(forward, STATE_SIZE * k, forward, STATE_SIZE * (k + 1), w[k], w[k] * r[k], gap[k], q);
    if (delta < 1e50) product *= delta;
    else logDelta += Math.log(delta);
    if (product > PRODUCT_LIMIT) {
      logDelta += Math.log(product);
      product = 1;
    }
  }
  return logDelta + Math.log(product);
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
