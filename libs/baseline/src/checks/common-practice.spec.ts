import type { BaselineFit, PiecewiseCubic } from '../baseline-fit';
import { chooseBaseline } from '../choice/choose-baseline';
import type { SmoothnessRule } from '../choice/chosen-baseline';
import { fitBaseline } from '../fit-baseline';
import { fitNaturalSpline, fitPolynomial } from '../regression/fit-regression';
import { fitSmoothingSpline } from '../spline/smoothing-spline';
import { rangeOf, reference, worstDifference } from '../testing/reference';
import { observations, wavySeries } from '../testing/series';
import { METHODS } from './methods';
import { byTime, rSeries } from './program-series';

interface CommonPractice {
  interpolant: { x: number[]; y: number[]; at: number[]; value: number[]; slope: number[]; curvature: number[] };
  beyond: { x: number[]; y: number[]; at: number[]; runAway: number[]; knots: number[]; straight: number[] };
}
const { interpolant, beyond } = reference<CommonPractice>('r-common-practice.json');

describe('the penalty', () => {
  const obs = wavySeries(60, 31);
  it('when huge gives the straight line of least squares, a polynomial of degree 1', () => {
    const line = fitPolynomial(obs, 1).fitted;
    const miss = (lambda: number) => worstDifference(fitSmoothingSpline(obs, lambda).fitted, line);
    expect(miss(Infinity)).toBeLessThan(1e-12);
    // The rest of the curve falls as 1 / lambda.
    expect(miss(1e9)).toBeLessThan(1e-3);
    expect(miss(1e12) / miss(1e9)).toBeCloseTo(1e-3, 5);
  });
  it("when tiny gives the natural interpolant, R's splinefun(method = 'natural'), also between and beyond the points", () => {
    const { x, y, at, value, slope, curvature } = interpolant;
    const fit = fitSmoothingSpline(observations(x, y), 1e-10);
    const there = at.map((t) => fit.at(t));
    const scale = rangeOf(y);
    expect(worstDifference(fit.fitted, y)).toBeLessThan(1e-8 * scale);
    expect(
      worstDifference(
        there.map((p) => p.value),
        value,
      ),
    ).toBeLessThan(1e-8 * scale);
    expect(
      worstDifference(
        there.map((p) => p.slope),
        slope,
      ),
    ).toBeLessThan(1e-7 * scale);
    expect(
      worstDifference(
        there.map((p) => p.curvature),
        curvature,
      ),
    ).toBeLessThan(1e-7 * scale);
    expect(fit.edf).toBeCloseTo(x.length, 6);
  });
  it('between them loses degrees of freedom and gains residuals, step by step', () => {
    const fits = Array.from({ length: 30 }, (_, k) => fitSmoothingSpline(obs, 10 ** (k / 2 - 5)));
    fits.slice(1).forEach((fit, k) => {
      expect(fit.edf).toBeLessThan(fits[k].edf);
      expect(fit.weightedRss).toBeGreaterThan(fits[k].weightedRss);
      expect(fit.penalty).toBeLessThan(fits[k].penalty);
    });
  });
});

/** Largest jump at the inner breaks of derivative 0, 1 and 2, each over its largest size. */
function jumps({ breaks, coefficients }: PiecewiseCubic): number[] {
  const worst = [0, 0, 0];
  const size = [0, 0, 0];
  for (let k = 0; k + 2 < breaks.length; k++) {
    const [c0, c1, c2, c3] = coefficients.subarray(4 * k, 4 * k + 4);
    const h = breaks[k + 1] - breaks[k];
    const left = [c0 + h * (c1 + h * (c2 + h * c3)), c1 + h * (2 * c2 + 3 * h * c3), 2 * c2 + 6 * h * c3];
    const right = [coefficients[4 * k + 4], coefficients[4 * k + 5], 2 * coefficients[4 * k + 6]];
    left.forEach((v, d) => {
      worst[d] = Math.max(worst[d], Math.abs(v - right[d]));
      size[d] = Math.max(size[d], Math.abs(v));
    });
  }
  return worst.map((v, d) => v / size[d]);
}

describe('a cubic spline', () => {
  const obs = wavySeries(60, 32);
  it.each(METHODS.filter(([name]) => /spline$/.test(name)))(
    '(%s) keeps value, slope and curvature at its knots',
    (_name, specOf) => {
      for (const jump of jumps(fitBaseline(obs, specOf(obs)).pieces())) expect(jump).toBeLessThan(1e-9);
    },
  );

  const end = obs.t[59];
  const span = end - obs.t[0];
  it.each<[string, BaselineFit]>([
    ['smoothing', fitSmoothingSpline(obs, 3)],
    ['natural regression', fitNaturalSpline(obs, Float64Array.of(0.3 * span, 0.6 * span))],
  ])('with natural ends (%s) is linear beyond them, tangent there, with a band that grows', (_name, fit) => {
    for (const [side, from] of [
      [1, end],
      [-1, obs.t[0]],
    ] as const) {
      const tangent = fit.at(from);
      let band = tangent.standardError;
      expect(Math.abs(tangent.curvature)).toBeLessThan(1e-9);
      for (const share of [0.01, 0.1, 0.5, 1]) {
        const there = fit.at(from + side * share * span);
        expect(Math.abs(there.value - (tangent.value + tangent.slope * side * share * span))).toBeLessThan(1e-9);
        expect(Math.abs(there.slope - tangent.slope)).toBeLessThan(1e-11);
        expect(Math.abs(there.curvature)).toBeLessThan(1e-11);
        expect(there.standardError).toBeGreaterThan(band);
        band = there.standardError;
      }
    }
  });
});

describe('beyond the points', () => {
  const { x, y, at, runAway, knots, straight } = beyond;
  const obs = observations(x, y);
  const scale = rangeOf(y);

  it("a polynomial of degree 4 runs away as R's lm(y ~ poly(t, 4)) says, and is therefore not read there", () => {
    const fit = fitPolynomial(obs, 4);
    const { coefficients } = fit.powers(x[0]);
    const values = at.map((t) => coefficients.reduceRight((sum, c) => sum * (t - x[0]) + c, 0));
    expect(worstDifference(values, runAway)).toBeLessThan(1e-8 * scale);
    for (const t of at) expect(() => fit.at(t)).toThrow('not read beyond');
  });
  it("a natural spline goes on straight as R's lm(y ~ ns(t)) says", () => {
    const fit = fitNaturalSpline(obs, Float64Array.from(knots));
    expect(
      worstDifference(
        at.map((t) => fit.at(t).value),
        straight,
      ),
    ).toBeLessThan(1e-9 * scale);
  });
  it('by R alone: a whole record further on, the polynomial has left the data by more than twice their range, the spline by less than one', () => {
    const [low, high] = [Math.min(...y), Math.max(...y)];
    const left = (v: number) => Math.max(low - v, v - high) / scale;
    for (const k of [0, at.length - 1]) {
      expect(left(runAway[k])).toBeGreaterThan(2);
      expect(left(straight[k])).toBeLessThan(1);
    }
  });
});

describe('a cross-validated error', () => {
  const { x, y, w } = rSeries().find(([name]) => name === 'mcycle')![1];
  it.each<SmoothnessRule>(['lot-cv', 'gcv', 'gcv14'])('(%s) falls and rises again along the penalty, once', (rule) => {
    const { criterion, minima } = chooseBaseline(byTime(x, y, w), { method: 'smoothing-spline', rule });
    const values = criterion.curve.map((c) => c.value);
    const bottom = values.indexOf(Math.min(...values));
    expect(minima).toHaveLength(1);
    expect(bottom).toBeGreaterThan(2);
    expect(bottom).toBeLessThan(values.length - 3);
    expect(values[0]).toBeGreaterThan(1.2 * values[bottom]);
    expect(values[values.length - 1]).toBeGreaterThan(2 * values[bottom]);
    // The line's plateau apart, it falls all the way down and rises all the way up.
    values
      .slice(1)
      .forEach((v, k) =>
        k < bottom ? expect(v).toBeLessThan(values[k]) : expect(v).toBeGreaterThan(0.999 * values[k]),
      );
  });
});
