import { BaselineError } from '../baseline-error';
import type {
  BaselineFit,
  BaselinePoint,
  BaselineSpec,
  DeletedLot,
  LotScores,
  PiecewiseCubic,
  StepEstimates,
} from '../baseline-fit';
import type { PreparedSeries } from '../prepared-series';
import { dot, solveTransposed, solveUpper } from './banded-least-squares';
import { BasisRow, type Basis } from './basis';
import { cubicPieces } from './cubic-pieces';
import { RegressionLots } from './regression-lots';
import { regressionSteps } from './regression-steps';
import { solveRegression, type PullingTimes, type RegressionSystem } from './regression-system';

/** How far the leverages' sum may be from the number of functions: R has lost ten digits there. */
const LEVERAGE_TOLERANCE = 1e-6;

/** The line that is taken off before a fit and added back to it. */
interface BaseLine {
  level: number;
  slope: number;
  /** s; level is the line's value at start + time, kept apart because epoch seconds leave few digits to a fraction. */
  start: number;
  time: number;
}

/**
 * Weighted regression on a basis as a baseline: g = line + sum_j beta_j b_j(u), C(a, b) = z(a)'z(b) with z(t) = R^-T b(t), S = C V W.
 *
 * The basis holds the straight lines (or, for the constant, the constants), so that taking the weighted line off first changes nothing but rounding.
 * Its ends stay where they are when a lot is left out. Points that do not pull and lie beyond the first or last pulling one are judged by
 * the cubics of the end spans going on (natural splines: by their straight ends), with the standard error that this has.
 */
export class RegressionFit implements BaselineFit {
  readonly edf: number;
  readonly pullCount: number;
  readonly weightedRss: number;
  readonly fitted: Float64Array;
  readonly slope: Float64Array;
  readonly curvature: Float64Array;
  readonly standardError: Float64Array;
  readonly leverage: Float64Array;
  protected readonly system: RegressionSystem;
  protected readonly beta: Float64Array;
  protected readonly line: BaseLine;
  private readonly residual: Float64Array;
  private readonly variance: Float64Array;
  private readonly row: BasisRow;

  /**
   * @param keepsLine whether the basis holds straight lines; otherwise constants only
   * @throws BaselineError 'insufficient-data', 'ill-posed'
   */
  constructor(
    readonly spec: BaselineSpec,
    series: PreparedSeries,
    times: PullingTimes,
    basis: Basis,
    readonly isProjectable: boolean,
    keepsLine = true,
  ) {
    const { n, obs, pull, weightScale, lineLevel, lineSlope, lineTime } = series;
    this.line = { level: lineLevel, slope: keepsLine ? lineSlope : 0, start: obs.t[0], time: lineTime };
    const y = keepsLine ? series.r : obs.y.map((v) => v - lineLevel);
    const system = solveRegression(series, times, basis, y);
    const { rows, first, fit } = system;
    const { width } = fit;
    const beta = fit.solve();
    this.system = system;
    this.beta = beta;
    this.edf = basis.dimension;
    this.pullCount = series.pullCount;
    this.row = new BasisRow(width);
    this.fitted = new Float64Array(n);
    this.slope = new Float64Array(n);
    this.curvature = new Float64Array(n);
    this.standardError = new Float64Array(n);
    this.leverage = new Float64Array(n);
    this.residual = new Float64Array(n);
    this.variance = new Float64Array(n);
    const point: BaselinePoint = { value: 0, slope: 0, curvature: 0, standardError: 0 };
    const z = new Float64Array(basis.dimension);
    let rss = 0;
    for (let i = 0; i < n; i++) {
      let g = 0;
      for (let d = 0; d < width; d++) g += rows[width * i + d] * beta[first[i] + d];
      const e = y[i] - g;
      rss += pull[i] * e * e;
      this.residual[i] = e;
      this.read(obs.t[i], times.u[i], z, point);
      this.fitted[i] = point.value;
      this.slope[i] = point.slope;
      this.curvature[i] = point.curvature;
      this.standardError[i] = point.standardError;
      const c = dot(z, z);
      this.variance[i] = c / weightScale;
      this.leverage[i] = pull[i] * c;
    }
    this.weightedRss = rss * weightScale;
    // The rows of X R^-1 are those of an orthonormal matrix, as far as R has digits.
    if (!(Math.abs(sum(this.leverage) - basis.dimension) < LEVERAGE_TOLERANCE)) {
      throw new BaselineError('ill-posed', 'The points that pull hardly determine the curve somewhere between them.');
    }
    const check = sum(this.fitted) + sum(this.slope) + sum(this.curvature) + sum(this.variance) + this.weightedRss;
    if (!Number.isFinite(check)) {
      throw new BaselineError('ill-posed', 'The fit leaves the range of double precision.');
    }
  }

  at(t: number): BaselinePoint {
    const point: BaselinePoint = { value: 0, slope: 0, curvature: 0, standardError: 0 };
    this.read(t, this.timeOnScale(t), new Float64Array(this.beta.length), point);
    if (!Number.isFinite(point.value + point.slope + point.curvature + point.standardError)) throw tooFar(t);
    return point;
  }

  covariance(a: number, b: number): number {
    const c = dot(this.direction(a), this.direction(b)) / this.system.series.weightScale;
    if (!Number.isFinite(c)) throw tooFar(Math.abs(a) > Math.abs(b) ? a : b);
    return c;
  }

  /** For polynomials of degree 4 and 5 in 1024 cubics that keep value and slope at each break and miss the curve by less than 1e-10 of its terms. */
  pieces(): PiecewiseCubic {
    const { obs, n } = this.system.series;
    const degree = this.spec.method === 'polynomial' ? this.spec.degree : 3;
    return cubicPieces(this, obs.t[0], obs.t[n - 1], this.innerBreaks(), degree);
  }

  smootherBlock(lot: number): Float64Array {
    const { system, beta } = this;
    const { pointsByLot, lotStart, pull } = system.series;
    this.checkLot(lot);
    const from = lotStart[lot];
    const m = lotStart[lot + 1] - from;
    const p = beta.length;
    const all = new Float64Array(m * p);
    const block = new Float64Array(m * m);
    for (let s = 0; s < m; s++) {
      const z = all.subarray(s * p, (s + 1) * p);
      this.pointDirection(pointsByLot[from + s], z);
      for (let q = 0; q <= s; q++) {
        const c = dot(z, all.subarray(q * p, (q + 1) * p));
        block[s * m + q] = c * pull[pointsByLot[from + q]];
        block[q * m + s] = c * pull[pointsByLot[from + s]];
      }
    }
    return block;
  }

  deletedLots(lots?: Int32Array): DeletedLot[] {
    const named = lots ?? Int32Array.from(this.system.series.obs.pulls, (_, lot) => lot);
    for (const lot of named) this.checkLot(lot);
    const others = this.lots();
    return Array.from(named, (lot) => others.delete(lot));
  }

  scoreLots(count?: Float64Array): LotScores {
    return this.lots().score(count);
  }

  /** S x is found by the seminormal equations and one correction (Björck 1987, Linear Algebra Appl. 88/89:31), as accurate as with Q kept. */
  residualProduct(x: Float64Array): Float64Array {
    const { series, fit, rows, first } = this.system;
    const { n, pull, weightScale } = series;
    const { width, r, dimension } = fit;
    if (x.length !== n) throw new BaselineError('bad-argument', `${x.length} numbers were given for ${n} points.`);
    if (!x.every(Number.isFinite)) throw new BaselineError('non-finite', 'A number is not finite.');
    const rest = x.slice();
    const change = new Float64Array(dimension);
    for (let pass = 0; pass < 2; pass++) {
      change.fill(0);
      for (let i = 0; i < n; i++) {
        const w = pull[i] * rest[i];
        if (w !== 0) for (let d = 0; d < width; d++) change[first[i] + d] += w * rows[width * i + d];
      }
      solveTransposed(r, width, change, 0);
      solveUpper(r, width, change);
      for (let i = 0; i < n; i++) {
        let g = 0;
        for (let d = 0; d < width; d++) g += rows[width * i + d] * change[first[i] + d];
        rest[i] -= g;
      }
    }
    for (let i = 0; i < n; i++) rest[i] *= pull[i] * weightScale;
    if (!Number.isFinite(sum(rest))) throw new BaselineError('ill-posed', 'The product leaves the range of doubles.');
    return rest;
  }

  stepEstimates(): StepEstimates {
    return regressionSteps(this.system, this.residual);
  }

  private lots(): RegressionLots {
    return new RegressionLots(this.system, this.residual, this.variance, this.leverage);
  }

  private checkLot(lot: number): void {
    const { lotStart } = this.system.series;
    if (!(lot >= 0 && lot < lotStart.length - 1)) throw new BaselineError('bad-argument', `There is no lot ${lot}.`);
  }

  private innerBreaks(): number[] {
    const { obs, n } = this.system.series;
    const { origin, end, basis } = this.system;
    const knots = 'knots' in this.spec ? [...this.spec.knots] : [];
    const ends = basis.breaks.length > knots.length ? [origin, ...knots, end] : knots;
    return ends.filter((t) => t > obs.t[0] && t < obs.t[n - 1]);
  }

  private timeOnScale(t: number): number {
    if (!Number.isFinite(t)) throw new BaselineError('non-finite', 'The time is not finite.');
    const { series, origin, range } = this.system;
    const { obs, n } = series;
    if (!this.isProjectable && !(t >= obs.t[0] && t <= obs.t[n - 1])) {
      throw new BaselineError(
        'no-projection',
        `A baseline by ${this.spec.method} is not read beyond its points; ${t} is outside ${obs.t[0]} to ${obs.t[n - 1]}.`,
      );
    }
    return (t - origin) / range;
  }

  /** z = R^-T b of the row that was evaluated last. */
  private solveRow(z: Float64Array): void {
    const { row } = this;
    const { r, width } = this.system.fit;
    z.fill(0);
    for (let d = 0; d < width; d++) z[row.first + d] = row.value[d];
    solveTransposed(r, width, z, row.first);
  }

  private direction(t: number): Float64Array {
    const z = new Float64Array(this.beta.length);
    this.system.basis.evaluate(this.timeOnScale(t), this.row);
    this.solveRow(z);
    return z;
  }

  private pointDirection(i: number, z: Float64Array): void {
    this.system.basis.evaluate(this.system.u[i], this.row);
    this.solveRow(z);
  }

  private read(t: number, u: number, z: Float64Array, point: BaselinePoint): void {
    const { row, beta, line } = this;
    const { basis, range, series } = this.system;
    basis.evaluate(u, row);
    let value = 0;
    let slope = 0;
    let curvature = 0;
    for (let d = 0; d < row.value.length; d++) {
      const b = beta[row.first + d];
      value += b * row.value[d];
      slope += b * row.slope[d];
      curvature += b * row.curvature[d];
    }
    this.solveRow(z);
    point.value = line.level + line.slope * (t - line.start - line.time) + value;
    point.slope = line.slope + slope / range;
    point.curvature = curvature / range / range;
    point.standardError = Math.sqrt(dot(z, z) / series.weightScale);
  }
}

function tooFar(t: number): BaselineError {
  return new BaselineError('ill-posed', `The baseline at ${t} leaves the range of double precision.`);
}

function sum(x: Float64Array): number {
  let total = 0;
  for (let i = 0; i < x.length; i++) total += x[i];
  return total;
}
