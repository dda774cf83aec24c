import fc from 'fast-check';
import { BaselineError } from '../baseline-error';
import type { BaselineMethod } from '../baseline-fit';
import { chooseBaseline } from '../choice/choose-baseline';
import type { ChooseBaselineOptions, ChosenBaseline } from '../choice/chosen-baseline';
import { fitBaseline } from '../fit-baseline';
import type { Observations } from '../observations';
import { normals } from '../testing/normal';
import { observations } from '../testing/series';
import { worstDifference } from '../testing/reference';

/** A wave in noise: 32 uneven times in lots of one to three points that interleave, two times shared; lot 5 does not pull. */
const series = fc.integer({ min: 1, max: 1e6 }).map((seed): Observations => {
  const normal = normals(seed);
  let at = 0;
  const t = Array.from({ length: 32 }, (_, i) => (at += i === 11 || i === 25 ? 0 : 0.5 + Math.abs(normal())));
  const y = t.map((v) => 3 * Math.sin((7 * v) / at) + normal());
  const lot = t.map((_, i) => Math.floor(i / 2) + (i % 5 === 0 ? 1 : 0));
  return observations(
    t,
    y,
    lot,
    t.map((_, i) => 0.5 + (i % 4)),
    [5],
  );
});

type Case = [name: string, options: ChooseBaselineOptions];
const smoothing = (options: Omit<ChooseBaselineOptions, 'method'>): ChooseBaselineOptions => ({
  method: 'smoothing-spline',
  ...options,
});
const REGRESSION: BaselineMethod[] = ['natural-spline', 'b-spline', 'polynomial', 'constant'];
const CASES: Case[] = [
  ['smoothing spline by lots', smoothing({ rule: 'lot-cv' })],
  ['smoothing spline by lots, one standard error', smoothing({ rule: 'lot-cv', hasOneStandardError: true })],
  ['smoothing spline by GCV', smoothing({ rule: 'gcv' })],
  ['smoothing spline by GCV x 1.4, with a shortest period', smoothing({ rule: 'gcv14', shortestPeriodSeconds: 9 })],
  ['smoothing spline by REML', smoothing({ rule: 'reml' })],
  ['smoothing spline by REML, variance estimated', smoothing({ rule: 'reml', remlVariance: 'estimated' })],
  ['smoothing spline of 5.5 degrees of freedom', smoothing({ rule: 'edf', edf: 5.5 })],
  ...REGRESSION.flatMap((method): Case[] => [
    [`${method} by lots`, { method, rule: 'lot-cv' }],
    [`${method} by GCV`, { method, rule: 'gcv' }],
  ]),
  ['natural spline, knots even', { method: 'natural-spline', rule: 'gcv14', placement: 'even' }],
];

const RUNS = { numRuns: 5, seed: 14 };
/** Penalties are found to 1e-4. */
const SEARCH = 1e-3;

function expectSameSmoothness(a: ChosenBaseline, b: ChosenBaseline, unit: number): void {
  expect(b.spec.method).toBe(a.spec.method);
  expect(Math.abs(b.edf - a.edf)).toBeLessThan(SEARCH * a.edf);
  expect([b.isAtFloor, b.isAtBound]).toEqual([a.isAtFloor, a.isAtBound]);
  if (Number.isFinite(a.smoothness))
    expect(Math.abs(b.smoothness / unit - a.smoothness)).toBeLessThanOrEqual(SEARCH * a.smoothness);
  else expect(b.smoothness).toBe(a.smoothness);
}

describe.each(CASES)('the choice of a %s', (_name, options) => {
  const isSpline = options.method === 'smoothing-spline';

  it('knows no unit of values: y -> a + b y, weights / b^2', () => {
    fc.assert(
      fc.property(series, fc.constantFrom(-40, 0.01, 900), (obs, b) => {
        const other = { ...obs, y: obs.y.map((v) => 17 + b * v), weight: obs.weight.map((w) => w / (b * b)) };
        expectSameSmoothness(chooseBaseline(obs, options), chooseBaseline(other, options), isSpline ? 1 / (b * b) : 1);
      }),
      RUNS,
    );
  });

  it('knows no unit and no origin of time', () => {
    fc.assert(
      fc.property(series, fc.constantFrom(60, 86400), (obs, unit) => {
        const t = obs.t.map((v) => 1.7e9 + unit * v);
        const { shortestPeriodSeconds: period } = options;
        const there = period === undefined ? options : { ...options, shortestPeriodSeconds: period * unit };
        expectSameSmoothness(
          chooseBaseline(obs, options),
          chooseBaseline({ ...obs, t }, there),
          isSpline ? unit ** 3 : 1,
        );
      }),
      RUNS,
    );
  });

  it('does not mind the order of points that share a time, nor the names of lots', () => {
    fc.assert(
      fc.property(series, (obs) => {
        const order = [...obs.t.keys()].sort((i, j) => obs.t[i] - obs.t[j] || j - i);
        const last = obs.pulls.length - 1;
        const other = {
          t: obs.t,
          y: Float64Array.from(order, (i) => obs.y[i]),
          weight: Float64Array.from(order, (i) => obs.weight[i]),
          lot: Int32Array.from(order, (i) => last - obs.lot[i]),
          pulls: obs.pulls.slice().reverse(),
        };
        expectSameSmoothness(chooseBaseline(obs, options), chooseBaseline(other, options), 1);
      }),
      RUNS,
    );
  });

  it('is the edf of its fit, no worse than the curve, and a criterion that can be worked out from the fit', () => {
    fc.assert(
      fc.property(series, (obs) => {
        const chosen = chooseBaseline(obs, options);
        const fit = fitBaseline(obs, chosen.spec);
        expect(Math.abs(fit.edf - chosen.edf)).toBeLessThan(1e-8);
        const best = Math.min(...chosen.criterion.curve.map((c) => c.value));
        if (options.rule === 'edf') expect(Math.abs(fit.edf - 5.5)).toBeLessThan(1e-9);
        else if (options.hasOneStandardError !== true)
          expect(chosen.criterion.value).toBeLessThanOrEqual(best + 1e-12 * Math.abs(best));
        const { value } = chosen.criterion;
        const expected = criterion(obs, chosen, options.rule);
        if (expected !== undefined) expect(Math.abs(value / expected - 1)).toBeLessThan(1e-8);
      }),
      RUNS,
    );
  });

  it('gives the same bits for the same input', () => {
    fc.assert(
      fc.property(series, (obs) => {
        expect(chooseBaseline(obs, options)).toEqual(chooseBaseline(obs, options));
      }),
      { ...RUNS, numRuns: 3 },
    );
  });

  it('of points on a line leaves nothing to the fit', () => {
    fc.assert(
      fc.property(series, (obs) => {
        const y = obs.t.map((v) => 5 - (options.method === 'constant' ? 0 : 2 * v));
        const fit = fitBaseline({ ...obs, y }, chooseBaseline({ ...obs, y }, options).spec);
        expect(worstDifference(fit.fitted, y)).toBeLessThan(1e-10);
      }),
      RUNS,
    );
  });
});

/** GCV and leave-one-lot-out by their formulas, from what the fit gives. */
function criterion(obs: Observations, { spec }: ChosenBaseline, rule: string): number | undefined {
  const fit = fitBaseline(obs, spec);
  const n = fit.pullCount;
  if (rule === 'gcv') return (n * fit.weightedRss) / (n - fit.edf) ** 2;
  if (rule === 'gcv14') return (n * fit.weightedRss) / (n - 1.4 * fit.edf) ** 2;
  if (rule !== 'lot-cv') return undefined;
  let total = 0;
  let lots = 0;
  for (const { lot, indices, residual } of fit.deletedLots()) {
    if (indices.length === 0 || obs.pulls[lot] === 0) continue;
    const weight = indices.reduce((sum, i) => sum + obs.weight[i], 0);
    const sum = indices.reduce((s, i, p) => s + obs.weight[i] * residual[p], 0);
    total += (sum * sum) / weight;
    lots++;
  }
  return total / lots;
}

describe('weights as repeats, where the number of points takes no part', () => {
  it.each([
    ['lots left out', smoothing({ rule: 'lot-cv' })],
    ['REML with the variance known', smoothing({ rule: 'reml' })],
    ['lots left out, natural spline', { method: 'natural-spline', rule: 'lot-cv' } as const],
  ])('%s: a point of weight 2 w counts as two of weight w', (_name, options) => {
    fc.assert(
      fc.property(series, (obs) => {
        const twice = [...obs.t.keys()].flatMap((i) => (i % 3 === 0 ? [i, i] : [i]));
        const other: Observations = {
          t: Float64Array.from(twice, (i) => obs.t[i]),
          y: Float64Array.from(twice, (i) => obs.y[i]),
          weight: Float64Array.from(twice, (i) => obs.weight[i] / (i % 3 === 0 ? 2 : 1)),
          lot: Int32Array.from(twice, (i) => obs.lot[i]),
          pulls: obs.pulls,
        };
        expectSameSmoothness(chooseBaseline(obs, options), chooseBaseline(other, options), 1);
      }),
      RUNS,
    );
  });
});

describe('for any finite observations, a choice', () => {
  const point = fc.record({
    gap: fc.oneof(
      fc.constant(0),
      fc.double({ min: 0, max: 1, noNaN: true }),
      fc.double({ min: 0, max: 1e9, noNaN: true }),
    ),
    y: fc.oneof(fc.constant(3), fc.double({ min: -1e12, max: 1e12, noNaN: true })),
    decade: fc.integer({ min: -9, max: 9 }),
    lot: fc.nat(6),
  });
  it.each(CASES)('of a %s is finite or refused by a typed error', (_name, options) => {
    fc.assert(
      fc.property(fc.array(point, { minLength: 1, maxLength: 25 }), (points) => {
        let at = 0;
        const obs = observations(
          points.map((p) => (at += p.gap)),
          points.map((p) => p.y),
          points.map((p) => p.lot),
          points.map((p) => 10 ** p.decade),
        );
        try {
          const { smoothness, edf, criterion: found, minima } = chooseBaseline(obs, options);
          const numbers = [edf, found.value, ...[...found.curve, ...minima].flatMap((c) => [c.edf, c.value])];
          return numbers.every(Number.isFinite) && smoothness >= 0;
        } catch (error) {
          return error instanceof BaselineError;
        }
      }),
      { numRuns: 40, seed: 15 },
    );
  });
});
