import { reference } from '../testing/reference';
import { observations } from '../testing/series';
import { BandedLeastSquares, solveTransposed } from './banded-least-squares';
import { fitPolynomial } from './fit-regression';

interface Certified {
  coefficients: number[];
  standardErrors: number[];
  rss?: number;
  residualStandardDeviation?: number;
}
interface Set extends Certified {
  x: number[];
  y: number[];
}
const { sets } = reference<{
  sets: Record<string, Set> & { Longley: Certified & { y: number[]; predictors: number[][] } };
}>('strd.json');

/** Digits to which a value agrees: -log10 of the relative error, of the absolute one where 0 is certified. */
function digits(value: number, certified: number): number {
  const error = Math.abs(value - certified) / (certified === 0 ? 1 : Math.abs(certified));
  return Math.min(16, -Math.log10(error));
}
const worstDigits = (values: ArrayLike<number>, certified: number[]) =>
  Math.min(...certified.map((c, i) => digits(values[i], c)));

// NIST StRD, linear least squares; how the values were read stands in the file.
describe("NIST's certified values", () => {
  // Digits of the coefficients, of their standard errors, of the residual standard deviation (or sum of squares). In Wampler1 and Wampler3 a
  // coefficient of 1 stands beside values of 3e6, whose rounding (4e-10) is what is left.
  it.each([
    ['Norris', 1, 12, 13, 13],
    ['Pontius', 2, 12, 13, 13],
    ['Wampler1', 5, 9, 9, 9],
    ['Wampler2', 5, 13, 13, 13],
    ['Wampler3', 5, 9, 13, 13],
  ])('%s, degree %p', (name, degree, forCoefficients, forErrors, forResidual) => {
    const { x, y, coefficients, standardErrors, rss, residualStandardDeviation } = sets[name];
    const order = [...x.keys()].sort((a, b) => x[a] - x[b]);
    const fit = fitPolynomial(
      observations(
        order.map((i) => x[i]),
        order.map((i) => y[i]),
      ),
      degree,
    );
    const powers = fit.powers(0);
    const sigma = Math.sqrt(fit.weightedRss / (x.length - degree - 1));
    expect(worstDigits(powers.coefficients, coefficients)).toBeGreaterThan(forCoefficients);
    expect(
      worstDigits(
        powers.standardErrors.map((s) => s * sigma),
        standardErrors,
      ),
    ).toBeGreaterThan(forErrors);
    if (rss !== undefined) expect(digits(fit.weightedRss, rss)).toBeGreaterThan(forResidual);
    if (residualStandardDeviation !== undefined)
      expect(digits(sigma, residualStandardDeviation)).toBeGreaterThan(forResidual);
  });

  it('Longley, by the rotations alone, on centred and scaled columns as fits have time', () => {
    const { y, predictors, coefficients, standardErrors, rss } = sets.Longley;
    const n = y.length;
    const p = coefficients.length;
    const mean = (values: number[]) => values.reduce((a, b) => a + b) / n;
    const columns = predictors[0].map((_, j) => predictors.map((row) => row[j]));
    const centre = columns.map(mean);
    const spread = columns.map((column) => Math.max(...column) - Math.min(...column));
    const level = mean(y);
    const system = new BandedLeastSquares(p, p);
    predictors.forEach((row, i) => {
      const scaled = Float64Array.of(1, ...row.map((v, j) => (v - centre[j]) / spread[j]));
      system.add(0, scaled, 0, 1, y[i] - level);
    });
    const beta = system.solve();
    // Row k of the linear map from the scaled to the raw coefficients.
    const rows = [
      [1, ...centre.map((c, j) => -c / spread[j])],
      ...spread.map((s, j) => Array.from({ length: p }, (_, k) => (k === j + 1 ? 1 / s : 0))),
    ];
    const raw = rows.map((row, k) => row.reduce((sum, v, j) => sum + v * beta[j], k === 0 ? level : 0));
    const sigma = Math.sqrt(system.rss / (n - p));
    const errors = rows.map((row) => {
      const z = Float64Array.from(row);
      solveTransposed(system.r, p, z, 0);
      return sigma * Math.hypot(...z);
    });
    expect(worstDigits(raw, coefficients)).toBeGreaterThan(12);
    expect(worstDigits(errors, standardErrors)).toBeGreaterThan(13);
    expect(digits(system.rss, rss!)).toBeGreaterThan(13);
  });
});
