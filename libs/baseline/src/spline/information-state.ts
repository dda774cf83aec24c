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
 *
 * Adding: a + w, D + w c, h0 + w y. Crossing: with L the matrix before, F = [[1, d], [0, 1]] and Q the noise, M = F^-T L F^-1 (entries a,
 * -(b + a d), c + 2 b d + a d^2; |M| = D) is the information on F x, and that on F x + noise is
 *   (M^-1 + Q)^-1 = (M + D adj Q) / delta,  D / delta,  h' = (I + M Q)^-1 F^-T h,
 *   delta = |I + M Q| = 1 + tr(M Q) + D |Q| = 1 + q d (c + b d + a d^2/3) + D q^2 d^4/12,  adj Q = q [[d, -d^2/2], [-d^2/2, d^3/3]].
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
 * Writes into out[j..j+3] (row-major) the gain G of the smoother: E[x | x', earlier points] = const + G x' for the state x = src[i..i+5] with a point of
 * weight w added and the state x' after the gap d. G = (L + F' Q^-1 F)^-1 F' Q^-1 = F^-1 (I + Q M)^-1, the transpose of the map that takes h across
 * (Rauch, Tung & Striebel 1965, AIAA J. 3:1445).
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
