import { prepareSeries } from '../prepared-series';
import type { Observations } from '../observations';
import { lcg } from '../testing/lcg';
import { observations } from '../testing/series';
import { chooseBaseline } from './choose-baseline';
import { penaltyRange } from './choose-penalty';
import { ExactCriterion, type PenaltyRule } from './exact-criterion';
import { ReducedCriterion } from './reduced-criterion';
import { bestOf, searchLambda } from './search-lambda';

/** A wave of some turns in white noise of variance 1/4; times even, or in shifts with long gaps, or one tenth of the time holding half the points. */
function longSeries(n: number, turns: number, times: 'even' | 'shifts' | 'clustered', seed = 71): Observations {
  const uniform = lcg(seed);
  const t: number[] = [];
  for (let i = 0, at = 1.7e9; i < n; i++) {
    t.push(at);
    at += times === 'even' ? 60 : times === 'shifts' ? (i % 480 === 0 ? 57600 : 60 * uniform()) : i < n / 2 ? 60 : 600;
  }
  const range = t[n - 1] - t[0];
  const y = t.map(
    (x) => 4 * Math.sin((2 * Math.PI * turns * (x - t[0])) / range) + uniform() + uniform() + uniform() - 1.5,
  );
  const weight = t.map(() => 3 + 2 * uniform());
  return observations(t, y, undefined, weight);
}

const rules: [string, PenaltyRule][] = [
  ['gcv', { rule: 'gcv', inflation: 1 }],
  ['gcv14', { rule: 'gcv', inflation: 1.4 }],
  ['reml', { rule: 'reml', variance: 'known' }],
];

describe('the reduced criterion', () => {
  it.each(['even', 'shifts', 'clustered'] as const)('is the exact one to its stated error (times %s)', (times) => {
    const series = prepareSeries(longSeries(4000, 2, times));
    const { low, high } = penaltyRange(series, 0);
    const exact = new ExactCriterion(series);
    const reduced = new ReducedCriterion(series, low, 32);
    for (let lambda = reduced.lowest * 100; lambda < high; lambda *= 30) {
      for (const [, rule] of rules) {
        const there = exact.evaluate(lambda, rule);
        const here = reduced.evaluatorFrom(lambda, rule)(lambda);
        expect(Math.abs(here.edf / there.edf - 1)).toBeLessThan(1e-4);
        expect(Math.abs(here.value - there.value)).toBeLessThan(1e-5 * Math.abs(there.value));
      }
    }
  });
});

describe('the choice on a long series is that of the exact search', () => {
  it.each<[number, number, 'even' | 'shifts' | 'clustered']>([
    [4000, 1, 'even'],
    [4000, 3, 'shifts'],
    [8000, 2, 'clustered'],
    [20000, 6, 'shifts'],
  ])('%p points, %p turns, times %s', (n, turns, times) => {
    const obs = longSeries(n, turns, times);
    const series = prepareSeries(obs);
    const { low, high } = penaltyRange(series, 0);
    const exact = new ExactCriterion(series);
    for (const [name, rule] of rules) {
      const chosen = chooseBaseline(obs, { method: 'smoothing-spline', rule: name as 'gcv' });
      const best = bestOf(searchLambda(low, high, () => (lambda) => exact.evaluate(lambda, rule)).minima)!;
      expect(Math.abs(chosen.smoothness / best.smoothness - 1)).toBeLessThan(2e-3);
      expect(Math.abs(chosen.edf / best.edf - 1)).toBeLessThan(5e-4);
      expect(chosen.criterion.value - best.value).toBeLessThan(1e-9 * Math.abs(best.value));
      expect(chosen.criterion.value).toBe(exact.evaluate(chosen.smoothness, rule).value);
    }
  });
  it('also where the minimum lies beyond the basis', () => {
    const uniform = lcg(72);
    const t = Array.from({ length: 4000 }, (_, i) => i);
    const y = t.map((x) => 3 * Math.sin(x / 600) + Math.sin(x / 3) + uniform() + uniform() + uniform() - 1.5);
    const chosen = chooseBaseline(observations(t, y), { method: 'smoothing-spline', rule: 'gcv' });
    expect(chosen.minima).toHaveLength(2);
    expect(chosen.edf).toBe(chosen.minima[0].edf);
    expect(chosen.edf).toBeGreaterThan(400);
    expect(chosen.minima[1].edf).toBeLessThan(30);
  });
  it('and with a floor, an exact line, or degrees of freedom as given', () => {
    const obs = longSeries(5000, 2, 'shifts');
    const spline = { method: 'smoothing-spline' } as const;
    const free = chooseBaseline(obs, { ...spline, rule: 'gcv' });
    const bound = chooseBaseline(obs, { ...spline, rule: 'gcv', floorLambda: 50 * free.smoothness });
    expect([bound.smoothness, bound.isAtFloor]).toEqual([50 * free.smoothness, true]);
    const line = chooseBaseline({ ...obs, y: obs.t.map((t) => 3 + 1e-5 * (t - obs.t[0])) }, { ...spline, rule: 'gcv' });
    expect(line.isAtBound).toBe('line');
    for (const edf of [2.01, 3, 12.5, 60, 2000]) {
      const fixed = chooseBaseline(obs, { ...spline, rule: 'edf', edf });
      expect(Math.abs(new ExactCriterion(prepareSeries(obs)).edfAt(fixed.smoothness) / edf - 1)).toBeLessThan(2e-10);
    }
  });
});
