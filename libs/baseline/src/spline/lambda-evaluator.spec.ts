import { determinant, Matrix } from 'ml-matrix';
import { BaselineError } from '../baseline-error';
import type { Observations } from '../observations';
import { prepareSeries } from '../prepared-series';
import { combine, STATE_SIZE, type Posterior } from './information-state';
import { LambdaEvaluator } from './lambda-evaluator';
import { fitSmoothingSpline } from './smoothing-spline';
import { naiveSpline, roughness } from '../testing/naive-spline';
import { observations, wavySeries, withFactors } from '../testing/series';

/** log|W + alpha K| - (m - 2) log alpha on the distinct times of pulling points, time on [0, 1], weights of mean 1. */
function naiveLogDet(obs: Observations, lambda: number): number {
  const range = obs.t[obs.t.length - 1] - obs.t[0];
  const pulling = Array.from(obs.t, (t, i) => ({
    t: (t - obs.t[0]) / range,
    w: obs.weight[i] * obs.pulls[obs.lot[i]],
  }));
  const kept = pulling.filter((p) => p.w > 0);
  const mean = kept.reduce((sum, p) => sum + p.w, 0) / kept.length;
  const times = [...new Set(kept.map((p) => p.t))];
  const weights = times.map((t) => kept.filter((p) => p.t === t).reduce((sum, p) => sum + p.w / mean, 0));
  const alpha = lambda / (range ** 3 * mean);
  const a = Matrix.add(Matrix.diag(weights), Matrix.mul(roughness(times), alpha));
  return Math.log(determinant(a)) - (times.length - 2) * Math.log(alpha);
}

const SERIES: [string, Observations][] = [
  ['distinct times', wavySeries(25, 61)],
  [
    'lots with factors',
    withFactors(
      wavySeries(28, 62, (i) => i % 9),
      (lot) => [1, 0, 0.5, 0.01, 1][lot % 5],
    ),
  ],
  ['ends that do not pull', withFactors(wavySeries(20, 63), (lot) => (lot < 3 || lot > 17 ? 0 : 1))],
  [
    'ties',
    observations(
      [0, 0, 1, 2, 2, 2, 5, 7, 7],
      [1, 2, 1, 3, 2, 1, 4, 2, 3],
      [0, 1, 2, 2, 3, 4, 5, 5, 6],
      [1, 2, 3, 1, 1, 4, 1, 1, 9],
    ),
  ],
  ['three points', observations([0, 1, 3], [1, 3, 2])],
];

describe.each(SERIES)('what the rules for lambda look at agrees with dense algebra: %s', (_name, obs) => {
  const evaluator = new LambdaEvaluator(prepareSeries(obs));
  const pulling = Array.from(obs.weight, (w, i) => w * obs.pulls[obs.lot[i]]);
  const count = pulling.filter((w) => w > 0).length;
  it.each([1e-2, 1, 30, 1000])('at lambda %p', (lambda) => {
    evaluator.evaluate(lambda);
    const { fitted, covariance, penalty } = naiveSpline(obs, lambda);
    const rss = pulling.reduce((sum, w, i) => sum + w * (obs.y[i] - fitted[i]) ** 2, 0);
    const prss = rss + lambda * penalty;
    const logDet = naiveLogDet(obs, lambda);
    expect(evaluator.edf).toBeCloseTo(
      pulling.reduce((sum, w, i) => sum + w * covariance.get(i, i), 0),
      8,
    );
    expect(evaluator.rss / rss).toBeCloseTo(1, 8);
    expect(evaluator.prss / prss).toBeCloseTo(1, 8);
    expect(evaluator.logDet).toBeCloseTo(logDet, 7);
    expect(evaluator.known).toBeCloseTo(prss + logDet, 7);
    expect(evaluator.estimated).toBeCloseTo((count - 2) * Math.log(prss / (count - 2)) + logDet, 7);
    expect(fitSmoothingSpline(obs, lambda).restrictedDeviance).toBeCloseTo(prss + logDet, 7);
  });
});

function sumOfTerms(evaluator: LambdaEvaluator): number {
  const terms = new Float64Array(evaluator.series.obs.pulls.length);
  const count = evaluator.lotTerms(terms);
  return terms.subarray(0, count).reduce((a, b) => a + b, 0);
}

describe('leave-one-lot-out', () => {
  it.each<[string, (i: number) => number]>([
    ['points of their own', (i) => i],
    ['contiguous lots', (i) => i >> 2],
    ['interleaved lots', (i) => i % 12],
  ])('agrees with refits by dense algebra: %s', (_name, lotOf) => {
    const plain = wavySeries(36, 64, lotOf);
    const obs = withFactors(plain, (lot) => [1, 1, 0, 0.4][lot % 4]);
    const evaluator = new LambdaEvaluator(prepareSeries(obs));
    for (const lambda of [0.1, 10, 1000]) {
      evaluator.evaluate(lambda);
      let total = 0;
      for (let lot = 0; lot < obs.pulls.length; lot++) {
        if (obs.pulls[lot] === 0) continue;
        const { fitted } = naiveSpline(obs, lambda, lot);
        const own = fitted.map((_, i) => i).filter((i) => obs.lot[i] === lot);
        const weight = own.reduce((sum, i) => sum + obs.weight[i] * obs.pulls[lot], 0);
        const sum = own.reduce((s, i) => s + obs.weight[i] * obs.pulls[lot] * (obs.y[i] - fitted[i]), 0);
        total += (sum * sum) / weight;
      }
      expect(sumOfTerms(evaluator) / total).toBeCloseTo(1, 8);
    }
  });
  it('is refused when a lot holds all but one of the times', () => {
    const evaluator = new LambdaEvaluator(prepareSeries(observations([0, 1, 2, 3], [0, 1, 0, 1], [0, 1, 1, 1])));
    evaluator.evaluate(1);
    expect(() => sumOfTerms(evaluator)).toThrow(BaselineError);
  });
});

describe('an evaluator', () => {
  const obs = wavySeries(50, 65, (i) => i % 16);
  const series = prepareSeries(obs);
  const all = (e: LambdaEvaluator) => [e.edf, e.rss, e.prss, e.logDet, e.known, e.estimated, sumOfTerms(e)];
  it('gives the same bits whatever it was asked before', () => {
    const used = new LambdaEvaluator(series);
    for (const lambda of [1e-3, 1e9, Infinity, 7]) {
      used.evaluate(lambda);
      sumOfTerms(used);
    }
    const fresh = new LambdaEvaluator(series);
    fresh.evaluate(7);
    expect(all(used)).toEqual(all(fresh));
  });
  it('gives the same for a long series block by block as from the states of all points', () => {
    const obs = withFactors(wavySeries(70000, 66), (lot) => [1, 0, 0.5][lot % 3]);
    const long = prepareSeries(obs);
    const evaluator = new LambdaEvaluator(long);
    evaluator.evaluate(1e6);
    const { forward, backward } = evaluator;
    const p: Posterior = { value: 0, slope: 0, variance: 0, covariance: 0, slopeVariance: 0 };
    let [edf, rss] = [0, 0];
    long.pull.forEach((w, k) => {
      combine(forward, STATE_SIZE * k, backward, STATE_SIZE * k, w, w * long.r[k], p);
      edf += w * p.variance;
      rss += w * (long.r[k] - p.value) ** 2;
    });
    expect(Math.abs(evaluator.edf / edf - 1)).toBeLessThan(1e-12);
    expect(Math.abs(evaluator.rss / (rss * long.weightScale) - 1)).toBeLessThan(1e-12);
    const fit = fitSmoothingSpline(obs, 1e6);
    expect(Math.abs(evaluator.prss / (fit.weightedRss + 1e6 * fit.penalty) - 1)).toBeLessThan(1e-11);
  });
  it.each([
    [0, 'bad-argument'],
    [-1, 'bad-argument'],
    [NaN, 'non-finite'],
    [1e-320, 'ill-posed'],
  ])('refuses lambda %p as %s', (lambda, code) => {
    expect(() => new LambdaEvaluator(series).evaluate(lambda)).toThrow(
      expect.objectContaining({ code }) as BaselineError,
    );
  });
});
