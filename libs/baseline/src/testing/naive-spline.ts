import { inverse, Matrix, solve } from 'ml-matrix';
import type { Observations } from '../observations';

/** The smoothing spline by dense textbook algebra (Green & Silverman 1994, ch. 2): slow, short, and independent of the code under test. */
export interface NaiveSpline {
  fitted: number[];
  /** Posterior covariance of g at the points, (W + lambda K)^-1 on the distinct times. */
  covariance: Matrix;
  /** Integral of g''^2 and log|W + lambda K| of the distinct times. */
  penalty: number;
}

/** @param without lot to leave out of the fit (its points stay in the answer) */
export function naiveSpline(obs: Observations, lambda: number, without = -1): NaiveSpline {
  const knots = [...new Set(obs.t)];
  const at = Array.from(obs.t, (t) => knots.indexOf(t));
  const k = roughness(knots);
  const a = Matrix.mul(k, lambda);
  const b = Matrix.zeros(knots.length, 1);
  for (let i = 0; i < obs.t.length; i++) {
    if (obs.lot[i] === without) continue;
    const weight = obs.weight[i] * obs.pulls[obs.lot[i]];
    a.set(at[i], at[i], a.get(at[i], at[i]) + weight);
    b.set(at[i], 0, b.get(at[i], 0) + weight * obs.y[i]);
  }
  const g = solve(a, b);
  const full = inverse(a);
  return {
    fitted: at.map((p) => g.get(p, 0)),
    covariance: full.selection(at, at),
    penalty: g.transpose().mmul(k).mmul(g).get(0, 0),
  };
}

/** K = Q R^-1 Q^T: g' K g is the integral of the squared second derivative of the natural spline through g. */
export function roughness(t: number[]): Matrix {
  const { q, r } = bands(t);
  return q.mmul(solve(r, q.transpose()));
}

function bands(t: number[]): { q: Matrix; r: Matrix } {
  const n = t.length;
  const q = Matrix.zeros(n, n - 2);
  const r = Matrix.zeros(n - 2, n - 2);
  for (let j = 1; j < n - 1; j++) {
    const left = t[j] - t[j - 1];
    const right = t[j + 1] - t[j];
    q.set(j - 1, j - 1, 1 / left);
    q.set(j, j - 1, -1 / left - 1 / right);
    q.set(j + 1, j - 1, 1 / right);
    r.set(j - 1, j - 1, (left + right) / 3);
    if (j < n - 2) {
      r.set(j - 1, j, right / 6);
      r.set(j, j - 1, right / 6);
    }
  }
  return { q, r };
}

/**
 * Fitted values at distinct times by Reinsch (1967): (R + lambda Q' W^-1 Q) gamma = Q' y in five bands, g = y - lambda W^-1 Q gamma.
 * Good for short series; loses digits as 16 lambda / h^3 grows.
 */
export function reinschFit(t: Float64Array, y: Float64Array, weight: Float64Array, lambda: number): number[] {
  const { q, r } = bands([...t]);
  const s = Matrix.diag([...weight].map((w) => lambda / w));
  const m = Matrix.add(r, q.transpose().mmul(s).mmul(q));
  const gamma = solve5(
    m,
    q
      .transpose()
      .mmul(Matrix.columnVector([...y]))
      .to1DArray(),
  );
  const correction = s.mmul(q).mmul(Matrix.columnVector(gamma)).to1DArray();
  return [...y].map((v, i) => v - correction[i]);
}

/** LDL^T of a symmetric matrix with two bands beside the diagonal. */
function solve5(m: Matrix, b: number[]): number[] {
  const n = b.length;
  const d: number[] = [];
  const l1: number[] = [];
  const l2: number[] = [];
  const x = [...b];
  for (let i = 0; i < n; i++) {
    l2[i] = i > 1 ? m.get(i, i - 2) / d[i - 2] : 0;
    l1[i] = i > 0 ? (m.get(i, i - 1) - (i > 1 ? l2[i] * l1[i - 1] * d[i - 2] : 0)) / d[i - 1] : 0;
    d[i] = m.get(i, i) - (i > 0 ? l1[i] ** 2 * d[i - 1] : 0) - (i > 1 ? l2[i] ** 2 * d[i - 2] : 0);
    x[i] -= (i > 0 ? l1[i] * x[i - 1] : 0) + (i > 1 ? l2[i] * x[i - 2] : 0);
  }
  for (let i = 0; i < n; i++) x[i] /= d[i];
  for (let i = n - 1; i >= 0; i--)
    x[i] -= (i + 1 < n ? l1[i + 1] * x[i + 1] : 0) + (i + 2 < n ? l2[i + 2] * x[i + 2] : 0);
  return x;
}
