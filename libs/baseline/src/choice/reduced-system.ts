import type { PreparedSeries } from '../prepared-series';

/** Cubic B-splines that are not zero in one interval, and numbers a row of a symmetric band of theirs. */
export const BAND = 4;

/**
 * Normal equations of cubic B-splines on equal intervals from the first to the last pulling point, time on [0, 1] there, scaled weights.
 * Bands hold the diagonal and the three elements right of it: band[4 j + d] = element (j, j + d).
 */
export interface ReducedSystem {
  /** M; there are M + 3 functions. */
  readonly intervals: number;
  /** B'WB. */
  readonly gram: Float64Array;
  /** B'Wr. */
  readonly moment: Float64Array;
  /** Integral of B''B'' over [0, 1], exactly. */
  readonly penalty: Float64Array;
  /** -log of det(penalty + the first two functions' unit matrices) - 2 log M: makes the determinant that of (1, t) as lambda grows. */
  readonly logConstant: number;
}

/** Integrals over an interval of length 1 of the products of the second derivatives 1-x, 3x-2, 1-3x, x. */
// prettier-ignore
const BENDING = Float64Array.of(
  1 / 3, -1 / 2, 0, 1 / 6,
  -1 / 2, 1, -1 / 2, 0,
  0, -1 / 2, 1, -1 / 2,
  1 / 6, 0, -1 / 2, 1 / 3,
);

/** Forms the normal equations in one pass over the points: sums of each interval, added to the bands when the points leave it. */
export function reducedSystem(series: PreparedSeries, intervals: number): ReducedSystem {
  const { pull, r, obs } = series;
  const t = obs.t;
  const { from, to } = pullingRange(pull);
  const origin = t[from];
  const perTime = intervals / (t[to] - origin);
  const gram = new Float64Array(BAND * (intervals + 3));
  const moment = new Float64Array(intervals + 3);
  for (let i = from, cell = 0; i <= to;) {
    let g00 = 0;
    let g01 = 0;
    let g02 = 0;
    let g03 = 0;
    let g11 = 0;
    let g12 = 0;
    let g13 = 0;
    let g22 = 0;
    let g23 = 0;
    let g33 = 0;
    let m0 = 0;
    let m1 = 0;
    let m2 = 0;
    let m3 = 0;
    const end = cell + 1 < intervals ? cell + 1 : Infinity;
    let place = 0;
    for (; i <= to && (place = (t[i] - origin) * perTime) < end; i++) {
      const w = pull[i];
      // The four B-splines at x of the way through the interval.
      const x = place - cell;
      const y = 1 - x;
      const b0 = (y * y * y) / 6;
      const b3 = (x * x * x) / 6;
      const b1 = 2 / 3 - x * x * (1 - 0.5 * x);
      const b2 = 2 / 3 - y * y * (1 - 0.5 * y);
      const w0 = w * b0;
      const w1 = w * b1;
      const w2 = w * b2;
      const w3 = w * b3;
      g00 += w0 * b0;
      g01 += w0 * b1;
      g02 += w0 * b2;
      g03 += w0 * b3;
      g11 += w1 * b1;
      g12 += w1 * b2;
      g13 += w1 * b3;
      g22 += w2 * b2;
      g23 += w2 * b3;
      g33 += w3 * b3;
      m0 += w0 * r[i];
      m1 += w1 * r[i];
      m2 += w2 * r[i];
      m3 += w3 * r[i];
    }
    const g = BAND * cell;
    gram[g] += g00;
    gram[g + 1] += g01;
    gram[g + 2] += g02;
    gram[g + 3] += g03;
    gram[g + 4] += g11;
    gram[g + 5] += g12;
    gram[g + 6] += g13;
    gram[g + 8] += g22;
    gram[g + 9] += g23;
    gram[g + 12] += g33;
    moment[cell] += m0;
    moment[cell + 1] += m1;
    moment[cell + 2] += m2;
    moment[cell + 3] += m3;
    if (i <= to) cell = Math.min(intervals - 1, Math.floor(place));
  }
  return { intervals, gram, moment, ...bending(intervals) };
}

/** First and last point that pull. */
function pullingRange(pull: Float64Array): { from: number; to: number } {
  let from = 0;
  let to = pull.length - 1;
  while (pull[from] === 0) from++;
  while (pull[to] === 0) to--;
  return { from, to };
}

/**
 * The same system on half as many intervals, exactly: function j there is 1, 4, 6, 4, 1 eighths of the functions 2 j - 3 .. 2 j + 1 here (knot insertion:
 * de Boor 1978, A Practical Guide to Splines).
 */
export function coarsened({ intervals, gram, moment }: ReducedSystem): ReducedSystem {
  const half = intervals / 2;
  const size = half + 3;
  const coarseGram = new Float64Array(BAND * size);
  const coarseMoment = new Float64Array(size);
  // Three rows of zeros before the first and after the last.
  const u = new Float64Array(BAND * (intervals + 9));
  u.set(gram, BAND * 3);
  const b = new Float64Array(intervals + 9);
  b.set(moment, 3);
  for (let j = 0, i = 0, m = 0; j < size; j++, i += 2 * BAND, m += 2) {
    coarseMoment[j] = (b[m] + 4 * b[m + 1] + 6 * b[m + 2] + 4 * b[m + 3] + b[m + 4]) / 8;
    // Sums of the five rows, weighted, in the columns from the first of them on.
    const c0 = u[i] + 4 * u[i + 1] + 6 * u[i + 2] + 4 * u[i + 3];
    const c1 = u[i + 1] + 4 * u[i + 4] + 6 * u[i + 5] + 4 * u[i + 6] + u[i + 7];
    const c2 = u[i + 2] + 4 * u[i + 5] + 6 * u[i + 8] + 4 * u[i + 9] + u[i + 10];
    const c3 = u[i + 3] + 4 * u[i + 6] + 6 * u[i + 9] + 4 * u[i + 12] + u[i + 13];
    const c4 = 4 * u[i + 7] + 6 * u[i + 10] + 4 * u[i + 13] + u[i + 16];
    const c5 = 6 * u[i + 11] + 4 * u[i + 14] + u[i + 17];
    const c6 = 4 * u[i + 15] + u[i + 18];
    const c7 = u[i + 19];
    const k = BAND * j;
    coarseGram[k] = (c0 + 4 * c1 + 6 * c2 + 4 * c3 + c4) / 64;
    coarseGram[k + 1] = (c2 + 4 * c3 + 6 * c4 + 4 * c5 + c6) / 64;
    coarseGram[k + 2] = (c4 + 4 * c5 + 6 * c6 + 4 * c7) / 64;
    coarseGram[k + 3] = (c6 + 4 * c7) / 64;
  }
  return { intervals: half, gram: coarseGram, moment: coarseMoment, ...bending(half) };
}

function bending(intervals: number): { penalty: Float64Array; logConstant: number } {
  const size = intervals + 3;
  const penalty = new Float64Array(BAND * size);
  const cube = intervals ** 3;
  for (let j = 0, i = 0; j < size; j++, i += BAND) {
    // Function j has its piece a in interval j - a: all of them, as function 3, but for three functions at either end.
    if (j > 3 && j < intervals) {
      for (let d = 0; d < BAND; d++) penalty[i + d] = penalty[3 * BAND + d];
      continue;
    }
    const from = Math.max(0, j - intervals + 1);
    for (let d = 0; d < BAND; d++) {
      let sum = 0;
      for (let a = from; a <= j && a + d < BAND; a++) sum += BENDING[BAND * a + a + d];
      penalty[i + d] = sum * cube;
    }
  }
  return { penalty, logConstant: -logPinnedDeterminant(intervals) - 2 * Math.log(intervals) };
}

/**
 * log det of the penalty with 1 added to its first two diagonal elements. g'' is linear between knots, with M^2 times the coefficients' second differences
 * there, so the penalty is M^3 D' T D, T the hat functions' products (1/6 of 2, 4 .. 4, 2 on the diagonal, 1 beside); the first two coefficients and
 * D c are c up to a unit triangle, so the determinant is M^(3 (M + 1)) det T.
 */
function logPinnedDeterminant(intervals: number): number {
  let pivot = 1 / 3;
  let log = Math.log(pivot);
  let left = intervals - 1;
  for (let before = 0; left > 0 && pivot !== before; left--) {
    before = pivot;
    pivot = 2 / 3 - 1 / (36 * pivot);
    log += Math.log(pivot);
  }
  // The pivots stand still after a dozen.
  return log + left * Math.log(pivot) + Math.log(1 / 3 - 1 / (36 * pivot)) + 3 * (intervals + 1) * Math.log(intervals);
}
