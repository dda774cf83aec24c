import fc from 'fast-check';
import { BaselineError } from '../baseline-error';
import type { BaselineSpec } from '../baseline-fit';
import { fitBaseline } from '../fit-baseline';
import type { Observations } from '../observations';
import { everyNumber } from './methods';

const any = (max: number) => fc.double({ min: -max, max, noNaN: true });
/** Positive numbers over 600 decades. */
const positive = fc.double({ min: -300, max: 300, noNaN: true }).map((decade) => 10 ** decade);
const point = fc.record({
  gap: fc.oneof(fc.constant(0), fc.double({ min: 0, max: 1, noNaN: true }), positive),
  y: fc.oneof(any(10), any(1e12), any(Number.MAX_VALUE), fc.constantFrom(0, 5e-324, Number.MAX_VALUE)),
  weight: fc.oneof(fc.double({ min: 0.1, max: 10, noNaN: true }), positive, fc.constantFrom(5e-324, Number.MAX_VALUE)),
  lot: fc.nat(5),
});
const factor = fc.oneof(fc.constantFrom(0, 1, 1, 5e-324), fc.double({ min: 0, max: 1, noNaN: true }));
const hostile = fc
  .tuple(fc.array(point, { minLength: 1, maxLength: 20 }), fc.array(factor, { minLength: 6, maxLength: 6 }), any(1e10))
  .map(([points, factors, origin]): Observations => {
    let at = origin;
    return {
      t: Float64Array.from(points, (p) => (at = Math.min(Number.MAX_VALUE, at + p.gap))),
      y: Float64Array.from(points, (p) => p.y),
      weight: Float64Array.from(points, (p) => p.weight),
      lot: Int32Array.from(points, (p) => p.lot),
      pulls: Float64Array.from(factors),
    };
  });

const SPECS: [string, fc.Arbitrary<(obs: Observations) => BaselineSpec>][] = [
  [
    'smoothing spline',
    fc
      .oneof(positive, fc.constant(Infinity), fc.constant(5e-324))
      .map((lambda) => () => ({ method: 'smoothing-spline', lambda })),
  ],
  ['natural spline', knots((at) => ({ method: 'natural-spline', knots: at }))],
  ['b-spline', knots((at) => ({ method: 'b-spline', knots: at }))],
  ['polynomial', fc.nat(5).map((degree) => () => ({ method: 'polynomial', degree }))],
  ['constant', fc.constant(() => ({ method: 'constant' }))],
];

/** Knots at given shares of the record. */
function knots(specOf: (at: Float64Array) => BaselineSpec): fc.Arbitrary<(obs: Observations) => BaselineSpec> {
  return fc.uniqueArray(fc.double({ min: 0.01, max: 0.99, noNaN: true }), { maxLength: 4 }).map(
    (shares) =>
      ({ t }: Observations) =>
        specOf(
          Float64Array.from(
            shares.sort((a, b) => a - b),
            (s) => t[0] * (1 - s) + t[t.length - 1] * s,
          ),
        ),
  );
}

/** Whether a computation gives finite numbers or says with a typed error that it cannot. */
function isFiniteOrRefused(compute: () => number[]): boolean {
  try {
    return compute().every(Number.isFinite);
  } catch (error) {
    if (error instanceof BaselineError) return true;
    throw error;
  }
}

describe.each(SPECS)('for any finite observations, however wild, a %s', (_name, specs) => {
  it('answers finite numbers or a typed error', () => {
    fc.assert(
      fc.property(hostile, specs, any(1e12), (obs, specOf, elsewhere) => {
        expect(
          isFiniteOrRefused(() => {
            const fit = fitBaseline(obs, specOf(obs));
            expect(isFiniteOrRefused(() => Object.values(fit.at(elsewhere)))).toBe(true);
            expect(isFiniteOrRefused(() => [fit.covariance(obs.t[0], elsewhere)])).toBe(true);
            for (let lot = 0; lot < obs.pulls.length; lot++) {
              expect(
                isFiniteOrRefused(() =>
                  fit.deletedLots(Int32Array.of(lot)).flatMap((d) => [...d.residual, ...d.covariance]),
                ),
              ).toBe(true);
            }
            return everyNumber(fit, obs);
          }),
        ).toBe(true);
      }),
      { numRuns: 400, seed: 13 },
    );
  });
});
