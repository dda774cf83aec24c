import { BaselineError } from '../baseline-error';
import type { Observations } from '../observations';
import { prepareSeries } from '../prepared-series';
import { LazilyFiltered, scaledInverse } from './filtered-series';
import type { Posterior } from './information-state';
import { LotBlock } from './lot-block';
import { LotWalk } from './lot-walk';
import { fitSmoothingSpline } from './smoothing-spline';
import { lcg } from '../testing/lcg';
import { naiveSpline } from '../testing/naive-spline';
import { observations, wavySeries, withFactors } from '../testing/series';

const LAMBDAS = [1e-2, 10, 1e4];
const FACTORS = [1, 0.5, 1, 0, 0.01, 1, 0.9];

/** Largest difference of scores from refits by dense algebra without each lot, relative to their size. */
function worstAgainstRefits(obs: Observations, lambda: number, count: Float64Array): number {
  const scores = fitSmoothingSpline(obs, lambda).scoreLots(count);
  expect(scores.undetermined).toEqual([]);
  let worst = 0;
  for (let lot = 0; lot < obs.pulls.length; lot++) {
    const { fitted, covariance } = naiveSpline(obs, lambda, lot);
    const own = fitted.map((_, i) => i).filter((i) => obs.lot[i] === lot);
    if (own.length === 0) continue;
    const total = own.reduce((sum, i) => sum + count[i], 0);
    let residual = 0;
    let variance = 0;
    for (const i of own) {
      worst = Math.max(worst, Math.abs(scores.deletedResidual[i] - (obs.y[i] - fitted[i])));
      residual += (count[i] / total) * (obs.y[i] - fitted[i]);
      variance += (count[i] / total) ** 2 / obs.weight[i];
      for (const k of own) variance += ((count[i] * count[k]) / total ** 2) * covariance.get(i, k);
    }
    worst = Math.max(worst, Math.abs(scores.residual[lot] - residual), Math.abs(scores.variance[lot] / variance - 1));
  }
  return worst;
}

const counts = (obs: Observations) => obs.t.map((_, i) => 1 + ((i * 7) % 5));

describe('every lot against the fit without it agrees with a refit by dense algebra', () => {
  it.each<[string, (i: number) => number, number]>([
    ['points of their own', (i) => i, 24],
    ['contiguous lots of 4', (i) => Math.floor(i / 4), 32],
    ['contiguous lots of 16', (i) => Math.floor(i / 16), 64],
    ['interleaved lots of 8', (i) => i % 6, 48],
    ['lots of 3 spread over everything', (i) => i % 15, 45],
    ['lots of all kinds', (i) => (i % 4 === 0 ? 0 : 1 + ((i * i) % 13)), 50],
  ])('%s, pulling and not, and set down by factors', (_name, lotOf, n) => {
    const plain = wavySeries(n, 51, lotOf);
    const mixed = withFactors(plain, (lot) => FACTORS[lot % 7]);
    for (const lambda of LAMBDAS)
      for (const obs of [plain, mixed]) expect(worstAgainstRefits(obs, lambda, counts(obs))).toBeLessThan(1e-7);
  });
  it('by the same numbers as lot by lot', () => {
    for (const lotOf of [(i: number) => Math.floor(i / 5), (i: number) => i % 30, (i: number) => i]) {
      const obs = withFactors(wavySeries(90, 52, lotOf), (lot) => FACTORS[lot % 7]);
      const fit = fitSmoothingSpline(obs, 20);
      const scores = fit.scoreLots();
      for (const { lot, indices, residual, covariance } of fit.deletedLots()) {
        const m = indices.length;
        if (m === 0) continue;
        indices.forEach((i, p) => expect(scores.deletedResidual[i]).toBeCloseTo(residual[p], 11));
        expect(scores.residual[lot]).toBeCloseTo(residual.reduce((a, b) => a + b) / m, 11);
        expect(scores.variance[lot] / (covariance.reduce((a, b) => a + b) / m ** 2)).toBeCloseTo(1, 11);
      }
    }
  });
});

describe('lots spread out among others', () => {
  /** Filtered at lambda, as a fit has it. */
  function filter(obs: Observations, lambda: number): LazilyFiltered {
    const series = prepareSeries(obs);
    return new LazilyFiltered(series, scaledInverse(series, lambda));
  }
  const uniform = lcg(53);
  const obs = withFactors(
    wavySeries(5760, 54, () => Math.floor(360 * uniform())),
    (lot) => FACTORS[lot % 7],
  );

  it.each([1, 1e4, 1e8])('have by the block of S what the walk over their span gives at lambda %p', (lambda) => {
    const filtered = filter(obs, lambda);
    const { lotStart, pointsByLot, r } = filtered.series;
    const [block, walk] = [new LotBlock(filtered), new LotWalk(filtered)];
    const p: Posterior = { value: 0, slope: 0, variance: 0, covariance: 0, slopeVariance: 0 };
    for (let lot = 0; lot < 360; lot += 40) {
      const from = lotStart[lot];
      const m = lotStart[lot + 1] - from;
      block.fill(from, m, filtered.gains);
      expect(block.delete()).toBe(true);
      const covariance = new Float64Array(m * m);
      block.deletedCovariance(covariance);
      walk.walk(from, m);
      for (let s = 0; s < m; s++) {
        expect(walk.posterior(s, p)).toBe(true);
        expect(Math.abs(block.residual[s] - (r[pointsByLot[from + s]] - p.value))).toBeLessThan(1e-11);
        expect(Math.abs(covariance[s * m + s] / p.variance - 1)).toBeLessThan(1e-11);
        const unit = new Float64Array(m);
        unit[s] = 1;
        expect(Math.abs(block.quadratic(unit) / p.variance - 1)).toBeLessThan(1e-11);
        const column = Float64Array.of(p.variance, p.covariance);
        for (let k = s - 1; k >= 0; k--) {
          walk.stepBack(k, column);
          expect(Math.abs(covariance[s * m + k] - column[0])).toBeLessThan(1e-11 * p.variance);
        }
      }
    }
  });
  it('have the same both ways over weights of 18 decades, gaps of a millionth, ties and any smoothness', () => {
    const random = lcg(58);
    const p: Posterior = { value: 0, slope: 0, variance: 0, covariance: 0, slopeVariance: 0 };
    let compared = 0;
    for (let repeat = 0; repeat < 300; repeat++) {
      const n = 20 + Math.floor(random() * 40);
      const lots = 3 + Math.floor(random() * 12);
      let at = 0;
      const t = Array.from({ length: n }, () => (at += random() < 0.1 ? 0 : 10 ** (-6 * random())));
      const series = observations(
        t,
        t.map((x) => Math.sin(x) + random() - 0.5),
        t.map((_, i) => (i < lots ? i : Math.floor(random() * lots))),
        t.map(() => 10 ** (18 * random() - 9)),
      );
      const filtered = filter(series, 10 ** (16 * random() - 8));
      const { lotStart, pointsByLot, r, weightScale } = filtered.series;
      const [block, walk] = [new LotBlock(filtered), new LotWalk(filtered)];
      for (let lot = 0; lot < lots; lot++) {
        const m = lotStart[lot + 1] - lotStart[lot];
        block.fill(lotStart[lot], m, filtered.gains);
        if (!block.delete()) continue;
        walk.walk(lotStart[lot], m);
        for (let s = 0; s < m; s++) {
          const i = pointsByLot[lotStart[lot] + s];
          expect(walk.posterior(s, p)).toBe(true);
          const error = Math.max(1, Math.sqrt(p.variance + weightScale / series.weight[i]));
          expect(Math.abs(block.residual[s] - (r[i] - p.value))).toBeLessThan(1e-9 * error);
          compared++;
        }
      }
    }
    expect(compared).toBeGreaterThan(3000);
  });
  it('hold nearly all weight of the fit: then the block declines and the walk gives the numbers', () => {
    const heavy = wavySeries(60, 55, (i) => i % 20);
    heavy.lot.forEach((lot, i) => (heavy.weight[i] = lot === 3 ? 1e12 : heavy.weight[i]));
    const filtered = filter(heavy, 10);
    const block = new LotBlock(filtered);
    block.fill(filtered.series.lotStart[3], 3, filtered.gains);
    expect(block.delete()).toBe(false);
    const refit = naiveSpline({ ...heavy, weight: heavy.weight.map((w) => Math.min(w, 10)) }, 10, 3);
    const scores = fitSmoothingSpline(heavy, 10).scoreLots();
    for (const i of [3, 23, 43]) expect(scores.deletedResidual[i]).toBeCloseTo(heavy.y[i] - refit.fitted[i], 9);
  });
  it('cost no more than their points: 20,000 lots of two points, half the window apart, are scored at once', () => {
    const wide = wavySeries(40_000, 56, (i) => i % 20_000);
    const { variance, undetermined } = fitSmoothingSpline(wide, 1e9).scoreLots();
    expect(undetermined).toEqual([]);
    expect(variance.every((v) => v > 0 && v < 2)).toBe(true);
  });
});

describe('lots without which nothing is left', () => {
  it('are named, and stand at infinite variance', () => {
    const obs = observations([0, 1, 2, 3], [1, 2, 1, 3], [0, 1, 1, 1]);
    const scores = fitSmoothingSpline(obs, 1).scoreLots();
    expect(scores.undetermined).toEqual([1]);
    expect([...scores.deletedResidual.slice(1)]).toEqual([0, 0, 0]);
    expect([scores.residual[1], scores.variance[1]]).toEqual([0, Infinity]);
    expect(Number.isFinite(scores.variance[0])).toBe(true);
  });
  it('are still scored where they do not pull', () => {
    const obs = withFactors(observations([0, 1, 2, 3, 4], [1, 2, 1, 3, 2], [0, 0, 0, 1, 1]), (lot) => 1 - lot);
    expect(fitSmoothingSpline(obs, 1).scoreLots().undetermined).toEqual([0]);
  });
  it('of no points are not named: there is nothing to score', () => {
    const scores = fitSmoothingSpline(observations([0, 1, 2, 3], [1, 2, 1, 3], [0, 1, 3, 4]), 1).scoreLots();
    expect(scores.undetermined).toEqual([]);
    expect([scores.residual[2], scores.variance[2]]).toEqual([0, Infinity]);
  });
  it('are the single points that all others need: three points, each of them', () => {
    const scores = fitSmoothingSpline(observations([0, 1, 3], [0, 2, 3]), 5).scoreLots();
    // The line through the other two points is at 1.5, 1 and 6.
    [-1.5, 1, -3].forEach((e, i) => expect(scores.deletedResidual[i]).toBeCloseTo(e, 11));
  });
});

describe('counts', () => {
  const fit = fitSmoothingSpline(
    wavySeries(12, 57, (i) => i >> 1),
    1,
  );
  it.each([
    ['of another length', new Float64Array(11).fill(1), 'bad-argument'],
    ['that are negative', new Float64Array(12).fill(-1), 'bad-argument'],
    ['that leave a lot none', new Float64Array(12), 'bad-argument'],
    ['that are not finite', new Float64Array(12).fill(NaN), 'non-finite'],
  ])('%s are refused', (_name, count, code) => {
    expect(() => fit.scoreLots(count)).toThrow(expect.objectContaining({ code }) as BaselineError);
  });
  it('weight the mean only', () => {
    const count = Float64Array.from({ length: 12 }, (_, i) => (i % 2 === 0 ? 3 : 1));
    const { residual, deletedResidual } = fit.scoreLots(count);
    expect(residual[2]).toBeCloseTo(0.75 * deletedResidual[4] + 0.25 * deletedResidual[5], 13);
  });
});
