import { BaselineError } from '../baseline-error';
import type { Observations } from '../observations';
import { fitSmoothingSpline } from './smoothing-spline';
import { naiveSpline } from '../testing/naive-spline';
import { observations, wavySeries } from '../testing/series';

/** Largest difference of residuals and covariances from refits by dense algebra without each lot, relative to their size. */
function worstAgainstRefits(obs: Observations, lambda: number): number {
  let worst = 0;
  for (const deleted of fitSmoothingSpline(obs, lambda).deletedLots()) {
    const refit = naiveSpline(obs, lambda, deleted.lot);
    const m = deleted.indices.length;
    for (let p = 0; p < m; p++) {
      const i = deleted.indices[p];
      expect(obs.lot[i]).toBe(deleted.lot);
      worst = Math.max(worst, Math.abs(deleted.residual[p] - (obs.y[i] - refit.fitted[i])));
      for (let s = 0; s < m; s++) {
        const expected = refit.covariance.get(i, deleted.indices[s]) + (p === s ? 1 / obs.weight[i] : 0);
        worst = Math.max(worst, Math.abs(deleted.covariance[p * m + s] - expected) / Math.max(1, Math.abs(expected)));
      }
    }
  }
  return worst;
}

const LAMBDAS = [1e-2, 1, 100, 1e5];

describe('a lot against the fit without it agrees with a refit by dense algebra', () => {
  it.each(LAMBDAS)('for single points, both ends included, at lambda %p', (lambda) => {
    expect(worstAgainstRefits(wavySeries(40, 1), lambda)).toBeLessThan(1e-9);
  });
  it.each([4, 8, 16])('for contiguous lots of %p points', (m) => {
    const obs = wavySeries(4 * m, 2, (i) => Math.floor(i / m));
    for (const lambda of LAMBDAS) expect(worstAgainstRefits(obs, lambda)).toBeLessThan(1e-8);
  });
  it('for interleaved lots', () => {
    for (const lambda of LAMBDAS) {
      expect(
        worstAgainstRefits(
          wavySeries(42, 3, (i) => i % 5),
          lambda,
        ),
      ).toBeLessThan(1e-8);
      expect(
        worstAgainstRefits(
          wavySeries(42, 4, (i) => (i * i) % 11),
          lambda,
        ),
      ).toBeLessThan(1e-8);
    }
  });
  it('for lots that do not pull, inside, at the ends, contiguous and interleaved', () => {
    for (const lambda of LAMBDAS) {
      expect(
        worstAgainstRefits(
          wavySeries(36, 5, (i) => Math.floor(i / 4), [0, 4, 8]),
          lambda,
        ),
      ).toBeLessThan(1e-8);
      expect(
        worstAgainstRefits(
          wavySeries(36, 6, (i) => i % 6, [2]),
          lambda,
        ),
      ).toBeLessThan(1e-8);
    }
  });
  it('for lots that share times with others and with themselves', () => {
    const t = [0, 0, 0, 1, 1, 2, 3, 3, 4, 6, 6, 6, 7];
    const lot = [0, 1, 0, 1, 2, 2, 3, 3, 4, 5, 4, 5, 6];
    const obs = observations(
      t,
      t.map((x, i) => Math.sin(x) + 0.1 * ((i * 7) % 5)),
      lot,
    );
    for (const lambda of LAMBDAS) expect(worstAgainstRefits(obs, lambda)).toBeLessThan(1e-8);
  });
});

describe('the deleted-lot formula with the cross-covariances', () => {
  it('gives the same residuals: e = (I - S_II)^-1 (y - g)', () => {
    const obs = wavySeries(30, 7, (i) => i % 10);
    const fit = fitSmoothingSpline(obs, 2);
    const { covariance } = naiveSpline(obs, 2);
    for (const { indices, residual } of fit.deletedLots()) {
      for (const i of indices) {
        let left = residual[indices.indexOf(i)];
        indices.forEach((k, s) => (left -= covariance.get(i, k) * obs.weight[k] * residual[s]));
        expect(left).toBeCloseTo(obs.y[i] - fit.fitted[i], 9);
      }
    }
  });
});

describe('a lot that determines its own fit', () => {
  it('keeps its digits where I - S is singular', () => {
    const obs = wavySeries(20, 8);
    obs.weight[19] = 1e15;
    const [last] = fitSmoothingSpline(obs, 1e3).deletedLots(Int32Array.of(19));
    const refit = naiveSpline({ ...obs, weight: obs.weight.slice().fill(1, 19) }, 1e3, 19);
    expect(last.residual[0]).toBeCloseTo(obs.y[19] - refit.fitted[19], 9);
    expect(last.covariance[0]).toBeCloseTo(refit.covariance.get(19, 19), 9);
  });
  it('is refused when the others do not determine a line', () => {
    const fit = fitSmoothingSpline(observations([0, 1, 2, 3], [1, 2, 1, 3], [0, 1, 1, 1]), 1);
    expect(() => fit.deletedLots(Int32Array.of(1))).toThrow(BaselineError);
    expect(fit.deletedLots(Int32Array.of(0))).toHaveLength(1);
    expect(() => fit.deletedLots(Int32Array.of(2))).toThrow('There is no lot 2');
  });
});
