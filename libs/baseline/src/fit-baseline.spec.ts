import type { BaselineSpec } from './baseline-fit';
import { fitBaseline } from './fit-baseline';
import { fitBSpline, fitConstant, fitNaturalSpline, fitPolynomial } from './regression/fit-regression';
import { fitSmoothingSpline } from './spline/smoothing-spline';
import { wavySeries } from './testing/series';

const obs = wavySeries(30, 51, (i) => Math.floor(i / 2));
const knots = Float64Array.of(4, 9);

describe('a baseline by its specification', () => {
  it.each([
    [{ method: 'smoothing-spline', lambda: 3 }, fitSmoothingSpline(obs, 3)],
    [{ method: 'natural-spline', knots }, fitNaturalSpline(obs, knots)],
    [{ method: 'b-spline', knots }, fitBSpline(obs, knots)],
    [{ method: 'polynomial', degree: 3 }, fitPolynomial(obs, 3)],
    [{ method: 'constant' }, fitConstant(obs)],
  ] as const)("%p is that of the method's own function, and says its specification", (spec: BaselineSpec, own) => {
    const fit = fitBaseline(obs, spec);
    expect(fit.spec).toEqual(spec);
    expect(fit.fitted).toEqual(own.fitted);
    expect(fit.standardError).toEqual(own.standardError);
    expect(fit.isProjectable).toBe(spec.method !== 'b-spline' && spec.method !== 'polynomial');
  });

  it('does not change when the knots it was given change', () => {
    const given = knots.slice();
    const fit = fitBaseline(obs, { method: 'b-spline', knots: given });
    given[0] = 5;
    expect(fit.spec).toEqual({ method: 'b-spline', knots });
  });
});
