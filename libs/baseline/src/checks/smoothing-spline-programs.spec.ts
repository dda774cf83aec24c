import { fitSmoothingSpline } from '../spline/smoothing-spline';
import { rangeOf, reference, worstDifference } from '../testing/reference';
import { observations } from '../testing/series';

interface RFit {
  lambda: number;
  df: number;
  weightedRss: number;
  fitted: number[];
  slope: number[];
  leverage: number[];
}
type RReference = { series: Record<string, { x: number[]; y: number[]; w: number[]; fits: RFit[] }> };
interface SciPyFit {
  lam: number;
  fitted: number[];
  slope: number[];
  middle: number[];
}
type SciPyReference = {
  series: Record<string, { x: number[]; y: number[]; w: number[]; middle: number[]; fits: SciPyFit[] }>;
};

const sum = (x: number[]) => x.reduce((a, b) => a + b, 0);

// R's Gram matrix is computed with .3330 for 1/3, which limits the agreement (1e-3 of lambda's effect):
// fits agree to 1e-4 of the range, leverages to 3e-4, and to 4e-4 where few points decide each value (lambda = 1e-6).
describe.each(Object.entries(reference<RReference>('r-smooth-spline.json').series))(
  "the smoothing spline of R's series %s agrees with smooth.spline(all.knots = TRUE)",
  (_name, { x, y, w, fits }) => {
    const distinct = [...new Set(x)];
    const first = distinct.map((v) => x.indexOf(v));
    it.each(fits.map((fit) => [fit.lambda, fit] as const))('at its lambda %p', (alpha, expected) => {
      const lambda = (alpha * rangeOf(x) ** 3 * sum(w)) / w.length;
      const fit = fitSmoothingSpline(observations(x, y, undefined, w), lambda);
      const leverage = distinct.map((v) => sum([...fit.leverage].filter((_, i) => x[i] === v)));
      const scale = rangeOf(y);
      expect(
        worstDifference(
          first.map((i) => fit.fitted[i]),
          expected.fitted,
        ),
      ).toBeLessThan(1e-4 * scale);
      expect(
        worstDifference(
          first.map((i) => fit.slope[i]),
          expected.slope,
        ),
      ).toBeLessThan(5e-3 * rangeOf(expected.slope) + (1e-4 * scale) / rangeOf(x));
      expect(worstDifference(leverage, expected.leverage)).toBeLessThan(alpha > 1e-6 ? 3e-4 : 4e-4);
      expect(fit.edf).toBeCloseTo(expected.df, 1);
      expect(Math.abs(fit.weightedRss / expected.weightedRss - 1)).toBeLessThan(1e-3);
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
