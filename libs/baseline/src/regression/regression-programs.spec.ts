import type { BaselineFit } from '../baseline-fit';
import { rangeOf, reference, worstDifference } from '../testing/reference';
import { observations } from '../testing/series';
import { fitBSpline, fitNaturalSpline, fitPolynomial } from './fit-regression';
import { placeKnots } from './place-knots';

interface RFit {
  method: 'natural-spline' | 'b-spline' | 'polynomial';
  count: number;
  weighted: boolean;
  weightedRss: number;
  knots: number[];
  /** Points, from 1. */
  at: number[];
  fitted: number[];
  standardError: number[];
  leverage: number[];
  deletedResidual: number[];
  beyond?: number[];
  projected: number[];
  projectedError: number[];
}
type RReference = { series: Record<string, { x: number[]; y: number[]; fits: RFit[] }> };

describe.each(Object.entries(reference<RReference>('r-regression.json').series))(
  "on R's series %s",
  (_name, { x, y, fits }) => {
    const named = fits.map((fit) => [fit.method, fit.count, fit.weighted ? 'weighted' : 'unweighted', fit] as const);
    it.each(named)('%s (%p, %s) agrees with lm to 1e-9 of the range', (method, count, _weights, expected) => {
      const weight = x.map((_, i) => (expected.weighted ? 1 + ((i + 1) % 3) : 1));
      const obs = observations(x, y, undefined, weight);
      let fit: BaselineFit;
      if (method === 'polynomial') fit = fitPolynomial(obs, count);
      else {
        const knots = placeKnots(obs, count, 'quantile');
        expect(worstDifference(knots, expected.knots)).toBeLessThan(1e-12 * rangeOf(x));
        fit = method === 'b-spline' ? fitBSpline(obs, knots) : fitNaturalSpline(obs, knots);
      }
      const scale = rangeOf(y);
      const at = (values: Float64Array) => expected.at.map((i) => values[i - 1]);
      expect(worstDifference(at(fit.fitted), expected.fitted)).toBeLessThan(1e-9 * scale);
      expect(worstDifference(at(fit.standardError), expected.standardError)).toBeLessThan(1e-9);
      expect(worstDifference(at(fit.leverage), expected.leverage)).toBeLessThan(1e-9);
      expect(worstDifference(at(fit.scoreLots().deletedResidual), expected.deletedResidual)).toBeLessThan(1e-9 * scale);
      expect(Math.abs(fit.weightedRss / expected.weightedRss - 1)).toBeLessThan(1e-9);
      if (expected.beyond === undefined) return;
      const there = expected.beyond.map((t) => fit.at(t));
      expect(
        worstDifference(
          there.map((p) => p.value),
          expected.projected,
        ),
      ).toBeLessThan(1e-9 * Math.max(scale, ...expected.projected.map(Math.abs)));
      expect(
        worstDifference(
          there.map((p) => p.standardError),
          expected.projectedError,
        ),
      ).toBeLessThan(1e-9 * Math.max(1, ...expected.projectedError));
    });
  },
);
