import fc from 'fast-check';
import type { BaselineFit, BaselineMethod, BaselineSpec } from '../baseline-fit';
import { fitBaseline } from '../fit-baseline';
import type { Observations } from '../observations';

/** Every method, with a smoothness that fits a series of at least eight distinct times. */
export type MethodCase = readonly [name: string, specOf: (obs: Observations) => BaselineSpec];

/** Knots midway between neighbouring times of pulling points, at even shares of them. */
function knotsOf({ t, lot, pulls }: Observations, count: number): Float64Array {
  const times = [...new Set(t.filter((_, i) => pulls[lot[i]] > 0))];
  return Float64Array.from({ length: count }, (_, k) => {
    const i = Math.floor(((k + 1) * times.length) / (count + 1));
    return times[i - 1] + (times[i] - times[i - 1]) / 2;
  });
}

/** Penalty of 0.001 times the mean weight and the cubed range: some five degrees of freedom, whatever the units. */
function lambdaOf({ t, weight, lot, pulls }: Observations, share: number): number {
  const total = weight.reduce((sum, w, i) => sum + w * pulls[lot[i]], 0);
  return (share * total * (t[t.length - 1] - t[0]) ** 3) / t.length;
}

export const METHODS: readonly MethodCase[] = [
  ['smoothing spline', (obs) => ({ method: 'smoothing-spline', lambda: lambdaOf(obs, 1e-2) })],
  ['stiff smoothing spline', (obs) => ({ method: 'smoothing-spline', lambda: lambdaOf(obs, 10) })],
  ['smoothing spline without end', () => ({ method: 'smoothing-spline', lambda: Infinity })],
  ['natural spline', (obs) => ({ method: 'natural-spline', knots: knotsOf(obs, 3) })],
  ['natural spline without knots', () => ({ method: 'natural-spline', knots: new Float64Array(0) })],
  ['b-spline', (obs) => ({ method: 'b-spline', knots: knotsOf(obs, 2) })],
  ['b-spline without knots', () => ({ method: 'b-spline', knots: new Float64Array(0) })],
  ['polynomial of degree 1', () => ({ method: 'polynomial', degree: 1 })],
  ['polynomial of degree 4', () => ({ method: 'polynomial', degree: 4 })],
  ['constant', () => ({ method: 'constant' })],
];

export const isConstant = (spec: BaselineSpec): boolean => spec.method === 'constant';
export const ALL: readonly BaselineMethod[] = [
  'smoothing-spline',
  'natural-spline',
  'b-spline',
  'polynomial',
  'constant',
];

/** The same specification where time is counted as scale * t + origin and weights are multiplied by `weight`. */
export function inOtherUnits(spec: BaselineSpec, scale: number, origin: number, weight: number): BaselineSpec {
  if (spec.method === 'smoothing-spline') return { ...spec, lambda: spec.lambda * scale ** 3 * weight };
  if ('knots' in spec) return { ...spec, knots: spec.knots.map((k) => k * scale + origin) };
  return spec;
}

/** Series of 10 to 24 points in 8 or more lots: uneven times, ties, weights over a decade, lots that interleave, one set down or left out. */
export const series = fc
  .array(
    fc.record({
      gap: fc.oneof({ weight: 5, arbitrary: fc.double({ min: 0.2, max: 2, noNaN: true }) }, fc.constant(0)),
      y: fc.double({ min: -10, max: 10, noNaN: true }),
      weight: fc.double({ min: 0.3, max: 3, noNaN: true }),
      shift: fc.integer({ min: 0, max: 2 }),
    }),
    { minLength: 14, maxLength: 26 },
  )
  .chain((points) => fc.tuple(fc.constant(points), fc.constantFrom(1, 0.5, 0)))
  .map(([points, factor]): Observations => {
    let at = 0;
    const lotCount = Math.floor(points.length / 2) + 2;
    const pulls = new Float64Array(lotCount).fill(1);
    pulls[3] = factor;
    return {
      // Every other gap is positive, so that eight distinct times are there.
      t: Float64Array.from(points, (p, i) => (at += i % 2 === 0 ? p.gap + 0.5 : p.gap)),
      y: Float64Array.from(points, (p) => p.y),
      weight: Float64Array.from(points, (p) => p.weight),
      lot: Int32Array.from(points, (p, i) => Math.min(lotCount - 1, Math.floor(i / 2) + p.shift)),
      pulls,
    };
  });

/** S by unit vectors: column j is the fit to a value of 1 at point j and 0 elsewhere. */
export function smootherMatrix(obs: Observations, spec: BaselineSpec): number[][] {
  const n = obs.t.length;
  const columns = Array.from(obs.t, (_, j) => {
    const unit = new Float64Array(n);
    unit[j] = 1;
    return fitBaseline({ ...obs, y: unit }, spec).fitted;
  });
  return Array.from(obs.t, (_, i) => columns.map((column) => column[i]));
}

/** Every number that a fit gives. */
export function everyNumber(fit: BaselineFit, obs: Observations): number[] {
  const scores = fit.scoreLots();
  const steps = fit.stepEstimates();
  const pieces = fit.pieces();
  const middle = obs.t[0] + (obs.t[obs.t.length - 1] - obs.t[0]) / 2;
  const there = fit.at(middle);
  const lists: ArrayLike<number>[] = [
    [fit.edf, fit.weightedRss, fit.pullCount, there.value, there.slope, there.curvature, there.standardError],
    [fit.covariance(obs.t[0], middle)],
    ...[fit.fitted, fit.slope, fit.curvature, fit.standardError, fit.leverage],
    ...[pieces.breaks, pieces.coefficients, scores.deletedResidual, scores.residual, steps.estimate],
    fit.residualProduct(obs.y),
    ...Array.from(obs.pulls, (_, lot) => fit.smootherBlock(lot)),
    // Infinity is how a lot that cannot be scored, and a step that the baseline follows, are said.
    ...[scores.variance, steps.standardError].map((list) => list.map((v) => (v === Infinity ? 0 : v))),
  ];
  return lists.flatMap((list) => Array.from(list));
}
