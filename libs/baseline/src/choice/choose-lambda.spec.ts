import { BaselineError } from '../baseline-error';
import { chooseLambda, type ChooseLambdaOptions } from './choose-lambda';
import type { Observations } from '../observations';
import { fitSmoothingSpline } from '../spline/smoothing-spline';
import { lcg } from '../testing/lcg';
import { naiveSpline, roughness } from '../testing/naive-spline';
import { observations, wavySeries } from '../testing/series';
import { determinant, Matrix } from 'ml-matrix';

type Rule = Omit<ChooseLambdaOptions, 'floorLambda'>;

/** Leave-one-lot-out criterion by refitting without each lot. */
function naiveLotCv(obs: Observations, lambda: number): number {
  let total = 0;
  let lots = 0;
  for (let lot = 0; lot < obs.pulls.length; lot++) {
    if (obs.pulls[lot] === 0) continue;
    lots++;
    const { fitted } = naiveSpline(obs, lambda, lot);
    const own = fitted.map((_, i) => i).filter((i) => obs.lot[i] === lot);
    const weight = own.reduce((sum, i) => sum + obs.weight[i], 0);
    const mean = own.reduce((sum, i) => sum + obs.weight[i] * (obs.y[i] - fitted[i]), 0) / weight;
    total += obs.pulls[lot] * weight * mean * mean;
  }
  return total / lots;
}

function naiveGcv(obs: Observations, lambda: number, inflation: number): number {
  const { fitted, covariance } = naiveSpline(obs, lambda);
  const pulling = fitted.map((_, i) => i).filter((i) => obs.pulls[obs.lot[i]] > 0);
  const pull = (i: number) => obs.weight[i] * obs.pulls[obs.lot[i]];
  const rss = pulling.reduce((sum, i) => sum + pull(i) * (obs.y[i] - fitted[i]) ** 2, 0);
  const edf = pulling.reduce((sum, i) => sum + pull(i) * covariance.get(i, i), 0);
  return (pulling.length * rss) / (pulling.length - inflation * edf) ** 2;
}

/** PRSS (or its profile) + log|W + lambda K| - (n - 2) log lambda, for distinct times where every lot pulls. */
function naiveReml(obs: Observations, lambda: number, variance: 'known' | 'estimated'): number {
  const { fitted, penalty } = naiveSpline(obs, lambda);
  const n = fitted.length;
  const prss = fitted.reduce((sum, g, i) => sum + obs.weight[i] * (obs.y[i] - g) ** 2, lambda * penalty);
  const logDet = Math.log(
    determinant(Matrix.add(Matrix.diag([...obs.weight]), Matrix.mul(roughness([...obs.t]), lambda))),
  );
  return (variance === 'known' ? prss : (n - 2) * Math.log(prss / (n - 2))) + logDet - (n - 2) * Math.log(lambda);
}

describe('the criteria agree with refits by dense algebra', () => {
  const lots = wavySeries(32, 21, (i) => Math.floor(i / 4), [2]);
  const mixed = wavySeries(30, 22, (i) => i % 7);
  const fractional = { ...mixed, pulls: Float64Array.of(1, 0.2, 0, 0.7, 1, 1, 1) };
  it.each<[string, Rule, (obs: Observations, lambda: number) => number]>([
    ['leave-one-lot-out', { rule: 'lot-cv' }, naiveLotCv],
    ['GCV', { rule: 'gcv' }, (obs, lambda) => naiveGcv(obs, lambda, 1)],
    ['GCV inflated by 1.4', { rule: 'gcv', gcvInflation: 1.4 }, (obs, lambda) => naiveGcv(obs, lambda, 1.4)],
  ])('%s', (_name, rule, naive) => {
    for (const obs of [lots, mixed, fractional]) {
      const chosen = chooseLambda(obs, { ...rule, floorLambda: 0.01 });
      expect(chosen.curve.length).toBeGreaterThan(20);
      for (const { lambda, value } of chosen.curve) {
        expect(Math.abs(value / naive(obs, lambda) - 1)).toBeLessThan(1e-6);
      }
    }
  });
  it.each(['known', 'estimated'] as const)('REML with the variance %s, up to a constant', (remlVariance) => {
    const obs = wavySeries(25, 23);
    const chosen = chooseLambda(obs, { rule: 'reml', remlVariance, floorLambda: 0.1 });
    const inner = chosen.curve.filter((c) => c.lambda < 1e4);
    const offsets = inner.map((c) => c.value - naiveReml(obs, c.lambda, remlVariance));
    for (const offset of offsets) expect(Math.abs(offset - offsets[0])).toBeLessThan(1e-6);
  });
});

describe('the chosen lambda', () => {
  const rules: Rule[] = [
    { rule: 'lot-cv' },
    { rule: 'gcv' },
    { rule: 'reml' },
    { rule: 'reml', remlVariance: 'estimated' },
  ];
  it.each(rules)('is the best of a fine grid ($rule)', (rule) => {
    const obs = noisyWave(80);
    const { lambda, criterion, curve } = chooseLambda(obs, { ...rule, floorLambda: 0 });
    expect(criterion).toBeLessThanOrEqual(Math.min(...curve.map((c) => c.value)));
    for (let x = -4; x <= 4; x += 0.05) {
      const near = chooseLambda(obs, { ...rule, floorLambda: lambda * 10 ** x }).curve[0];
      expect(near.value).toBeGreaterThanOrEqual(criterion - 1e-9 * Math.abs(criterion));
    }
  });
  it.each(rules)('follows a wave with about its degrees of freedom in white noise ($rule)', (rule) => {
    const obs = noisyWave(300);
    const { lambda, isAtFloor, isAtBound } = chooseLambda(obs, { ...rule, floorLambda: 0 });
    const { edf } = fitSmoothingSpline(obs, lambda);
    expect(edf).toBeGreaterThan(4);
    expect(edf).toBeLessThan(20);
    expect([isAtFloor, isAtBound]).toEqual([false, false]);
  });
  it('is the floor, and says so, when the minimum lies below', () => {
    const obs = noisyWave(80);
    const free = chooseLambda(obs, { rule: 'lot-cv', floorLambda: 0 }).lambda;
    const bound = chooseLambda(obs, { rule: 'lot-cv', floorLambda: 100 * free });
    expect([bound.lambda, bound.isAtFloor, bound.isAtBound]).toEqual([100 * free, true, false]);
    expect(bound.criterion).toBe(bound.curve[0].value);
  });
  it('is the floor when the floor is beyond the straight line', () => {
    const bound = chooseLambda(noisyWave(20), { rule: 'gcv', floorLambda: Infinity });
    expect([bound.lambda, bound.isAtFloor, bound.isAtBound]).toEqual([Infinity, true, true]);
    expect(bound.curve[0].edf).toBeCloseTo(2, 9);
  });
  it.each(rules)('is the straight line, and says so, for constant values and an exact line ($rule)', (rule) => {
    const t = Array.from({ length: 20 }, (_, i) => i + 1.7e9);
    for (const y of [t.map(() => 5.1), t.map((x) => 3 + 0.7 * (x - 1.7e9))]) {
      const chosen = chooseLambda(observations(t, y), { ...rule, floorLambda: 1 });
      expect([chosen.isAtFloor, chosen.isAtBound]).toEqual([false, true]);
      expect(chosen.curve[24].edf).toBeLessThan(2.001);
      expect(chosen.lambda).toBe(chosen.curve[24].lambda);
    }
  });
  it('by lots stays smooth where readings of a lot share an error, by points it does not', () => {
    const uniform = lcg(77);
    const level = Array.from({ length: 40 }, () => uniform() + uniform() - 1);
    const t = Array.from({ length: 320 }, (_, i) => i);
    const lot = t.map((i) => Math.floor(i / 8));
    const y = t.map((i) => level[lot[i]] + 0.1 * (uniform() - 0.5));
    const edf = (rule: 'lot-cv' | 'gcv') => {
      const obs = observations(t, y, lot);
      return fitSmoothingSpline(obs, chooseLambda(obs, { rule, floorLambda: 0 }).lambda).edf;
    };
    expect(edf('lot-cv')).toBeLessThan(12);
    expect(edf('gcv')).toBeGreaterThan(40);
  });
  it('of three and four points is an answer', () => {
    for (const t of [
      [0, 1, 3],
      [0, 1, 2, 4],
    ]) {
      for (const rule of rules) {
        const chosen = chooseLambda(observations(t, [1, 3, 2, 4].slice(0, t.length)), { ...rule, floorLambda: 1e-3 });
        expect(Number.isFinite(chosen.lambda) && chosen.lambda >= 1e-3).toBe(true);
      }
    }
  });
  it('is refused with a reason', () => {
    const obs = noisyWave(10);
    const code = (run: () => unknown) => {
      try {
        run();
      } catch (error) {
        return error instanceof BaselineError ? error.code : 'other';
      }
      return 'none';
    };
    expect(code(() => chooseLambda(obs, { rule: 'gcv', floorLambda: NaN }))).toBe('non-finite');
    expect(code(() => chooseLambda(obs, { rule: 'gcv', floorLambda: -1 }))).toBe('bad-argument');
    expect(code(() => chooseLambda(obs, { rule: 'gcv', gcvInflation: 0.5, floorLambda: 1 }))).toBe('bad-argument');
    const two = observations([0, 1, 2, 3], [0, 1, 0, 1], [0, 1, 1, 1]);
    expect(code(() => chooseLambda(two, { rule: 'lot-cv', floorLambda: 1 }))).toBe('insufficient-data');
  });
});

/** A wave of 1.5 turns in white noise of variance 1/4 (sum of three uniforms), weights stating it. */
function noisyWave(n: number): Observations {
  const uniform = lcg(31);
  const t = Array.from({ length: n }, (_, i) => i * 600);
  const y = t.map((_, i) => 3 * Math.sin((9.42 * i) / n) + uniform() + uniform() + uniform() - 1.5);
  return observations(
    t,
    y,
    undefined,
    t.map(() => 4),
  );
}
