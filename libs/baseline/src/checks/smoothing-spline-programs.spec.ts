import { byTime, rSeries, sum } from './program-series';
import { fitSmoothingSpline } from '../spline/smoothing-spline';
import { rangeOf, reference, worstDifference } from '../testing/reference';
import { observations } from '../testing/series';

interface SciPyFit {
  lam: number;
  fitted: number[];
  slope: number[];
  middle: number[];
}
type SciPyReference = {
  series: Record<string, { x: number[]; y: number[]; w: number[]; middle: number[]; fits: SciPyFit[] }>;
};

// R's Gram matrix is computed with .3330 for 1/3 (1e-3 of lambda's effect), which bounds the agreement: fits to 1e-4 of the range, leverages
// to 3e-4; to 1.5e-4 and 4e-4 where few points decide each value (lambda = 1e-6). SciPy, below, agrees on the same series a thousand times better.
describe.each(rSeries())(
  "the smoothing spline of R's series %s agrees with smooth.spline(all.knots = TRUE)",
  (_name, { x, y, w, fits }) => {
    const distinct = [...new Set(x)];
    const first = distinct.map((v) => x.indexOf(v));
    const obs = byTime(x, y, w);
    it.each(fits.map((fit) => [fit.lambda, fit] as const))('at its lambda %p', (alpha, expected) => {
      const fit = fitSmoothingSpline(obs, alpha * rangeOf(x) ** 3);
      const leverage = distinct.map(() => 0);
      fit.leverage.forEach((h, i) => (leverage[obs.lot[i]] += h));
      const at = (values: Float64Array) => first.map((i) => values[i]);
      const scale = rangeOf(y);
      expect(worstDifference(at(fit.fitted), expected.fitted)).toBeLessThan((alpha > 1e-6 ? 1e-4 : 1.5e-4) * scale);
      expect(worstDifference(at(fit.slope), expected.slope)).toBeLessThan(
        5e-3 * rangeOf(expected.slope) + (1e-4 * scale) / rangeOf(x),
      );
      expect(worstDifference(leverage, expected.leverage)).toBeLessThan(alpha > 1e-6 ? 3e-4 : 4e-4);
      expect(Math.abs(fit.edf / expected.df - 1)).toBeLessThan(5e-4);
      const meanWeight = sum(w) / w.length;
      expect(Math.abs((fit.weightedRss * meanWeight) / expected.weightedRss - 1)).toBeLessThan(1e-3);
    });
  },
);

describe.each(Object.entries(reference<SciPyReference>('scipy-smoothing-spline.json').series))(
  "the smoothing spline of the series %s agrees with SciPy's make_smoothing_spline",
  (_name, { x, y, w, middle, fits }) => {
    it.each(fits.map((fit) => [fit.lam, fit] as const))('at the same lambda %p', (lam, expected) => {
      const fit = fitSmoothingSpline(observations(x, y, undefined, w), lam);
      const scale = rangeOf(y);
      expect(worstDifference(fit.fitted, expected.fitted)).toBeLessThan(1e-7 * scale);
      expect(worstDifference(fit.slope, expected.slope)).toBeLessThan((1e-6 * scale * x.length) / rangeOf(x));
      expect(
        worstDifference(
          middle.map((t) => fit.at(t).value),
          expected.middle,
        ),
      ).toBeLessThan(1e-7 * scale);
    });
  },
);
