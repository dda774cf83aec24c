import fc from 'fast-check';
import { fitBaseline } from '../fit-baseline';
import type { Observations } from '../observations';
import { fitRobust } from '../robust/fit-robust';
import { normals } from '../testing/normal';
import { rangeOf, worstDifference } from '../testing/reference';
import { observations } from '../testing/series';
import { inOtherUnits, METHODS } from './methods';

/** A wave in noise of variance 1 / weight, two points a lot, 24 lots of which three lie 15 standard deviations off. */
const series = fc.integer({ min: 1, max: 1e6 }).map((seed): Observations => {
  const normal = normals(seed);
  let at = 0;
  const t = Array.from({ length: 48 }, () => (at += 0.5 + Math.abs(normal())));
  const weight = t.map((_, i) => 1 + (i % 3));
  const lot = t.map((_, i) => Math.floor(i / 2));
  const off = [5, 12, 19];
  const y = t.map(
    (v, i) => Math.sin((3 * v) / at) + (normal() + (off.includes(lot[i]) ? 15 : 0)) / Math.sqrt(weight[i]),
  );
  return observations(t, y, lot, weight);
});
const RUNS = { numRuns: 8, seed: 16 };

describe.each(METHODS)('a %s that lots far off do not pull', (_name, specOf) => {
  it('sets down the same lots in any unit of values, weights and time', () => {
    const units = fc.tuple(fc.constantFrom(-30, 1e-3), fc.constantFrom(60, 1e-3));
    fc.assert(
      fc.property(series, units, (obs, [b, unit]) => {
        const spec = specOf(obs);
        const robust = fitRobust(obs, spec);
        const other = fitRobust(
          {
            ...obs,
            t: obs.t.map((v) => unit * v + 1000),
            y: obs.y.map((v) => 4 + b * v),
            weight: obs.weight.map((w) => w / (b * b)),
          },
          inOtherUnits(spec, unit, 1000, 1 / (b * b)),
        );
        expect([robust.hasConverged, other.hasConverged]).toEqual([true, true]);
        expect(other.setDown).toEqual(robust.setDown);
        expect(worstDifference(other.factor, robust.factor)).toBeLessThan(1e-5);
        const back = other.fit.fitted.map((g) => (g - 4) / b);
        expect(worstDifference(back, robust.fit.fitted)).toBeLessThan(1e-5 * rangeOf(obs.y));
      }),
      RUNS,
    );
  });

  it('sets down the lots that are far off, and is within its own error of the fit without them', () => {
    fc.assert(
      fc.property(series, (obs) => {
        const { setDown, fit, factor } = fitRobust(obs, specOf(obs));
        expect(setDown).toEqual(expect.arrayContaining([5, 12, 19]));
        const pulls = obs.pulls.map((_, lot) => (setDown.includes(lot) ? 0 : 1));
        const plain = fitBaseline({ ...obs, pulls }, specOf(obs));
        expect(worstDifference(fit.fitted, plain.fitted)).toBeLessThan(1.5 * Math.max(...plain.standardError));
        expect(factor.every((v) => v >= 0 && v <= 1)).toBe(true);
      }),
      RUNS,
    );
  });
});
