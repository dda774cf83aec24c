import { BaselineError } from '../baseline-error';
import type { BaselinePoint, DeletedLot, LotScores, PiecewiseCubic, StepEstimates } from '../baseline-fit';
import type { PreparedSeries } from '../prepared-series';
import { LazilyFiltered, outOfRange, scaledInverse } from './filtered-series';
import { insertTime } from './inserted-time';
import { LotDeleter } from './lot-deletion';
import { scoreLots } from './lot-scores';
import { residualProduct } from './residual-product';
import { determinantConstant, logDeterminant } from './restricted-likelihood';
import type { SmoothingSplineFit } from './smoothing-spline';
import { smoothSeries } from './smooth-series';
import { stepEstimates } from './step-estimates';
import { timeCovariance } from './time-covariance';

/** A smoothing spline at one lambda: the arrays at once, everything else from the forward states when it is asked for. */
export class FittedSpline implements SmoothingSplineFit {
  readonly spec: { readonly method: 'smoothing-spline'; readonly lambda: number };
  readonly edf: number;
  readonly pullCount: number;
  readonly weightedRss: number;
  readonly penalty: number;
  readonly fitted: Float64Array;
  readonly slope: Float64Array;
  readonly curvature: Float64Array;
  readonly standardError: Float64Array;
  readonly leverage: Float64Array;
  readonly isProjectable = true;
  private readonly filtered: LazilyFiltered;
  private readonly logDet: number;

  constructor(
    private readonly series: PreparedSeries,
    readonly lambda: number,
  ) {
    const { n, timeScale, weightScale } = series;
    const q = scaledInverse(series, lambda);
    const smoothed = smoothSeries(series, q);
    if (smoothed === undefined) throw outOfRange(lambda);
    const { points } = smoothed;
    this.spec = { method: 'smoothing-spline', lambda };
    this.edf = smoothed.edf;
    this.pullCount = series.pullCount;
    this.weightedRss = smoothed.rss * weightScale;
    this.penalty = smoothed.penalty / timeScale ** 3;
    this.fitted = points.fitted;
    this.slope = points.slope;
    this.curvature = points.curvature;
    this.standardError = points.standardError;
    this.leverage = points.leverage;
    this.filtered = new LazilyFiltered(series, q);
    this.logDet = logDeterminant(series, smoothed.lastState, smoothed.logDelta);
    const sums = this.edf + this.weightedRss + this.penalty + this.logDet;
    const ends = points.slope[0] + points.slope[n - 1] + points.fitted[0] + points.fitted[n - 1];
    const errors = points.standardError[0] + points.standardError[n - 1];
    if (!Number.isFinite(sums + ends + errors)) throw outOfRange(lambda);
  }

  get restrictedDeviance(): number {
    const { series, logDet, lambda } = this;
    const prss = this.weightedRss + (this.penalty > 0 ? lambda * this.penalty : 0);
    const deviance = prss + logDet + determinantConstant(series);
    if (!Number.isFinite(deviance)) throw outOfRange(lambda);
    return deviance;
  }

  at(t: number): BaselinePoint {
    const { series, curvature } = this;
    const { n, obs, timeScale, weightScale, lineLevel, lineSlope, lineTime } = series;
    const { next, posterior } = insertTime(this.filtered, t);
    // g'' is linear between points and 0 beyond them.
    let bend = 0;
    if (next > 0 && next < n) {
      const share = (t - obs.t[next - 1]) / (obs.t[next] - obs.t[next - 1]);
      bend = curvature[next - 1] * (1 - share) + curvature[next] * share;
    }
    const value = lineLevel + lineSlope * (t - obs.t[0] - lineTime) + posterior.value;
    const slope = lineSlope + posterior.slope / timeScale;
    const standardError = Math.sqrt(posterior.variance / weightScale);
    if (!Number.isFinite(value + slope + standardError)) throw outOfRange(this.lambda);
    return { value, slope, curvature: bend, standardError };
  }

  covariance(a: number, b: number): number {
    const c = timeCovariance(this.filtered, this.filtered.gains, a, b);
    if (!Number.isFinite(c)) throw outOfRange(this.lambda);
    return c;
  }

  pieces(): PiecewiseCubic {
    const { t } = this.series.obs;
    const first: number[] = [0];
    for (let k = 1; k < t.length; k++) if (t[k] > t[k - 1]) first.push(k);
    const coefficients = new Float64Array(4 * (first.length - 1));
    for (let p = 0; p + 1 < first.length; p++) {
      const k = first[p];
      const next = first[p + 1];
      coefficients[4 * p] = this.fitted[k];
      coefficients[4 * p + 1] = this.slope[k];
      coefficients[4 * p + 2] = this.curvature[k] / 2;
      coefficients[4 * p + 3] = (this.curvature[next] - this.curvature[k]) / (6 * (t[next] - t[k]));
    }
    return { breaks: Float64Array.from(first, (k) => t[k]), coefficients };
  }

  smootherBlock(lot: number): Float64Array {
    this.checkLot(lot);
    return new LotDeleter(this.filtered).smootherBlock(lot);
  }

  deletedLots(lots?: Int32Array): DeletedLot[] {
    const { lotStart, pointsByLot, obs } = this.series;
    const wanted = lots ?? Int32Array.from({ length: obs.pulls.length }, (_, lot) => lot);
    const deleter = new LotDeleter(this.filtered);
    return Array.from(wanted, (lot) => {
      this.checkLot(lot);
      const m = lotStart[lot + 1] - lotStart[lot];
      const residual = new Float64Array(m);
      const covariance = new Float64Array(m * m);
      if (m > 0) deleter.delete(lot, residual, covariance);
      if (!(residual.every(Number.isFinite) && covariance.every(Number.isFinite)))
        throw new BaselineError('ill-posed', `Without lot ${lot} the fit leaves the range of double precision.`);
      return { lot, indices: pointsByLot.slice(lotStart[lot], lotStart[lot + 1]), residual, covariance };
    });
  }

  scoreLots(count?: Float64Array): LotScores {
    return scoreLots(this.filtered, this, count);
  }

  residualProduct(x: Float64Array): Float64Array {
    return residualProduct(this.filtered, x);
  }

  stepEstimates(): StepEstimates {
    return stepEstimates(this.filtered);
  }

  private checkLot(lot: number): void {
    if (!(lot >= 0 && lot < this.series.obs.pulls.length && Number.isInteger(lot)))
      throw new BaselineError('bad-argument', `There is no lot ${lot}.`);
  }
}
