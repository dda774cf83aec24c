import { readFileSync } from 'node:fs';
import { fitSmoothingSpline, type Observations } from '@app/baseline';
import { rangeOf } from './curves';

/** fixtures/reference/quad-smoothing-spline.json: fits of this very series in quadruple precision, at some hundred points each. */
interface QuadReference {
  columns: string[];
  series: {
    n: number;
    lastTime: number;
    lastValue: number;
    fits: { lambda: number; edf: number; points: number[][] }[];
  }[];
}

/** Worst over the reference's penalties (3 to 60 degrees of freedom). */
export interface Exactness {
  /** Largest difference of fitted values, as a share of the fit's range. */
  fitted: number;
  /** Largest relative difference of effective degrees of freedom, and of leverages. */
  edf: number;
  leverage: number;
}

/** How far our fits of the series lie from quadruple precision; undefined where there is no reference of this length. */
export function measureExactness(path: string, obs: Observations): Exactness | undefined {
  const { columns, series } = JSON.parse(readFileSync(path, 'utf8')) as QuadReference;
  const n = obs.t.length;
  const reference = series.find((one) => one.n === n);
  if (reference === undefined) return undefined;
  if (obs.t[n - 1] !== reference.lastTime || obs.y[n - 1] !== reference.lastValue)
    throw new Error(`the reference of ${n} points is of another series`);
  const [index, fitted, leverage] = ['index', 'fitted', 'leverage'].map((name) => columns.indexOf(name));
  const worst: Exactness = { fitted: 0, edf: 0, leverage: 0 };
  for (const { lambda, edf, points } of reference.fits) {
    const fit = fitSmoothingSpline(obs, lambda);
    const range = rangeOf(points.map((point) => point[fitted]));
    worst.edf = Math.max(worst.edf, Math.abs(fit.edf / edf - 1));
    for (const point of points) {
      const i = point[index];
      worst.fitted = Math.max(worst.fitted, Math.abs(fit.fitted[i] - point[fitted]) / range);
      worst.leverage = Math.max(worst.leverage, Math.abs(fit.leverage[i] / point[leverage] - 1));
    }
  }
  return worst;
}
