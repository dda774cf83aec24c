import { BaselineError } from './baseline-error';
import { effectivePeriod, lambdaForPeriod, pointDensity } from './drift-period';
import { lcg } from './testing/lcg';

describe('the density of points', () => {
  it('is weight over spacing on an even grid', () => {
    const t = Float64Array.from({ length: 100 }, (_, i) => 1.7e9 + 600 * i);
    expect(pointDensity(t, new Float64Array(100).fill(3), 6000)).toBeCloseTo(3 / 600, 12);
  });
  it('is the total over the period when the window is no longer than the period', () => {
    expect(pointDensity(Float64Array.of(0, 5, 10), Float64Array.of(1, 2, 3), 10)).toBe(0.6);
    expect(pointDensity(Float64Array.of(7, 7), Float64Array.of(1, 2), 3)).toBe(1);
  });
  it('counts a point no longer once its span has begun after it, from the first span on', () => {
    const two = Float64Array.of(2, 2, 2, 2);
    expect(pointDensity(Float64Array.of(0, 10, 20, 30), two, 20)).toBeCloseTo(4 / 20, 12);
    expect(pointDensity(Float64Array.of(0, 10, 20, 30), two, 29)).toBeCloseTo(4 / 29, 12);
  });
  it('is the 90 % quantile over time: a dense stretch of a twentieth of the window does not count, of a half it does', () => {
    const grid = (dense: number) =>
      Float64Array.from([
        ...Array.from({ length: Math.round(dense * 10) }, (_, i) => i / 10),
        ...Array.from({ length: 1000 - dense }, (_, i) => dense + i),
      ]);
    const density = (dense: number) => pointDensity(grid(dense), new Float64Array(grid(dense).length).fill(1), 20);
    expect(density(50)).toBeCloseTo(1, 9);
    expect(density(500)).toBeCloseTo(10, 9);
  });
  it('agrees with spans counted at a fine grid of positions', () => {
    const uniform = lcg(3);
    let at = 0;
    const t = Float64Array.from({ length: 200 }, () => (at += uniform() < 0.2 ? 0 : 5 * uniform() ** 3));
    const weight = t.map(() => 0.5 + uniform());
    const period = 17;
    const positions = 40000;
    const sums = Array.from({ length: positions }, (_, k) => {
      const from = t[0] + ((k + 0.5) / positions) * (t[199] - t[0] - period);
      return t.reduce((sum, v, i) => (v >= from && v < from + period ? sum + weight[i] : sum), 0);
    }).sort((a, b) => a - b);
    const [below, above] = [sums[0.899 * positions], sums[0.901 * positions]];
    const kappa = pointDensity(t, weight, period);
    expect(kappa * period).toBeGreaterThanOrEqual(below - 1e-9);
    expect(kappa * period).toBeLessThanOrEqual(above + 1e-9);
  });
  it('refuses what has no density', () => {
    const one = Float64Array.of(1);
    expect(() => pointDensity(new Float64Array(0), new Float64Array(0), 1)).toThrow(BaselineError);
    expect(() => pointDensity(one, Float64Array.of(NaN), 1)).toThrow('not finite');
    expect(() => pointDensity(one, Float64Array.of(-1), 1)).toThrow('negative');
    expect(() => pointDensity(one, one, 0)).toThrow('positive');
    expect(() => pointDensity(one, new Float64Array(2), 1)).toThrow('length');
    expect(() => pointDensity(Float64Array.of(2, 1), Float64Array.of(1, 1), 1)).toThrow('earlier');
  });
});

describe('period and penalty', () => {
  it('are related by lambda = kappa (T / 2 pi)^4', () => {
    expect(lambdaForPeriod(2, 2 * Math.PI * 10)).toBeCloseTo(2e4, 8);
    expect(effectivePeriod(2e4, 2)).toBeCloseTo(20 * Math.PI, 10);
    expect(effectivePeriod(lambdaForPeriod(1 / 600, 259200), 1 / 600)).toBeCloseTo(259200, 6);
    expect(effectivePeriod(Infinity, 1)).toBe(Infinity);
  });
  it('refuse what is not positive and finite', () => {
    for (const bad of [0, -1, NaN, Infinity]) {
      expect(() => lambdaForPeriod(bad, 1)).toThrow(BaselineError);
      expect(() => lambdaForPeriod(1, bad)).toThrow(BaselineError);
      expect(() => effectivePeriod(1, bad)).toThrow(BaselineError);
    }
    expect(() => effectivePeriod(NaN, 1)).toThrow(BaselineError);
  });
});
