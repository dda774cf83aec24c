import { chooseLambda, type ChooseLambdaOptions } from '../choice/choose-lambda';
import type { BaselineFit } from '../baseline-fit';
import type { Observations } from '../observations';
import { fitNaturalSpline } from '../regression/fit-regression';
import { fitSmoothingSpline } from '../spline/smoothing-spline';
import { normals } from '../testing/normal';
import { observations } from '../testing/series';
import { naturalTruth } from './natural-truth';

const RUNS = 1000;
const Z95 = 1.959964;

const wave = (x: number) => 2 * Math.sin(2 * Math.PI * x);
const bump = (x: number) => 3 * Math.exp(-(((x - 0.4) / 0.15) ** 2)) + x;
const settling = (x: number) => 4 * (1 - Math.exp(-3 * x)) + Math.sin(9 * x) / 2;

/** Places between which movements are judged, as shares of the record. */
const PLACES = [0.03, 0.2, 0.37, 0.55, 0.71, 0.9];

interface Scenario {
  n: number;
  sigma: number;
  truth: (x: number) => number;
  fit: (obs: Observations) => BaselineFit;
}

/** Shares of (point, run) at which g +- z sigma sqrt(h/w) holds the truth, and of (pair of places, run) at which the movement's interval does. */
function coverage({ n, sigma, truth, fit }: Scenario): { curve: number; movement: number } {
  const normal = normals(n);
  const t = Array.from({ length: n }, (_, i) => 600 * (i + 0.3 * Math.sin(5 * i)));
  const span = t[n - 1] - t[0];
  const truths = t.map((v) => truth((v - t[0]) / span));
  // A standard error of g is sqrt(h / w) at sigma^2 = 1; a third of the points are means of two readings.
  const weight = t.map((_, i) => (i % 3 === 0 ? 2 : 1));
  let [inside, held, pairs] = [0, 0, 0];
  for (let run = 0; run < RUNS; run++) {
    const y = truths.map((g, i) => g + (sigma * normal()) / Math.sqrt(weight[i]));
    const fitted = fit(observations(t, y, undefined, weight));
    const s = Math.sqrt(fitted.weightedRss / (n - fitted.edf));
    for (let i = 0; i < n; i++) {
      if (Math.abs(fitted.fitted[i] - truths[i]) <= Z95 * s * Math.sqrt(fitted.leverage[i] / weight[i])) inside++;
    }
    PLACES.slice(1).forEach((x, k) => {
      const [a, b] = [t[0] + PLACES[k] * span, t[0] + x * span];
      const movement = fitted.at(b).value - fitted.at(a).value;
      const variance = fitted.covariance(a, a) + fitted.covariance(b, b) - 2 * fitted.covariance(a, b);
      pairs++;
      if (Math.abs(movement - (truth(x) - truth(PLACES[k]))) <= Z95 * s * Math.sqrt(variance)) held++;
    });
  }
  return { curve: inside / (RUNS * n), movement: held / pairs };
}

function expectNominal(found: { curve: number; movement: number }): void {
  for (const share of [found.curve, found.movement]) {
    expect(share).toBeGreaterThan(0.93);
    expect(share).toBeLessThan(0.97);
  }
}

const reml: ChooseLambdaOptions = { rule: 'reml', remlVariance: 'estimated', floorLambda: 0 };
const gcv: ChooseLambdaOptions = { rule: 'gcv', floorLambda: 0 };
const chosen = (options: ChooseLambdaOptions) => (obs: Observations) =>
  fitSmoothingSpline(obs, chooseLambda(obs, options).lambda);

describe(`over ${RUNS} seeded series in white noise, 95 % intervals hold the truth on average across the curve (Nychka 1988, JASA 83:1134)`, () => {
  it.each<[string, Scenario]>([
    ['a wave, 60 points, REML', { n: 60, sigma: 0.5, truth: wave, fit: chosen(reml) }],
    ['a bump, 120 points, REML', { n: 120, sigma: 0.7, truth: bump, fit: chosen(reml) }],
    ['a settling line, 150 points, GCV', { n: 150, sigma: 0.4, truth: settling, fit: chosen(gcv) }],
  ])('of a smoothing spline whose penalty is chosen: %s', (_name, scenario) => {
    expectNominal(coverage(scenario));
  });

  it('of a natural regression spline whose knots can represent the truth, for curve and movements', () => {
    const n = 90;
    const span = 600 * (n - 1 + 0.3 * Math.sin(5 * (n - 1)));
    const knots = [0, 0.22, 0.48, 0.7, 1];
    const inner = Float64Array.from(knots.slice(1, -1), (k) => k * span);
    const truth = naturalTruth(knots, 3, -5, [40, -90, 30]);
    expectNominal(coverage({ n, sigma: 0.5, truth, fit: (obs) => fitNaturalSpline(obs, inner) }));
  });
});
