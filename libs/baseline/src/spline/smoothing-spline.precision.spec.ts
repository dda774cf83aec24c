import { fitSmoothingSpline } from './smoothing-spline';
import { longSeries } from '../testing/long-series';
import { rangeOf, reference, worstDifference } from '../testing/reference';
import { observations } from '../testing/series';

interface ExactFit {
  lambda: number;
  fitted: number[];
  slope: number[];
  curvature: number[];
  standardError: number[];
  leverage: number[];
  deletedResidual: number[];
  deletedVariance: number[];
  edf: number;
  weightedRss: number;
  penalty: number;
  deviance: number;
  at: { t: number; value: number; slope: number; curvature: number; standardError: number }[];
  covariance: { a: number; b: number; covariance: number; scale: number }[];
}
type ExactReference = { cases: Record<string, { t: number[]; y: number[]; w: number[]; fits: ExactFit[] }> };

const relative = (actual: ArrayLike<number>, expected: number[]) =>
  worstDifference(
    Array.from(actual, (v, i) => v / expected[i]),
    expected.map(() => 1),
  );

describe.each(Object.entries(reference<ExactReference>('mpmath-smoothing-spline.json').cases))(
  'the smoothing spline agrees with 50-digit algebra: %s',
  (_name, { t, y, w, fits }) => {
    const obs = observations(t, y, undefined, w);
    const scale = rangeOf(y);
    it.each(fits.map((fit) => [fit.lambda, fit] as const))('at lambda %p', (lambda, expected) => {
      const fit = fitSmoothingSpline(obs, lambda);
      const slopeScale = Math.max(scale / rangeOf(t), rangeOf(expected.slope));
      const curvatureScale = Math.max(scale / rangeOf(t) ** 2, rangeOf(expected.curvature));
      const prss = expected.weightedRss + lambda * expected.penalty;
      expect(worstDifference(fit.fitted, expected.fitted)).toBeLessThan(1e-9 * scale);
      expect(worstDifference(fit.slope, expected.slope)).toBeLessThan(1e-9 * slopeScale);
      expect(worstDifference(fit.curvature, expected.curvature)).toBeLessThan(1e-9 * curvatureScale);
      expect(relative(fit.standardError, expected.standardError)).toBeLessThan(1e-9);
      expect(relative(fit.leverage, expected.leverage)).toBeLessThan(1e-9);
      expect(Math.abs(fit.edf - expected.edf)).toBeLessThan(1e-9);
      expect(Math.abs(fit.weightedRss - expected.weightedRss)).toBeLessThan(1e-9 * prss);
      expect(Math.abs(fit.penalty - expected.penalty) * lambda).toBeLessThan(1e-9 * prss);
      for (const point of expected.at) {
        const there = fit.at(point.t);
        expect(Math.abs(there.value - point.value)).toBeLessThan(1e-9 * scale);
        expect(Math.abs(there.standardError / point.standardError - 1)).toBeLessThan(1e-9);
        expect(Math.abs(there.slope - point.slope)).toBeLessThan(1e-9 * slopeScale);
        expect(Math.abs(there.curvature - point.curvature)).toBeLessThan(1e-9 * curvatureScale);
      }
      for (const { a, b, covariance, scale } of expected.covariance)
        expect(Math.abs(fit.covariance(a, b) - covariance)).toBeLessThan(1e-9 * scale);
    });
    it.each(fits.map((fit) => [fit.lambda, fit] as const))(
      'point by point left out, at lambda %p',
      (lambda, expected) => {
        const fit = fitSmoothingSpline(obs, lambda);
        const residualScale = Math.max(...expected.deletedResidual.map(Math.abs));
        const deleted = fit.deletedLots();
        const residuals = deleted.map((d) => d.residual[0]);
        const variances = deleted.map((d) => d.covariance[0]);
        const scores = fit.scoreLots();
        for (const found of [residuals, scores.residual, scores.deletedResidual])
          expect(worstDifference(found, expected.deletedResidual)).toBeLessThan(1e-9 * residualScale);
        for (const found of [variances, scores.variance])
          expect(relative(found, expected.deletedVariance)).toBeLessThan(1e-9);
      },
    );
    // The reference has weights and times as given: log|A| - (n - 2) log lambda there is 2 log(mean weight) - 3 (n - 2) log(range) more.
    it.each(fits.map((fit) => [fit.lambda, fit] as const))(
      'in the restricted likelihood at lambda %p',
      (lambda, expected) => {
        const n = t.length;
        const meanWeight = w.reduce((a, b) => a + b) / n;
        const deviance = expected.deviance - 2 * Math.log(meanWeight) + 3 * (n - 2) * Math.log(rangeOf(t));
        const tolerance = 1e-9 * Math.max(1, Math.abs(deviance), Math.abs(expected.deviance));
        expect(Math.abs(fitSmoothingSpline(obs, lambda).restrictedDeviance - deviance)).toBeLessThan(tolerance);
      },
    );
  },
);

interface LongFit {
  lambda: number;
  /** See columns. */
  points: number[][];
  edf: number;
  weightedRss: number;
  penalty: number;
  logDet: number;
}
interface LongReference {
  columns: string[];
  series: { n: number; lastTime: number; lastValue: number; lastWeight: number; fits: LongFit[] }[];
}
const long = reference<LongReference>('quad-smoothing-spline.json');

describe.each(long.series.map((series) => [series.n, series] as const))(
  'slow baselines of %p points agree with quadruple precision',
  (n, series) => {
    const obs = longSeries(n);
    it('on the same doubles', () => {
      expect([obs.t[n - 1], obs.y[n - 1], obs.weight[n - 1]]).toEqual([
        series.lastTime,
        series.lastValue,
        series.lastWeight,
      ]);
    });
    it.each(series.fits.map((fit) => [fit.edf, fit] as const))('with %p degrees of freedom', (_edf, expected) => {
      const fit = fitSmoothingSpline(obs, expected.lambda);
      const column = (name: string) => expected.points.map((p) => p[long.columns.indexOf(name)]);
      const found = (x: Float64Array) => column('index').map((i) => x[i]);
      const worst = (x: Float64Array, name: string) => worstDifference(found(x), column(name)) / rangeOf(column(name));
      expect(worst(fit.fitted, 'fitted')).toBeLessThan(1e-12);
      expect(worst(fit.slope, 'slope')).toBeLessThan(1e-11);
      expect(worst(fit.curvature, 'curvature')).toBeLessThan(1e-10);
      expect(relative(found(fit.standardError), column('standardError'))).toBeLessThan(1e-11);
      expect(relative(found(fit.leverage), column('leverage'))).toBeLessThan(1e-11);
      expect(worst(fit.scoreLots().deletedResidual, 'deletedResidual')).toBeLessThan(1e-12);
      expect(Math.abs(fit.edf / expected.edf - 1)).toBeLessThan(1e-12);
      expect(Math.abs(fit.weightedRss / expected.weightedRss - 1)).toBeLessThan(1e-11);
      expect(Math.abs(fit.penalty / expected.penalty - 1)).toBeLessThan(1e-11);
      const prss = expected.weightedRss + expected.lambda * expected.penalty;
      expect(Math.abs(fit.restrictedDeviance / (prss + expected.logDet) - 1)).toBeLessThan(1e-11);
    });
  },
);
