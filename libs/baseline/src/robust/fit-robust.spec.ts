import { inverse, Matrix } from 'ml-matrix';
import { BaselineError } from '../baseline-error';
import { fitBaseline } from '../fit-baseline';
import type { Observations } from '../observations';
import { fitSmoothingSpline } from '../spline/smoothing-spline';
import { lcg } from '../testing/lcg';
import { roughness } from '../testing/naive-spline';
import { observations, wavySeries } from '../testing/series';
import { fitRobust } from './fit-robust';

/** Lots of three points on a slow wave, in noise of variance 1 (sum of six uniforms); lots in `bad` are shifted. */
function plantedSeries(lots: number, seed: number, isBad: (lot: number) => boolean, shift: number): Observations {
  const uniform = lcg(seed);
  const noise = () => Math.SQRT2 * (Array.from({ length: 6 }, uniform).reduce((a, b) => a + b) - 3);
  const t = Array.from({ length: 3 * lots }, (_, i) => 600 * i);
  const lot = t.map((_, i) => Math.floor(i / 3));
  const y = t.map((_, i) => 3 * Math.sin((9.42 * i) / t.length) + noise() + (isBad(lot[i]) ? shift : 0));
  return observations(t, y, lot);
}

/** Bisquare reweighting by dense algebra, each lot left out by refitting; for distinct times. */
function naiveRobust(obs: Observations, lambda: number, starts: number, passes: number): number[] {
  const k = Matrix.mul(roughness([...obs.t]), lambda);
  const lots = obs.pulls.length;
  let factor = new Array<number>(lots).fill(1);
  for (let pass = 0; pass < passes; pass++) {
    const z = factor.map((_, j) => {
      const w = [...obs.t].map((_, i) =>
        obs.lot[i] === j ? 0 : obs.weight[i] * obs.pulls[obs.lot[i]] * factor[obs.lot[i]],
      );
      const c = inverse(Matrix.add(Matrix.diag(w), k));
      const g = c.mmul(Matrix.columnVector(w.map((v, i) => v * obs.y[i])));
      const own = [...obs.lot.keys()].filter((i) => obs.lot[i] === j);
      const share = 1 / own.length;
      const r = own.reduce((sum, i) => sum + share * (obs.y[i] - g.get(i, 0)), 0);
      const variance = own.reduce(
        (sum, p) => sum + (share * share) / obs.weight[p] + own.reduce((s, q) => s + share * share * c.get(p, q), 0),
        0,
      );
      return r / Math.sqrt(variance);
    });
    const sorted = z.filter((_, j) => obs.pulls[j] > 0).map(Math.abs);
    sorted.sort((a, b) => a - b);
    const m = sorted.length;
    const median = (sorted[Math.floor((m - 1) / 2)] + sorted[Math.floor(m / 2)]) / 2;
    factor = z.map((v, j) => {
      if (obs.pulls[j] === 0) return 1;
      if (pass < starts) return Math.min(1, median / Math.abs(v));
      const u = v / (4.685 * 1.4826 * median);
      return Math.abs(u) < 1 ? (1 - u * u) ** 2 : 0;
    });
  }
  return factor;
}

describe('bisquare reweighting of lots', () => {
  it('has the factors of dense algebra that leaves each lot out by refitting, with fractional and idle lots', () => {
    const obs = wavySeries(45, 41, (i) => Math.floor(i / 3));
    const pulls = Float64Array.from(obs.pulls, (_, j) => (j === 4 ? 0 : j % 3 === 0 ? 0.4 : 1));
    const y = obs.y.map((v, i) => v + (obs.lot[i] === 7 ? 6 : obs.lot[i] === 11 ? -3 : 0));
    const changed = { ...obs, y, pulls };
    const robust = fitRobust(changed, { method: 'smoothing-spline', lambda: 20 });
    expect(robust.hasConverged).toBe(true);
    const naive = naiveRobust(changed, 20, 5, 60);
    naive.forEach((v, j) => expect(Math.abs(robust.factor[j] - v)).toBeLessThan(1e-5));
    const again = fitBaseline(
      { ...changed, pulls: pulls.map((p, j) => p * robust.factor[j]) },
      { method: 'smoothing-spline', lambda: 20 },
    );
    expect(robust.fit.fitted).toEqual(again.fitted);
    expect(robust.setDown).toContain(7);
  });
  it.each([
    ['a smoothing spline', { method: 'smoothing-spline', lambda: 3e12 } as const],
    ['a polynomial', { method: 'polynomial', degree: 4 } as const],
  ])('sets down the planted lots and no others (%s)', (_name, spec) => {
    const bad = [7, 23, 24, 59];
    const obs = plantedSeries(60, 42, (j) => bad.includes(j), 9);
    expect(fitRobust(obs, spec).setDown).toEqual(bad);
  });
  it('sets down the newest lot, which pulls an ordinary fit close to itself', () => {
    const obs = plantedSeries(30, 43, (j) => j === 29, 12);
    const spec = { method: 'smoothing-spline', lambda: 1e10 } as const;
    const ordinary = fitBaseline(obs, spec);
    expect(obs.y[89] - ordinary.fitted[89]).toBeLessThan(4);
    expect(fitRobust(obs, spec).setDown).toEqual([29]);
  });
  it.each([1, 2, 3, 4])('leaves clean lots most of their pull and moves the baseline little (seed %p)', (seed) => {
    const obs = plantedSeries(60, seed, () => false, 0);
    const spec = { method: 'polynomial', degree: 4 } as const;
    const robust = fitRobust(obs, spec);
    expect(robust.setDown).toEqual([]);
    expect(robust.hasConverged).toBe(true);
    expect(robust.factor.filter((v) => v > 0.5).length).toBeGreaterThanOrEqual(55);
    const { fitted, standardError } = fitBaseline(obs, spec);
    fitted.forEach((g, i) => expect(Math.abs(robust.fit.fitted[i] - g)).toBeLessThan(1.5 * standardError[i]));
  });
  it.each([5, 6, 7])('holds with 30 % of lots far off on one side (seed %p)', (seed) => {
    const uniform = lcg(seed);
    const order = Array.from({ length: 100 }, (_, j) => ({ j, key: uniform() })).sort((a, b) => a.key - b.key);
    const bad = order
      .slice(0, 30)
      .map((o) => o.j)
      .sort((a, b) => a - b);
    const obs = plantedSeries(100, seed, (j) => bad.includes(j), 15);
    const spec = { method: 'polynomial', degree: 4 } as const;
    const robust = fitRobust(obs, spec);
    expect(robust.setDown).toEqual(bad);
    const without = fitBaseline({ ...obs, pulls: obs.pulls.map((_, j) => (bad.includes(j) ? 0 : 1)) }, spec);
    robust.fit.fitted.forEach((g, i) => expect(Math.abs(g - without.fitted[i])).toBeLessThan(0.5));
  });
});

describe('lots that are not reweighted', () => {
  it('idle lots stay idle, however far off', () => {
    const obs = plantedSeries(40, 44, (j) => j === 5, 20);
    obs.pulls[5] = 0;
    const robust = fitRobust(obs, { method: 'polynomial', degree: 3 });
    expect([robust.factor[5], robust.setDown, robust.kept]).toEqual([1, [], []]);
    expect(robust.fit.pullCount).toBe(117);
  });
  it('all of them when more than half lie on the baseline exactly', () => {
    const t = Array.from({ length: 20 }, (_, i) => i);
    const onLine = observations(
      t,
      t.map((x) => 1e3 + 0.5 * x),
    );
    const robust = fitRobust(onLine, { method: 'polynomial', degree: 1 });
    expect([robust.scale, robust.hasConverged, robust.setDown]).toEqual([0, true, []]);
    expect([...robust.factor]).toEqual(t.map(() => 1));
  });
  it('those without which the others determine no baseline, of several the nearest to it', () => {
    // Only lots 20 .. 22 lie in the last two spans between knots; 21 and 22 are far off.
    const uniform = lcg(9);
    const t = [...Array.from({ length: 20 }, (_, i) => i), 27, 34, 40];
    const y = t.map((_, i) => uniform() + (i === 21 ? 300 : i === 22 ? -200 : 0));
    const obs = observations(t, y);
    const spec = { method: 'natural-spline', knots: Float64Array.of(5, 10, 15, 19.5, 30) } as const;
    const robust = fitRobust(obs, spec);
    for (const j of robust.kept) expect(robust.factor[j]).toBe(1);
    expect(robust.kept.length).toBeGreaterThan(0);
    expect(robust.kept.length).toBeLessThan(4);
    expect(robust.fit.fitted.every(Number.isFinite)).toBe(true);
  });
});

describe('the answer', () => {
  const obs = plantedSeries(40, 45, (j) => j % 9 === 0, 10);
  it('says when it has not converged', () => {
    const robust = fitRobust(obs, { method: 'polynomial', degree: 2 }, { maxPasses: 2 });
    expect([robust.passes, robust.hasConverged]).toEqual([2, false]);
  });
  it('is the same for a function that fits, and the same bits each time', () => {
    const spec = { method: 'smoothing-spline', lambda: 1e12 } as const;
    const one = fitRobust(obs, spec);
    const other = fitRobust(obs, (o) => fitSmoothingSpline(o, 1e12));
    expect(other.factor).toEqual(one.factor);
    expect(other.fit.fitted).toEqual(one.fit.fitted);
  });
  it('does not depend on the unit of values', () => {
    const spec = { method: 'polynomial', degree: 3 } as const;
    const scaled = { ...obs, y: obs.y.map((v) => 1e-6 * v), weight: obs.weight.map((w) => 1e12 * w) };
    const one = fitRobust(obs, spec);
    fitRobust(scaled, spec).factor.forEach((v, j) => expect(Math.abs(v - one.factor[j])).toBeLessThan(1e-6));
  });
  it('is a typed refusal for what cannot be fitted', () => {
    const code = (run: () => unknown) => {
      try {
        run();
      } catch (error) {
        return error instanceof BaselineError ? error.code : 'other';
      }
      return 'none';
    };
    expect(code(() => fitRobust(obs, { method: 'polynomial', degree: 2 }, { maxPasses: 0 }))).toBe('bad-argument');
    expect(code(() => fitRobust({ ...obs, y: obs.y.map(() => NaN) }, { method: 'constant' }))).toBe('non-finite');
    const few = observations([0, 1], [0, 1]);
    expect(code(() => fitRobust(few, { method: 'constant' }))).toBe('insufficient-data');
  });
});
