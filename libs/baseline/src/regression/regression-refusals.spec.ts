import fc from 'fast-check';
import { BaselineError } from '../baseline-error';
import { fitBaseline } from '../fit-baseline';
import { worstDifference } from '../testing/reference';
import { observations, wavySeries } from '../testing/series';
import { fitBSpline, fitConstant, fitNaturalSpline, fitPolynomial } from './fit-regression';
import { placeKnots } from './place-knots';

const refusal = (code: string, message = '') =>
  expect.objectContaining({ code, message: expect.stringContaining(message) });
const knots = (...at: number[]) => Float64Array.from(at);

describe('what has no answer', () => {
  const obs = wavySeries(20, 41);
  const end = obs.t[19];

  it.each([
    ['out of order', knots(5, 4)],
    ['twice the same', knots(4, 4)],
    ['at the first time', knots(0, 4)],
    ['at the last time', knots(4, end)],
    ['outside', knots(4, end + 1)],
  ])('knots %s are refused', (_name, at) => {
    expect(() => fitNaturalSpline(obs, at)).toThrow(refusal('bad-argument'));
    expect(() => fitBSpline(obs, at)).toThrow(refusal('bad-argument'));
  });
  it.each([NaN, Infinity])('a knot at %p is refused', (at) => {
    expect(() => fitNaturalSpline(obs, knots(at))).toThrow(refusal('non-finite'));
  });
  it.each([-1, 6, 1.5, NaN])('a degree of %p is refused', (degree) => {
    expect(() => fitPolynomial(obs, degree)).toThrow(refusal('bad-argument'));
  });
  it('an unknown method is refused', () => {
    expect(() => fitBaseline(obs, { method: 'moving-average' } as never)).toThrow(refusal('bad-argument'));
  });

  it('fewer distinct times than functions are too little; as many are fitted exactly, and no lot is determined without itself', () => {
    const five = observations([0, 1, 1, 2, 4, 5], [1, 2, 2, 0, 3, 1]);
    expect(() => fitPolynomial(five, 5)).toThrow(refusal('insufficient-data', '5 distinct times; 6'));
    expect(() => fitBSpline(five, knots(1.5, 3))).toThrow(refusal('insufficient-data'));
    expect(() => fitNaturalSpline(five, knots(0.5, 1.5, 2.5, 4.5))).toThrow(refusal('insufficient-data'));
    for (const fit of [fitPolynomial(five, 4), fitBSpline(five, knots(1.5)), fitNaturalSpline(five, knots(1, 2, 3))]) {
      expect(worstDifference(fit.fitted, five.y)).toBeLessThan(1e-12);
      // The two at one time stand in for each other.
      expect(fit.scoreLots().undetermined).toEqual([0, 3, 4, 5]);
      expect(() => fit.deletedLots()).toThrow(refusal('insufficient-data', 'lot 0'));
      expect(fit.deletedLots(Int32Array.of(1, 2)).map((d) => Math.abs(d.residual[0]) < 1e-12)).toEqual([true, true]);
    }
  });

  it('a stretch between knots without points is named', () => {
    const gap = observations([0, 1, 2, 3, 4, 5, 6, 7, 18, 19, 20, 21, 22], [0, 1, 0, 1, 0, 1, 0, 1, 0, 1, 0, 1, 0]);
    const inGap = knots(4, 8, 10, 12, 14, 16);
    expect(() => fitBSpline(gap, inGap)).toThrow(refusal('ill-posed', 'between 8 and 16'));
    expect(() => fitNaturalSpline(gap, inGap)).toThrow(refusal('ill-posed', 'between 8 and 16'));
    expect(fitNaturalSpline(gap, knots(4, 12, 20)).edf).toBe(5);
  });
  it('times in clusters too close for the degree are ill-posed', () => {
    const clusters = observations([0, 1e-6, 2e-6, 3e-6, 1e6], [0, 1, 0, 1, 2]);
    expect(() => fitPolynomial(clusters, 4)).toThrow(refusal('ill-posed'));
    expect(fitPolynomial(clusters, 1).edf).toBe(2);
  });

  it('lots, vectors and counts of the wrong size or kind are refused', () => {
    for (const fit of [fitConstant(obs), fitPolynomial(obs, 3), fitNaturalSpline(obs, knots(5))]) {
      expect(() => fit.deletedLots(Int32Array.of(20))).toThrow(refusal('bad-argument'));
      expect(() => fit.smootherBlock(-1)).toThrow(refusal('bad-argument'));
      expect(() => fit.residualProduct(new Float64Array(19))).toThrow(refusal('bad-argument'));
      expect(() => fit.residualProduct(new Float64Array(20).fill(NaN))).toThrow(refusal('non-finite'));
      expect(() => fit.scoreLots(new Float64Array(3))).toThrow(refusal('bad-argument'));
      expect(() => fit.scoreLots(new Float64Array(20).fill(-1))).toThrow(refusal('bad-argument'));
      expect(() => fit.scoreLots(new Float64Array(20).fill(NaN))).toThrow(refusal('non-finite'));
      expect(() => fit.scoreLots(new Float64Array(20))).toThrow(refusal('bad-argument'));
    }
  });
});

describe('lots that decide', () => {
  it('a lot without which a stretch is empty is undetermined, and the others are not', () => {
    const obs = wavySeries(24, 42, (i) => Math.floor(i / 4));
    const [a, b, c, d] = obs.t.slice(8, 12);
    const at = knots(a, (a + b) / 2, b, c, d);
    for (const fit of [fitBSpline(obs, at), fitNaturalSpline(obs, at)]) {
      const { undetermined, variance, residual, deletedResidual } = fit.scoreLots();
      expect(undetermined).toEqual([2]);
      expect([variance[2], residual[2], deletedResidual[8]]).toEqual([Infinity, 0, 0]);
      expect(() => fit.deletedLots(Int32Array.of(2))).toThrow(refusal('insufficient-data', 'lot 2'));
      expect(fit.deletedLots(Int32Array.of(1, 3))).toHaveLength(2);
    }
  });

  it('a chain of functions hides no undetermined lot: with as many times as functions each lot is one, however many', () => {
    for (const n of [8, 20, 40, 80]) {
      const obs = wavySeries(n, 43);
      const fit = fitNaturalSpline(obs, obs.t.slice(1, n - 1));
      expect(fit.scoreLots().undetermined).toHaveLength(n);
      const tight = fitNaturalSpline(obs, obs.t.slice(1, n - 2));
      expect(tight.scoreLots().undetermined).not.toContain(2);
    }
  });

  it.each([1e6, 1e9])('a lot that outweighs all others %p times is still taken out with all digits', (factor) => {
    const obs = wavySeries(40, 44, (i) => Math.floor(i / 4));
    const weight = obs.weight.map((w, i) => (obs.lot[i] === 5 ? w * factor : w));
    for (const fitter of [
      (o: typeof obs) => fitNaturalSpline(o, knots(6, 12, 18)),
      (o: typeof obs) => fitPolynomial(o, 3),
      fitConstant,
    ]) {
      const others = fitter({ ...obs, pulls: obs.pulls.map((v, j) => (j === 5 ? 0 : v)) });
      const [{ residual, covariance, indices }] = fitter({ ...obs, weight }).deletedLots(Int32Array.of(5));
      expect(
        worstDifference(
          residual,
          Array.from(indices, (i) => obs.y[i] - others.fitted[i]),
        ),
      ).toBeLessThan(1e-9);
      const variance = others.standardError[indices[1]] ** 2 + 1 / weight[indices[1]];
      expect(Math.abs(covariance[5] / variance - 1)).toBeLessThan(1e-9);
    }
  });
});

describe('any finite observations', () => {
  const finite = (min: number, max: number) => fc.double({ min, max, noNaN: true });
  const point = fc.record({
    gap: fc.oneof(fc.constant(0), finite(0, 1), finite(0, 1e9)),
    y: finite(-1e12, 1e12),
    decade: fc.integer({ min: -9, max: 9 }),
    lot: fc.nat(6),
  });
  it('give finite numbers or a typed error', () => {
    fc.assert(
      fc.property(
        fc.array(point, { minLength: 3, maxLength: 30 }),
        fc.nat(6),
        fc.constantFrom('natural-spline', 'b-spline', 'polynomial', 'constant'),
        fc.array(fc.constantFrom(0, 1e-9, 0.5, 1), { minLength: 7, maxLength: 7 }),
        fc.constantFrom('even' as const, 'quantile' as const, 'variability' as const),
        (points, size, method, pulls, placement) => {
          let at = 0;
          const obs = {
            ...observations(
              points.map((p) => (at += p.gap)),
              points.map((p) => p.y),
              points.map((p) => p.lot),
              points.map((p) => 10 ** p.decade),
            ),
            pulls: Float64Array.from(pulls),
          };
          try {
            const fit =
              method === 'polynomial'
                ? fitPolynomial(obs, Math.min(5, size))
                : method === 'constant'
                  ? fitConstant(obs)
                  : fitBaseline(obs, { method, knots: placeKnots(obs, size, placement) });
            const scores = fit.scoreLots();
            const steps = fit.stepEstimates();
            const { breaks, coefficients } = fit.pieces();
            const determined = scores.variance.filter((_, j) => !scores.undetermined.includes(j));
            const lists = [fit.fitted, fit.slope, fit.curvature, fit.standardError, fit.leverage, breaks, coefficients];
            return (
              [...lists, scores.residual, scores.deletedResidual, steps.estimate, fit.residualProduct(obs.y)].every(
                (list) => list.every(Number.isFinite),
              ) &&
              determined.every((v) => v > 0) &&
              steps.standardError.every((v) => v > 0)
            );
          } catch (error) {
            return error instanceof BaselineError;
          }
        },
      ),
      { numRuns: 1500, seed: 6 },
    );
  });
});
