import type { BaselineFit, BaselineSpec } from '../baseline-fit';
import { fitBaseline } from '../fit-baseline';
import { rangeOf, reference, worstDifference } from '../testing/reference';
import { observations } from '../testing/series';

interface PreciseFit {
  method: 'natural-spline' | 'b-spline' | 'polynomial';
  size: number;
  knots: number[];
  fitted: number[];
  standardError: number[];
  leverage: number[];
  deletedResidual: number[];
}
type Reference = {
  series: Record<string, { t: number[]; y: number[]; w: number[]; lot: number[]; fits: PreciseFit[] }>;
};

const relative = (actual: ArrayLike<number>, expected: number[]) =>
  worstDifference(
    expected.map((v, i) => actual[i] / v),
    expected.map(() => 1),
  );

describe.each(Object.entries(reference<Reference>('mpmath-regression.json').series))(
  'on epoch seconds, the series "%s" agrees with 60 digits',
  (name, { t, y, w, lot, fits }) => {
    const obs = observations(t, y, lot, w);
    // A lot that outweighs the others by 18 decades costs some digits of what is left without it.
    const tolerance = name === 'decades' ? 1e-11 : 1e-13;
    it.each(fits.map((fit) => [fit.method, fit.size, fit] as const))('%s (%p)', (method, size, expected) => {
      const spec: BaselineSpec =
        method === 'polynomial' ? { method, degree: size } : { method, knots: Float64Array.from(expected.knots) };
      const fit: BaselineFit = fitBaseline(obs, spec);
      const scale = rangeOf(y);
      expect(worstDifference(fit.fitted, expected.fitted)).toBeLessThan(tolerance * scale);
      expect(relative(fit.standardError, expected.standardError)).toBeLessThan(tolerance);
      expect(worstDifference(fit.leverage, expected.leverage)).toBeLessThan(tolerance);
      expect(worstDifference(fit.scoreLots().deletedResidual, expected.deletedResidual)).toBeLessThan(
        tolerance * Math.max(scale, ...expected.deletedResidual.map(Math.abs)),
      );
    });
  },
);
