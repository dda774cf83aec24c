import fc from 'fast-check';
import { BaselineError } from '../baseline-error';
import type { BaselineFit, BaselineSpec } from '../baseline-fit';
import { fitBaseline } from '../fit-baseline';
import type { Observations } from '../observations';
import { METHODS, series, smootherMatrix } from './methods';
import { worstDifference } from '../testing/reference';

const RUNS = { numRuns: 15, seed: 11 };
const pull = ({ weight, lot, pulls }: Observations) => weight.map((w, i) => w * pulls[lot[i]]);
const pointsOf = (obs: Observations, lot: number) => [...obs.lot.keys()].filter((i) => obs.lot[i] === lot);
/**
 * The fit without a lot. A natural spline's ends are the first and the last pulling time, and leaving a lot out is meant at the same basis, as
 * (I - S_II)^-1 (y - g) is: there the lot stays with 1e-13 of its weight.
 */
function without(obs: Observations, lot: number, spec: BaselineSpec): BaselineFit | undefined {
  const left = spec.method === 'natural-spline' ? 1e-13 : 0;
  const pulls = Float64Array.from(obs.pulls, (f, j) => (j === lot && f > 0 ? left : f));
  try {
    return fitBaseline({ ...obs, pulls }, spec);
  } catch (error) {
    expect(error).toBeInstanceOf(BaselineError);
    return undefined;
  }
}

describe.each(METHODS)('the smoother of a %s, taken apart by unit vectors', (_name, specOf) => {
  it('has its leverages, degrees of freedom, blocks and covariances, S C^-1 symmetric, rows that sum to 1', () => {
    fc.assert(
      fc.property(series, (obs) => {
        const spec = specOf(obs);
        const fit = fitBaseline(obs, spec);
        const s = smootherMatrix(obs, spec);
        const v = pull(obs);
        expect(
          worstDifference(
            fit.leverage,
            s.map((row, i) => row[i]),
          ),
        ).toBeLessThan(1e-9);
        expect(Math.abs(fit.edf - s.reduce((sum, row, i) => sum + row[i], 0))).toBeLessThan(1e-9);
        for (let lot = 0; lot < obs.pulls.length; lot++) {
          const points = pointsOf(obs, lot);
          expect(
            worstDifference(
              fit.smootherBlock(lot),
              points.flatMap((p) => points.map((q) => s[p][q])),
            ),
          ).toBeLessThan(1e-9);
        }
        const worst = { rows: 0, covariance: 0, symmetry: 0 };
        const see = (key: keyof typeof worst, difference: number) =>
          (worst[key] = Math.max(worst[key], Math.abs(difference)));
        for (let i = 0; i < v.length; i++) {
          see('rows', s[i].reduce((x, y) => x + y) - 1);
          for (let j = 0; j < v.length; j++) {
            if (v[j] === 0) continue;
            if ((i + j) % 3 === 0) see('covariance', fit.covariance(obs.t[i], obs.t[j]) - s[i][j] / v[j]);
            if (v[i] > 0) see('symmetry', s[i][j] / v[j] - s[j][i] / v[i]);
          }
        }
        expect(worst.rows).toBeLessThan(1e-9);
        expect(worst.covariance).toBeLessThan(1e-8);
        expect(worst.symmetry).toBeLessThan(1e-8);
      }),
      RUNS,
    );
  });

  it('gives A x = V W (I - S) x and the steps by generalised least squares', () => {
    fc.assert(
      fc.property(series, (obs) => {
        const spec = specOf(obs);
        const fit = fitBaseline(obs, spec);
        const s = smootherMatrix(obs, spec);
        const v = pull(obs);
        const a = (x: ArrayLike<number>) =>
          s.map((row, i) => v[i] * (x[i] - row.reduce((sum, c, j) => sum + c * x[j], 0)));
        expect(worstDifference(fit.residualProduct(obs.y), a(obs.y))).toBeLessThan(1e-8);
        const { estimate, standardError } = fit.stepEstimates();
        expect(standardError[0]).toBe(Infinity);
        for (let k = 1; k < v.length; k++) {
          const x = v.map((_, i) => (i >= k ? 1 : 0));
          const ax = a(x);
          const xax = ax.reduce((sum, c, i) => sum + c * x[i], 0);
          // Where the baseline follows the step nearly all the way, brute force has no digits left.
          if (xax < 1e-5) continue;
          const delta = a(obs.y).reduce((sum, c, i) => sum + c * x[i], 0) / xax;
          expect(Math.abs(estimate[k] - delta)).toBeLessThan(1e-8 / xax);
          expect(Math.abs(standardError[k] * Math.sqrt(xax) - 1)).toBeLessThan(1e-8 / xax);
        }
      }),
      RUNS,
    );
  });

  it('deletes lots as refits without them do, with their covariance and scores', () => {
    fc.assert(
      fc.property(series, (obs) => {
        const spec = specOf(obs);
        const fit = fitBaseline(obs, spec);
        const scores = fit.scoreLots();
        for (let lot = 0; lot < obs.pulls.length; lot++) {
          const points = pointsOf(obs, lot);
          if (points.length === 0) {
            expect([scores.residual[lot], scores.variance[lot]]).toEqual([0, Infinity]);
            continue;
          }
          const refit = without(obs, lot, spec);
          // Where the others determine it by a thread or not at all, there is nothing to compare with.
          if (refit === undefined || refit.standardError.some((e) => e > 100)) continue;
          const [{ residual, covariance }] = fit.deletedLots(Int32Array.of(lot));
          expect(
            worstDifference(
              residual,
              points.map((i) => obs.y[i] - refit.fitted[i]),
            ),
          ).toBeLessThan(1e-6);
          const expected = points.flatMap((p) =>
            points.map((q) => refit.covariance(obs.t[p], obs.t[q]) + (p === q ? 1 / obs.weight[p] : 0)),
          );
          expect(worstDifference(covariance, expected)).toBeLessThan(1e-6 * Math.max(...expected));
          const m = points.length;
          const mean = points.reduce((sum, i) => sum + obs.y[i] - refit.fitted[i], 0) / m;
          const variance = expected.reduce((a, b) => a + b) / (m * m);
          expect(Math.abs(scores.residual[lot] - mean)).toBeLessThan(1e-6);
          expect(Math.abs(scores.variance[lot] / variance - 1)).toBeLessThan(1e-6);
        }
      }),
      RUNS,
    );
  });
});
