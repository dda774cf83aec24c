import { Matrix } from 'ml-matrix';
import { chooseLambda } from '../choice/choose-lambda';
import { byTime, rSeries, sum } from './program-series';
import { fitSmoothingSpline } from '../spline/smoothing-spline';
import type { Observations } from '../observations';
import { roughness } from '../testing/naive-spline';
import { rangeOf, reference, worstDifference } from '../testing/reference';
import { observations } from '../testing/series';

/** N RSS / (N - edf)^2, N readings. */
function gcv(obs: Observations, lambda: number): number {
  const { weightedRss, edf } = fitSmoothingSpline(obs, lambda);
  const n = obs.t.length;
  return (n * weightedRss) / (n - edf) ** 2;
}

/** Mean over the distinct times of W e^2, e the weighted mean of what a time's readings leave to the fit without them. */
function leaveOneTimeOut(obs: Observations, lambda: number): number {
  let total = 0;
  for (const { indices, residual } of fitSmoothingSpline(obs, lambda).deletedLots()) {
    let weight = 0;
    let sum = 0;
    indices.forEach((i, p) => {
      weight += obs.weight[i];
      sum += obs.weight[i] * residual[p];
    });
    total += (sum * sum) / weight;
  }
  return total / obs.pulls.length;
}

// R's criteria differ by its .3330 for 1/3, by up to 6e-5 here. Of lambda only the criterion's value can be compared: near its minimum it is flat.
describe.each(rSeries())(
  "the choice of smoothness for R's series %s agrees with smooth.spline's",
  (name, { x, y, w, choices, defaultDf }) => {
    const obs = byTime(x, y, w);
    it.each(choices.map((choice) => [choice.cv ? 'leave-one-out' : 'GCV', choice] as const))('by %s', (_rule, r) => {
      const criterion = r.cv ? leaveOneTimeOut : gcv;
      const theirs = criterion(obs, r.lambda * rangeOf(x) ** 3);
      expect(Math.abs(theirs / r.crit - 1)).toBeLessThan(1e-4);
      const { lambda } = chooseLambda(obs, { rule: r.cv ? 'lot-cv' : 'gcv', floorLambda: 0 });
      // Where the line is best (cars), ours stops at 2.0003 degrees of freedom, R's at its bound on spar: 2e-6 apart.
      expect(criterion(obs, lambda)).toBeLessThan(theirs * (1 + 5e-6));
      expect(Math.abs(fitSmoothingSpline(obs, lambda).edf / r.df - 1)).toBeLessThan(1e-3);
    });
    if (defaultDf === obs.pulls.length) {
      it('by GCV where R ends among rounding errors: interpolation is not better than the minimum found here', () => {
        expect(['LakeHuron', 'co2']).toContain(name);
        // As lambda -> 0, N RSS/(N - edf)^2 -> N |K y|^2 / (tr K)^2 for unit weights, from S = (I + lambda K)^-1 = I - lambda K + ...
        const k = roughness(x);
        const limit = (x.length * k.mmul(Matrix.columnVector(y)).norm('frobenius') ** 2) / k.trace() ** 2;
        const { lambda } = chooseLambda(obs, { rule: 'gcv', floorLambda: 0 });
        expect(gcv(obs, lambda)).toBeLessThan(limit * 0.98);
        expect(Math.abs(gcv(obs, lambda * 1e-4) / limit - 1)).toBeLessThan(0.01);
      });
    }
  },
);

interface LongChoice {
  n: number;
  choices: { lambda: number; df: number; crit: number };
  /** At every 800th point. */
  fitted: number[];
}

// R's default knots, some 200, hold a slow curve of 17 degrees of freedom to 1e-6 of its range. Here the penalty is searched on a reduced basis, too.
describe('the choice by GCV on a long series agrees with smooth.spline with its default knots', () => {
  const { n, choices: r, fitted } = reference<{ long: LongChoice }>('r-smooth-spline.json').long;
  const index = Array.from({ length: n }, (_, i) => i);
  const noise = (i: number) => ((((i * i) % 100003) * i + 17 * i * i) % 100003) / 100003 - 0.5;
  const y = index.map((i) => Math.sin((7 * i) / n) + noise(i));
  const weight = index.map((i) => 1 + (i % 3));
  const mean = sum(weight) / n;
  const obs = observations(
    index,
    y,
    undefined,
    weight.map((w) => w / mean),
  );
  const at = fitted.map((_, k) => 800 * k);

  it('at its penalty, in criterion, degrees of freedom and curve', () => {
    const lambda = r.lambda * (n - 1) ** 3;
    const fit = fitSmoothingSpline(obs, lambda);
    expect(Math.abs(gcv(obs, lambda) / r.crit - 1)).toBeLessThan(1e-7);
    expect(Math.abs(fit.edf / r.df - 1)).toBeLessThan(3e-4);
    expect(
      worstDifference(
        at.map((i) => fit.fitted[i]),
        fitted,
      ),
    ).toBeLessThan(2e-6 * rangeOf(fitted));
  });
  it('in what is chosen', () => {
    const { lambda } = chooseLambda(obs, { rule: 'gcv', floorLambda: 0 });
    const fit = fitSmoothingSpline(obs, lambda);
    expect(gcv(obs, lambda)).toBeLessThan(gcv(obs, r.lambda * (n - 1) ** 3) * (1 + 1e-9));
    expect(Math.abs(fit.edf / r.df - 1)).toBeLessThan(1e-3);
    expect(
      worstDifference(
        at.map((i) => fit.fitted[i]),
        fitted,
      ),
    ).toBeLessThan(1e-5 * rangeOf(fitted));
  });
});
