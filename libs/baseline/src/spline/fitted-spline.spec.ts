import { Matrix } from 'ml-matrix';
import { BaselineError } from '../baseline-error';
import type { Observations } from '../observations';
import { fitSmoothingSpline } from './smoothing-spline';
import { naiveSpline } from '../testing/naive-spline';
import { worstDifference } from '../testing/reference';
import { observations, wavySeries, withFactors, withIdlePoints } from '../testing/series';

const LAMBDAS = [1e-3, 1, 100, 1e4];
// What dense algebra itself keeps of its digits here; the fits against 50 digits are in smoothing-spline.precision.spec.
const DENSE = 1e-9;
const DENSE_NEAR_TIMES = 1e-6;
const third = [1, 0.3, 0, 0.9, 0.05];

/** Interleaved and contiguous lots, ties, lots with factors of every kind. */
const SERIES: [string, Observations][] = [
  ['points of their own', wavySeries(30, 41)],
  [
    'lots with factors',
    withFactors(
      wavySeries(33, 42, (i) => Math.floor(i / 3)),
      (lot) => third[lot % 5],
    ),
  ],
  [
    'ties and interleaved lots',
    withFactors(
      observations(
        [0, 0, 0, 1, 1, 2, 3, 3, 4, 6, 6, 6, 7],
        [3, 1, 2, 2, 4, 3, 1, 2, 5, 2, 3, 1, 2],
        [0, 1, 0, 1, 2, 2, 3, 3, 4, 5, 4, 5, 6],
        [1, 2, 1, 0.5, 1, 1, 3, 1, 1, 2, 1, 1, 1],
      ),
      (lot) => [1, 0.5, 1, 0, 1, 0.2, 1][lot],
    ),
  ],
];

/** S = C V W by dense algebra. */
function naiveSmoother(obs: Observations, lambda: number): Matrix {
  const { covariance } = naiveSpline(obs, lambda);
  return covariance.mmul(Matrix.diag([...obs.weight].map((w, i) => w * obs.pulls[obs.lot[i]])));
}

describe.each(SERIES)('the matrix S of %s', (_name, obs) => {
  const n = obs.t.length;
  const pulling = Array.from(obs.weight, (w, i) => w * obs.pulls[obs.lot[i]]);
  it.each(LAMBDAS)('has by dense algebra the same values, leverages and trace at lambda %p', (lambda) => {
    const fit = fitSmoothingSpline(obs, lambda);
    const s = naiveSmoother(obs, lambda);
    expect(worstDifference(fit.fitted, s.mmul(Matrix.columnVector([...obs.y])).to1DArray())).toBeLessThan(DENSE);
    expect(worstDifference(fit.leverage, s.diagonal())).toBeLessThan(DENSE);
    expect(fit.edf).toBeCloseTo(s.trace(), 8);
    expect(fit.pullCount).toBe(pulling.filter((w) => w > 0).length);
    const rss = pulling.reduce((sum, w, i) => sum + w * (obs.y[i] - fit.fitted[i]) ** 2, 0);
    expect(fit.weightedRss).toBeCloseTo(rss, 10);
  });
  it.each(LAMBDAS)('is had column by column from residual products of unit vectors at lambda %p', (lambda) => {
    const fit = fitSmoothingSpline(obs, lambda);
    const s = naiveSmoother(obs, lambda);
    for (let j = 0; j < n; j++) {
      const unit = new Float64Array(n);
      unit[j] = 1;
      const expected = pulling.map((w, i) => w * (unit[i] - s.get(i, j)));
      expect(worstDifference(fit.residualProduct(unit), expected)).toBeLessThan(DENSE);
    }
  });
  it.each(LAMBDAS)('has rows that sum to one: A takes every line to zero at lambda %p', (lambda) => {
    const fit = fitSmoothingSpline(obs, lambda);
    const zero = obs.t.map(() => 0);
    expect(worstDifference(fit.residualProduct(new Float64Array(n).fill(1)), zero)).toBeLessThan(1e-12);
    expect(worstDifference(fit.residualProduct(obs.t.map((t) => 1e6 + 7 * t)), zero)).toBeLessThan(1e-9);
  });
  it.each(LAMBDAS)('has the blocks of its lots at lambda %p', (lambda) => {
    const fit = fitSmoothingSpline(obs, lambda);
    const s = naiveSmoother(obs, lambda);
    for (let lot = 0; lot < obs.pulls.length; lot++) {
      const own = pulling.map((_, i) => i).filter((i) => obs.lot[i] === lot);
      const expected = own.flatMap((p) => own.map((q) => s.get(p, q)));
      expect(worstDifference(fit.smootherBlock(lot), expected)).toBeLessThan(DENSE);
    }
  });
});

describe('the covariance between two times', () => {
  it.each(SERIES)('agrees with dense algebra on and between the points of %s', (_name, plain) => {
    const end = plain.t[plain.t.length - 1];
    const times = [0, 0.01, 1, 1.5, 1.75, 3, 0.5 * end, 0.9 * end, end];
    const { obs, at } = withIdlePoints(plain, times);
    for (const lambda of LAMBDAS) {
      const fit = fitSmoothingSpline(plain, lambda);
      const { covariance } = naiveSpline(obs, lambda);
      times.forEach((a, i) =>
        times.forEach((b, j) => {
          const expected = covariance.get(at[i], at[j]);
          const scale = Math.sqrt(covariance.get(at[i], at[i]) * covariance.get(at[j], at[j]));
          expect(Math.abs(fit.covariance(a, b) - expected)).toBeLessThan(DENSE_NEAR_TIMES * scale);
        }),
      );
    }
  });
  it('is symmetric, and the squared standard error on its diagonal, also beyond the ends', () => {
    const obs = wavySeries(30, 43, (i) => i % 4, [1]);
    const fit = fitSmoothingSpline(obs, 3);
    const times = [-20, -1, 0, 4.5, obs.t[29], obs.t[29] + 2, obs.t[29] + 50];
    for (const a of times) {
      expect(fit.covariance(a, a)).toBeCloseTo(fit.at(a).standardError ** 2, 9);
      for (const b of times) expect(fit.covariance(a, b)).toBe(fit.covariance(b, a));
    }
  });
  // Beyond the end g(end + d) = g + d g' + noise whose variance is d^3 / (3 lambda) and which nothing before the end knows of.
  it('beyond the end is that of the straight line there', () => {
    const obs = wavySeries(30, 44);
    const lambda = 2;
    const fit = fitSmoothingSpline(obs, lambda);
    const end = obs.t[29];
    const slopeCovariance = fit.covariance(end, end + 1) - fit.covariance(end, end);
    for (const d of [0.5, 3, 40]) {
      expect(fit.covariance(end, end + d)).toBeCloseTo(fit.covariance(end, end) + d * slopeCovariance, 9);
      const own = fit.covariance(end + d, end + d) - fit.covariance(end + d, end);
      // The two times share all of g and g' and the noise up to the nearer one: d^2 (3 D - d) / (6 lambda), D the farther.
      const far = fit.covariance(end + d, end + 2 * d) - fit.covariance(end + d, end + d);
      const slopeVariance = (own - d * slopeCovariance - d ** 3 / (3 * lambda)) / d ** 2;
      expect(far / (d * slopeCovariance + d * d * slopeVariance + d ** 3 / (2 * lambda))).toBeCloseTo(1, 8);
    }
  });
  it('gives a movement with the error of the straight line when lambda is infinite', () => {
    const obs = observations([0, 1, 2, 3, 4], [1, 3, 2, 5, 4]);
    const fit = fitSmoothingSpline(obs, Infinity);
    // Cov(g(a), g(b)) = 1/5 + (a - 2)(b - 2)/10.
    for (const a of [-1, 0, 2.5])
      for (const b of [0.5, 4, 9]) expect(fit.covariance(a, b)).toBeCloseTo(0.2 + ((a - 2) * (b - 2)) / 10, 12);
  });
  it('of a time that is not finite is refused', () => {
    const fit = fitSmoothingSpline(wavySeries(10, 1), 1);
    for (const t of [NaN, Infinity]) expect(() => fit.covariance(0, t)).toThrow(BaselineError);
  });
});

describe('the curve', () => {
  const obs = withFactors(
    wavySeries(24, 45, (i) => i % 6),
    (lot) => [1, 1, 0, 0.5, 1, 0.1][lot],
  );
  const end = obs.t[23];
  it.each(LAMBDAS)('has the slope and curvature of its differences at lambda %p', (lambda) => {
    const fit = fitSmoothingSpline(obs, lambda);
    const scale = Math.max(...fit.curvature.map(Math.abs));
    for (const t of [-2, 0.3, 2.2, 5, 9.7, end - 0.05, end + 3]) {
      const h = 1e-3;
      const [a, b, c] = [fit.at(t - h), fit.at(t), fit.at(t + h)];
      expect(Math.abs(b.slope - (c.value - a.value) / (2 * h))).toBeLessThan(1e-5 * Math.max(1, scale));
      expect(Math.abs(b.curvature - (c.slope - a.slope) / (2 * h))).toBeLessThan(1e-3 * scale);
    }
  });
  it.each(LAMBDAS)('is natural: no curvature at the outermost pulling points and beyond, at lambda %p', (lambda) => {
    const idleEnds = withFactors(wavySeries(24, 46), (lot) => (lot < 2 || lot > 21 ? 0 : 1));
    const { curvature, at } = bound(fitSmoothingSpline(idleEnds, lambda));
    for (const k of [0, 1, 2, 21, 22, 23]) expect(curvature[k]).toBe(0);
    expect([at(-1).curvature, at(idleEnds.t[23] + 1).curvature]).toEqual([0, 0]);
  });
  it.each(LAMBDAS)('is its pieces, with value, slope and curvature meeting, at lambda %p', (lambda) => {
    const fit = fitSmoothingSpline(obs, lambda);
    const { breaks, coefficients: c } = fit.pieces();
    expect([...breaks]).toEqual([...new Set(obs.t)]);
    const scale = Math.max(...fit.curvature.map(Math.abs), 1);
    for (let k = 0; k + 1 < breaks.length; k++) {
      for (const share of [0, 0.3, 0.7, 1]) {
        const x = share * (breaks[k + 1] - breaks[k]);
        const there = fit.at(breaks[k] + x);
        const i = 4 * k;
        const value = c[i] + x * (c[i + 1] + x * (c[i + 2] + x * c[i + 3]));
        const slope = c[i + 1] + x * (2 * c[i + 2] + 3 * x * c[i + 3]);
        expect(Math.abs(there.value - value)).toBeLessThan(1e-11 * scale);
        expect(Math.abs(there.slope - slope)).toBeLessThan(1e-11 * scale);
        expect(Math.abs(there.curvature - (2 * c[i + 2] + 6 * x * c[i + 3]))).toBeLessThan(1e-11 * scale);
      }
    }
  });
  it('has one piece a distinct time', () => {
    const fit = fitSmoothingSpline(observations([0, 0, 1, 3, 3, 4], [1, 2, 1, 0, 1, 3]), 0.5);
    expect([...fit.pieces().breaks]).toEqual([0, 1, 3, 4]);
  });
});

function bound(fit: ReturnType<typeof fitSmoothingSpline>) {
  return { curvature: fit.curvature, at: (t: number) => fit.at(t) };
}

describe('the step that begins at each point', () => {
  it.each(SERIES)('is that of generalised least squares by dense algebra: %s', (_name, obs) => {
    const n = obs.t.length;
    for (const lambda of LAMBDAS) {
      const fit = fitSmoothingSpline(obs, lambda);
      const s = naiveSmoother(obs, lambda);
      const weights = Matrix.diag(Array.from(obs.weight, (w, i) => w * obs.pulls[obs.lot[i]]));
      const a = weights.mmul(Matrix.sub(Matrix.eye(n), s));
      const { estimate, standardError } = fit.stepEstimates();
      for (let k = 0; k < n; k++) {
        const x = Matrix.columnVector(Array.from({ length: n }, (_, i) => (i >= k ? 1 : 0)));
        const information = x.transpose().mmul(a).mmul(x).get(0, 0);
        if (information < 1e-9) {
          expect([estimate[k], standardError[k]]).toEqual([0, Infinity]);
          continue;
        }
        const product = x
          .transpose()
          .mmul(a)
          .mmul(Matrix.columnVector([...obs.y]));
        expect(Math.abs(standardError[k] ** -2 - information)).toBeLessThan(10 * DENSE * Math.max(1, information));
        expect(Math.abs(estimate[k] - product.get(0, 0) / information)).toBeLessThan(
          (10 * DENSE) / Math.min(1, information),
        );
      }
    }
  });
  it('is the same from residual products in a long series, to many digits', () => {
    const obs = wavySeries(2000, 47, (i) => Math.floor(i / 5));
    for (const lambda of [1, 1e5, 1e9]) {
      const fit = fitSmoothingSpline(obs, lambda);
      const { estimate, standardError } = fit.stepEstimates();
      for (const k of [1, 2, 400, 1000, 1998, 1999]) {
        const x = obs.t.map((_, i) => (i >= k ? 1 : 0));
        const product = fit.residualProduct(x);
        const information = product.reduce((sum, v, i) => sum + v * x[i], 0);
        const moved = product.reduce((sum, v, i) => sum + v * obs.y[i], 0);
        expect(standardError[k] ** -2 / information).toBeCloseTo(1, 10);
        expect(estimate[k]).toBeCloseTo(moved / information, 9);
      }
    }
  });
  it('finds a step that is there', () => {
    const obs = wavySeries(200, 48);
    const stepped = { ...obs, y: obs.y.map((y, i) => y + (i >= 120 ? 30 : 0)) };
    const { estimate, standardError } = fitSmoothingSpline(stepped, 1e4).stepEstimates();
    const z = estimate.map((v, k) => Math.abs(v / standardError[k]));
    expect(z.indexOf(Math.max(...z))).toBe(120);
    expect(Math.abs(estimate[120] - 30)).toBeLessThan(4 * standardError[120] + 1);
  });
});

it('a vector of another length, or with a number that is not finite, is refused', () => {
  const fit = fitSmoothingSpline(wavySeries(10, 1), 1);
  expect(() => fit.residualProduct(new Float64Array(9))).toThrow(BaselineError);
  expect(() => fit.residualProduct(new Float64Array(10).fill(NaN))).toThrow(BaselineError);
  expect(() => fit.smootherBlock(10)).toThrow(BaselineError);
});
