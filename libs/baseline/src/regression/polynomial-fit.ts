import { BaselineError } from '../baseline-error';
import type { PreparedSeries } from '../prepared-series';
import { dot, solveTransposed } from './banded-least-squares';
import { PolynomialBasis } from './polynomial-basis';
import { RegressionFit } from './regression-fit';
import { requireDistinct, type PullingTimes } from './regression-system';

/** A polynomial in powers of (t - origin). */
export interface Powers {
  /** Coefficient of (t - origin)^k, unit * s^-k, from the constant up. */
  coefficients: Float64Array;
  /** Their standard errors at sigma^2 = 1. */
  standardErrors: Float64Array;
}

/** A polynomial (or constant) baseline, which can also be written in powers of time. */
export class PolynomialFit extends RegressionFit {
  private readonly polynomials: PolynomialBasis;

  constructor(
    spec: { method: 'polynomial'; degree: number } | { method: 'constant' },
    series: PreparedSeries,
    times: PullingTimes,
    isProjectable: boolean,
  ) {
    const degree = spec.method === 'constant' ? 0 : spec.degree;
    requireDistinct(times, degree + 1);
    const basis = new PolynomialBasis(degree, times.u, series.pull);
    super(spec, series, times, basis, isProjectable, degree > 0);
    this.polynomials = basis;
  }

  /**
   * The curve as sum_k c_k (t - origin)^k, by its derivatives at the origin. For an origin far from the points (such as 1970) these are huge numbers
   * of alternating sign that say little; the middle or the first of the times is a better one.
   * @param origin s
   * @throws BaselineError 'non-finite', 'ill-posed' (beyond the range of doubles)
   */
  powers(origin: number): Powers {
    if (!Number.isFinite(origin)) throw new BaselineError('non-finite', 'The origin is not finite.');
    const { system, beta, line } = this;
    const p = beta.length;
    const table = this.polynomials.powers((origin - system.origin) / system.range);
    const coefficients = new Float64Array(p);
    const standardErrors = new Float64Array(p);
    for (let k = 0; k < p; k++) {
      const z = table.slice(k * p, (k + 1) * p);
      const unit = system.range ** k;
      coefficients[k] = dot(z, beta) / unit;
      solveTransposed(system.fit.r, p, z, 0);
      standardErrors[k] = Math.sqrt(dot(z, z) / system.series.weightScale) / unit;
    }
    coefficients[0] += line.level + line.slope * (origin - line.start - line.time);
    if (p > 1) coefficients[1] += line.slope;
    if (![...coefficients, ...standardErrors].every(Number.isFinite)) {
      throw new BaselineError('ill-posed', `The powers at ${origin} leave the range of double precision.`);
    }
    return { coefficients, standardErrors };
  }
}
