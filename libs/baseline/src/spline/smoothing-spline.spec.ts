import fc from 'fast-check';
import { BaselineError } from '../baseline-error';
import { lambdaForPeriod } from '../drift-period';
import type { Observations } from '../observations';
import { fitSmoothingSpline, type SmoothingSplineFit } from './smoothing-spline';
import { naiveSpline, reinschFit } from '../testing/naive-spline';
import { worstDifference } from '../testing/reference';
import { observations, wavySeries } from '../testing/series';

function weightedLine({ t, y, weight }: Observations): (x: number) => number {
  let [w0, w1, w2, v0, v1] = [0, 0, 0, 0, 0];
  for (let i = 0; i < t.length; i++) {
    w0 += weight[i];
    w1 += weight[i] * t[i];
    w2 += weight[i] * t[i] * t[i];
    v0 += weight[i] * y[i];
    v1 += weight[i] * y[i] * t[i];
  }
  const slope = (w0 * v1 - w1 * v0) / (w0 * w2 - w1 * w1);
  return (x) => (v0 - slope * w1) / w0 + slope * x;
}

/** All that a fit says, at and between its points and beyond them. */
function everyNumber(fit: SmoothingSplineFit): number[] {
  const { breaks, coefficients } = fit.pieces();
  const [start, end] = [breaks[0], breaks[breaks.length - 1]];
  const times = [start - 1, start, 0.7 * start + 0.3 * end, end, end + 1];
  const scores = fit.scoreLots();
  const isScored = (_: number, lot: number) => scores.variance[lot] < Infinity;
  const steps = fit.stepEstimates();
  return [
    fit.edf,
    fit.weightedRss,
    fit.penalty,
    fit.restrictedDeviance,
    ...fit.fitted,
    ...fit.slope,
    ...fit.curvature,
    ...fit.standardError,
    ...fit.leverage,
    ...coefficients,
    ...times.flatMap((t) => Object.values(fit.at(t)) as number[]),
    ...times.map((t) => fit.covariance(start, t)),
    ...fit.residualProduct(fit.slope),
    ...scores.deletedResidual,
    ...scores.residual,
    ...scores.variance.filter(isScored),
    ...steps.estimate,
    ...steps.standardError.map((v) => 1 / v),
    ...Array.from(scores.variance, (_, lot) => [...fit.smootherBlock(lot)]).flat(),
    ...fit
      .deletedLots(Int32Array.from(scores.variance.keys()).filter((lot) => !scores.undetermined.includes(lot)))
      .flatMap((d) => [...d.residual, ...d.covariance]),
  ];
}

describe('the limits of the penalty', () => {
  const obs = wavySeries(50, 11);
  it.each([1e12, 1e20, Infinity])('%p gives the weighted straight line', (lambda) => {
    const fit = fitSmoothingSpline(obs, lambda);
    const line = weightedLine(obs);
    const tolerance = lambda < 1e15 ? 1e-5 : 1e-12;
    expect(worstDifference(fit.fitted, [...obs.t].map(line))).toBeLessThan(tolerance * 10);
    expect(fit.edf).toBeCloseTo(2, 5);
    expect(Math.abs(fit.at(1000).value - line(1000))).toBeLessThan(tolerance * 1000);
    expect(fit.penalty).toBeLessThan(1e-10);
  });
  it('a tiny one gives the interpolant', () => {
    const fit = fitSmoothingSpline(obs, 1e-14);
    expect(worstDifference(fit.fitted, obs.y)).toBeLessThan(1e-11);
    expect(fit.edf).toBeCloseTo(50, 9);
  });
});

describe('a second implementation', () => {
  it.each([1e-3, 1, 50, 1e4])("Reinsch's banded system gives the same values at lambda %p", (lambda) => {
    const obs = wavySeries(60, 12);
    expect(
      worstDifference(fitSmoothingSpline(obs, lambda).fitted, reinschFit(obs.t, obs.y, obs.weight, lambda)),
    ).toBeLessThan(1e-9);
  });
  it('dense algebra gives the same covariance, with ties, lots that do not pull and a leverage of 0 for them', () => {
    const t = [0, 0, 1, 2, 2, 2, 4, 5, 5, 7, 8];
    const obs = observations(
      t,
      t.map((x, i) => Math.cos(x) + ((i * 5) % 7) / 7),
      t.map((_, i) => i % 4),
      t.map((_, i) => 1 + (i % 3)),
      [1],
    );
    for (const lambda of [0.01, 1, 100]) {
      const fit = fitSmoothingSpline(obs, lambda);
      const naive = naiveSpline(obs, lambda);
      expect(worstDifference(fit.fitted, naive.fitted)).toBeLessThan(1e-10);
      const variances = naive.covariance.diagonal();
      expect(worstDifference(fit.standardError, variances.map(Math.sqrt))).toBeLessThan(1e-10);
      expect(
        worstDifference(
          fit.leverage,
          variances.map((v, i) => (i % 4 === 1 ? 0 : v * obs.weight[i])),
        ),
      ).toBeLessThan(1e-10);
      expect(Math.abs(fit.penalty - naive.penalty)).toBeLessThan(1e-9);
    }
  });
});

describe('between the points and beyond them', () => {
  const obs = wavySeries(30, 13);
  const fit = fitSmoothingSpline(obs, 0.5);
  it('the curve passes through its fitted values with their slopes and errors', () => {
    obs.t.forEach((t, i) => {
      const there = fit.at(t);
      expect(there.value).toBeCloseTo(fit.fitted[i], 11);
      expect(there.slope).toBeCloseTo(fit.slope[i], 11);
      expect(there.standardError).toBeCloseTo(fit.standardError[i], 11);
    });
  });
  it('the curve is a cubic between two points: its fourth difference vanishes', () => {
    const h = (obs.t[11] - obs.t[10]) / 4;
    const [a, b, c, d, e] = [0, 1, 2, 3, 4].map((k) => fit.at(obs.t[10] + k * h).value);
    expect(Math.abs(a - 4 * b + 6 * c - 4 * d + e)).toBeLessThan(1e-12);
  });
  it('the projection is the end tangent, and its band grows', () => {
    const end = obs.t[29];
    for (const d of [0.1, 1, 10]) {
      expect(fit.at(end + d).value).toBeCloseTo(fit.fitted[29] + d * fit.slope[29], 10);
      expect(fit.at(obs.t[0] - d).value).toBeCloseTo(fit.fitted[0] - d * fit.slope[0], 10);
    }
    const band = [0, 0.1, 1, 5, 20].map((d) => fit.at(end + d).standardError);
    band.slice(1).forEach((v, i) => expect(v).toBeGreaterThan(band[i]));
    const far = 1e3;
    const q = 1 / 0.5;
    expect(fit.at(end + far).standardError ** 2).toBeGreaterThan((q * far ** 3) / 3);
  });
});

describe('period and penalty', () => {
  // Gain of the equivalent kernel at period P: 1 / (1 + (T/P)^4) (Silverman 1984).
  it.each([
    [0.5, 1 / 17],
    [1, 1 / 2],
    [2, 16 / 17],
  ])('a sinusoid of %p T passes with its share on a dense even grid', (ratio, gain) => {
    const [n, spacing, weight, period] = [4000, 10, 0.7, 2000];
    const t = Array.from({ length: n }, (_, i) => i * spacing);
    const omega = (2 * Math.PI) / (ratio * period);
    const y = t.map((x) => Math.sin(omega * x));
    const fit = fitSmoothingSpline(
      observations(
        t,
        y,
        undefined,
        t.map(() => weight),
      ),
      lambdaForPeriod(weight / spacing, period),
    );
    let [cross, square] = [0, 0];
    for (let i = n / 4; i < (3 * n) / 4; i++) {
      cross += fit.fitted[i] * y[i];
      square += y[i] * y[i];
    }
    expect(cross / square).toBeCloseTo(gain, 4);
  });
});

describe('scale and origin', () => {
  const obs = wavySeries(40, 14, (i) => Math.floor(i / 2));
  it.each([
    [1e6, 1e-6],
    [1e-6, 1e6],
    [1e5, 1e12],
  ])('time by %p and values by %p change nothing but units', (time, value) => {
    const scaled = {
      ...obs,
      t: obs.t.map((t) => t * time),
      y: obs.y.map((y) => y * value),
      weight: obs.weight.map((w) => w / value ** 2),
    };
    const fit = fitSmoothingSpline(obs, 2);
    const other = fitSmoothingSpline(scaled, (2 * time ** 3) / value ** 2);
    expect(
      worstDifference(
        other.fitted.map((v) => v / value),
        fit.fitted,
      ),
    ).toBeLessThan(1e-10);
    expect(
      worstDifference(
        other.standardError.map((v) => v / value),
        fit.standardError,
      ),
    ).toBeLessThan(1e-10);
    expect(
      worstDifference(
        other.slope.map((v) => (v * time) / value),
        fit.slope,
      ),
    ).toBeLessThan(1e-10);
    expect(other.edf).toBeCloseTo(fit.edf, 10);
    expect(other.weightedRss).toBeCloseTo(fit.weightedRss, 9);
  });
  it('an added line is added to the fit', () => {
    const line = (t: number) => 500 - 3 * t;
    const other = fitSmoothingSpline({ ...obs, y: obs.y.map((y, i) => y + line(obs.t[i])) }, 2);
    const fit = fitSmoothingSpline(obs, 2);
    expect(
      worstDifference(
        other.fitted,
        fit.fitted.map((v, i) => v + line(obs.t[i])),
      ),
    ).toBeLessThan(1e-11);
  });
  it('the same observations give the same bits', () => {
    expect(everyNumber(fitSmoothingSpline(obs, 2))).toEqual(everyNumber(fitSmoothingSpline(obs, 2)));
  });
});

describe('awkward series', () => {
  it.each([
    ['constant values', [0, 1, 2, 3, 5], [7, 7, 7, 7, 7]],
    ['an exact line', [0, 1, 2, 3, 5], [1, 3, 5, 7, 11]],
    ['three points of a line', [0, 2, 3], [0, 4, 6]],
  ])('%s are fitted exactly at every lambda', (_name, t, y) => {
    for (const lambda of [1e-9, 1, 1e9, Infinity]) {
      const fit = fitSmoothingSpline(observations(t, y), lambda);
      expect(worstDifference(fit.fitted, y)).toBeLessThan(1e-13);
      expect(fit.weightedRss).toBeLessThan(1e-25);
      for (const { residual } of fit.deletedLots()) expect(Math.abs(residual[0])).toBeLessThan(1e-12);
    }
  });
  it('never answers NaN: finite observations give finite numbers or a typed error', () => {
    const finite = (min: number, max: number) => fc.double({ min, max, noNaN: true });
    const point = fc.record({
      gap: fc.oneof(fc.constant(0), finite(0, 1), finite(0, 1e9)),
      y: finite(-1e12, 1e12),
      decade: fc.integer({ min: -9, max: 9 }),
      lot: fc.nat(4),
    });
    fc.assert(
      fc.property(
        fc.array(point, { minLength: 1, maxLength: 30 }),
        fc.integer({ min: -15, max: 30 }),
        (points, decade) => {
          let at = 0;
          const t = points.map((p) => (at += p.gap));
          const obs = observations(
            t,
            points.map((p) => p.y),
            points.map((p) => p.lot),
            points.map((p) => 10 ** p.decade),
          );
          try {
            return everyNumber(fitSmoothingSpline(obs, 10 ** decade)).every(Number.isFinite);
          } catch (error) {
            return error instanceof BaselineError;
          }
        },
      ),
      { numRuns: 500, seed: 5 },
    );
  });
});
