import { inverse, Matrix } from 'ml-matrix';
import type { BaselineSpec } from '../baseline-fit';
import type { Observations } from '../observations';

type RegressionSpec = Exclude<BaselineSpec, { method: 'smoothing-spline' }>;

/** A regression baseline by dense normal equations on truncated powers: slow, short, and independent of the code under test. */
export interface NaiveRegression {
  fitted: number[];
  edf: number;
  /** Weighted sum of squares over the points that pull, and their number. */
  rss: number;
  pullCount: number;
}

/** @param without lot to leave out of the fit (its points stay in the answer) */
export function naiveRegression(obs: Observations, spec: RegressionSpec, without = -1): NaiveRegression {
  const pulling = [...obs.t].filter((_, i) => obs.pulls[obs.lot[i]] > 0);
  const [first, last] = [Math.min(...pulling), Math.max(...pulling)];
  const unit = (t: number) => (t - first) / (last - first);
  const x = new Matrix([...obs.t].map((t) => row(spec, unit(t), unit)));
  const weight = [...obs.t].map((_, i) => (obs.lot[i] === without ? 0 : obs.weight[i] * obs.pulls[obs.lot[i]]));
  const xw = Matrix.mul(x.transpose(), Matrix.ones(x.columns, 1).mmul(Matrix.rowVector(weight)));
  const solution = inverse(xw.mmul(x)).mmul(xw);
  const fitted = x.mmul(solution.mmul(Matrix.columnVector([...obs.y]))).to1DArray();
  return {
    fitted,
    edf: x.columns,
    rss: fitted.reduce((sum, g, i) => sum + weight[i] * (obs.y[i] - g) ** 2, 0),
    pullCount: weight.filter((w) => w > 0).length,
  };
}

function row(spec: RegressionSpec, u: number, unit: (t: number) => number): number[] {
  if (spec.method === 'constant') return [1];
  if (spec.method === 'polynomial') return Array.from({ length: spec.degree + 1 }, (_, k) => u ** k);
  const cube = (k: number) => Math.max(0, u - k) ** 3;
  const knots = [...spec.knots].map(unit);
  if (spec.method === 'b-spline') return [1, u, u * u, u ** 3, ...knots.map(cube)];
  // Natural: Hastie, Tibshirani & Friedman 2009, (5.4) and (5.5), with the ends as the outer knots.
  const all = [0, ...knots, 1];
  const d = (k: number) => (cube(all[k]) - cube(1)) / (1 - all[k]);
  return [1, u, ...knots.map((_, k) => d(k) - d(all.length - 2))];
}
