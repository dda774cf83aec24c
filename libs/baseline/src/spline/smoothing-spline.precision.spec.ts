import { fitSmoothingSpline } from './smoothing-spline';
import { lcg } from '../testing/lcg';
import { rangeOf, reference, worstDifference } from '../testing/reference';
import { observations } from '../testing/series';

interface ExactFit {
  lambda: number;
  fitted: number[];
  slope: number[];
  standardError: number[];
  leverage: number[];
  deletedResidual: number[];
  deletedVariance: number[];
  edf: number;
  weightedRss: number;
  penalty: number;
  deviance: number;
  at: { t: number; value: number; slope: number; standardError: number }[];
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
    it.each(fits.map((fit) => [fit.lambda, fit] as const))('at lambda %p', (lambda, expected) => {
      const fit = fitSmoothingSpline(obs, lambda);
      const scale = rangeOf(y);
      expect(worstDifference(fit.fitted, expected.fitted)).toBeLessThan(1e-9 * scale);
      expect(worstDifference(fit.slope, expected.slope)).toBeLessThan(
        1e-9 * Math.max(scale / rangeOf(t), rangeOf(expected.slope)),
      );
      expect(relative(fit.standardError, expected.standardError)).toBeLessThan(1e-9);
      expect(relative(fit.leverage, expected.leverage)).toBeLessThan(1e-9);
      expect(Math.abs(fit.edf - expected.edf)).toBeLessThan(1e-9);
      expect(Math.abs(fit.weightedRss - expected.weightedRss)).toBeLessThan(
        1e-9 * (expected.weightedRss + lambda * expected.penalty),
      );
      expect(Math.abs(fit.penalty - expected.penalty) * lambda).toBeLessThan(
        1e-9 * (expected.weightedRss + lambda * expected.penalty),
      );
      const deleted = fit.deletedLots();
      const residualScale = Math.max(...expected.deletedResidual.map(Math.abs));
      expect(
        worstDifference(
          deleted.map((d) => d.residual[0]),
          expected.deletedResidual,
        ),
      ).toBeLessThan(1e-9 * residualScale);
      expect(
        relative(
          deleted.map((d) => d.covariance[0]),
          expected.deletedVariance,
        ),
      ).toBeLessThan(1e-9);
      for (const point of expected.at) {
        const there = fit.at(point.t);
        expect(Math.abs(there.value - point.value)).toBeLessThan(1e-9 * scale);
        expect(Math.abs(there.standardError / point.standardError - 1)).toBeLessThan(1e-9);
        expect(Math.abs(there.slope - point.slope)).toBeLessThan(
          1e-9 * Math.max(scale / rangeOf(t), rangeOf(expected.slope)),
        );
      }
    });
    it('in the restricted likelihood, up to one constant for all lambda', () => {
      const offsets = fits.map((fit) => fitSmoothingSpline(obs, fit.lambda).restrictedDeviance - fit.deviance);
      const size = Math.max(...fits.map((fit) => Math.abs(fit.deviance)));
      for (const offset of offsets) expect(Math.abs(offset - offsets[0])).toBeLessThan(1e-9 * size);
    });
  },
);

interface LongReference {
  n: number;
  lastTime: number;
  lastValue: number;
  lastWeight: number;
  fits: { lambda: number; points: number[][]; edf: number; weightedRss: number; penalty: number }[];
}

describe('a slow baseline of 100,000 points agrees with quadruple precision', () => {
  const long = reference<LongReference>('quad-smoothing-spline.json');
  const { t, y, w } = longSeries(long.n);
  const obs = observations([...t], [...y], undefined, [...w]);

  it('on the same doubles', () => {
    expect([t[long.n - 1], y[long.n - 1], w[long.n - 1]]).toEqual([long.lastTime, long.lastValue, long.lastWeight]);
  });
  it.each(long.fits.map((fit) => [fit.edf, fit] as const))('with %p degrees of freedom', (_edf, expected) => {
    const fit = fitSmoothingSpline(obs, expected.lambda);
    const deleted = fit.deletedLots(Int32Array.from(expected.points, (p) => p[0]));
    const scale = rangeOf(expected.points.map((p) => p[1]));
    const at = (x: Float64Array) => expected.points.map((p) => x[p[0]]);
    expect(
      worstDifference(
        at(fit.fitted),
        expected.points.map((p) => p[1]),
      ),
    ).toBeLessThan(1e-12 * scale);
    expect(
      relative(
        at(fit.standardError),
        expected.points.map((p) => p[2]),
      ),
    ).toBeLessThan(1e-12);
    expect(
      worstDifference(
        deleted.map((d) => d.residual[0]),
        expected.points.map((p) => p[3]),
      ),
    ).toBeLessThan(1e-10);
    expect(Math.abs(fit.edf / expected.edf - 1)).toBeLessThan(1e-12);
    expect(Math.abs(fit.weightedRss / expected.weightedRss - 1)).toBeLessThan(1e-11);
    expect(Math.abs(fit.penalty / expected.penalty - 1)).toBeLessThan(1e-11);
  });
});

/** The series of tools/reference/quad_spline.c, double for double. */
function longSeries(n: number): { t: Float64Array; y: Float64Array; w: Float64Array } {
  const uniform = lcg(20240229);
  const t = new Float64Array(n);
  const y = new Float64Array(n);
  const w = new Float64Array(n);
  for (let i = 0; i < n; i++) {
    const u = uniform();
    t[i] = i > 0 ? t[i - 1] + 600 + 300 * u : 1700000000;
    const s = i / (n - 1);
    const u1 = uniform();
    const u2 = uniform();
    const u3 = uniform();
    y[i] = 40 + 8 * s * (1 - s) * (1 - 2 * s) + (u1 + u2 + u3 - 1.5);
    w[i] = 0.5 + uniform();
  }
  return { t, y, w };
}
