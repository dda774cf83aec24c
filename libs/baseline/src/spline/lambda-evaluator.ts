import type { PreparedSeries } from '../prepared-series';
import { scaledInverse, outOfRange, type FilteredSeries } from './filtered-series';
import { filterBackward, filterRange } from './filter-passes';
import { combine, STATE_SIZE, type Posterior } from './information-state';
import { LotDeleter, nothingLeft } from './lot-deletion';
import { determinantConstant, logDeterminant, penalisedRss, restrictedDeviance } from './restricted-likelihood';

/**
 * What the rules for choosing lambda look at, for one series and many lambda, in buffers that are made once: exact, O(n) a call. The fields speak of the
 * last call of {@link evaluate} (all but the deviances' use of it: {@link evaluateLikelihood}).
 * @example
 * const evaluator = new LambdaEvaluator(prepareSeries(obs));
 * evaluator.evaluate(lambda);
 * const gcv = (n * evaluator.rss) / (n - evaluator.edf) ** 2;
 */
export class LambdaEvaluator implements FilteredSeries {
  /** tr S. */
  edf = 0;
  /** Sum of weight * factor * (y - g)^2, raw. */
  rss = 0;
  /** PRSS = RSS + lambda * integral g''^2, raw. */
  prss = 0;
  /** log|A| - (m - 2) log alpha (see logDeterminant). */
  logDet = 0;
  /** -2 log restricted likelihood with sigma^2 = 1: PRSS + logDet; and with sigma^2 profiled out: (N - 2) log(PRSS/(N - 2)) + logDet. */
  known = 0;
  estimated = 0;

  q = 0;
  readonly forward: Float64Array;
  private readonly state = new Float64Array(STATE_SIZE);
  private lambda = NaN;
  private readonly later: Float64Array;
  private isLaterStored = false;
  private readonly constant: number;
  private readonly deleter: LotDeleter;
  private readonly posterior: Posterior = { value: 0, slope: 0, variance: 0, covariance: 0, slopeVariance: 0 };

  constructor(readonly series: PreparedSeries) {
    this.forward = new Float64Array(STATE_SIZE * series.n);
    this.later = new Float64Array(STATE_SIZE * series.n);
    this.constant = determinantConstant(series);
    this.deleter = new LotDeleter(this);
  }

  /** States before each point from the later points, of the last lambda. */
  get backward(): Float64Array {
    if (!this.isLaterStored) {
      const { gap, pull, r } = this.series;
      filterBackward(gap, pull, r, this.q, this.later);
      this.isLaterStored = true;
    }
    return this.later;
  }

  /**
   * All fields at a lambda.
   * @param lambda weight * s^3, > 0; Infinity is the straight line
   * @throws BaselineError 'bad-argument', 'non-finite', 'ill-posed'
   */
  evaluate(lambda: number): void {
    this.evaluateLikelihood(lambda);
    const { forward, backward } = this;
    const { n, pull, r, weightScale } = this.series;
    let edf = 0;
    let rss = 0;
    for (let k = 0, i = 0; k < n; k++, i += STATE_SIZE) {
      const w = pull[k];
      if (w === 0) continue;
      const a = forward[i] + w;
      const c = forward[i + 2];
      const ab = backward[i];
      const cb = backward[i + 2];
      const both = c + cb;
      const b = forward[i + 1];
      const bb = backward[i + 1];
      const det = forward[i + 3] + w * c + backward[i + 3] + a * cb + ab * c + 2 * b * bb;
      const s = 1 / det;
      const h0 = forward[i + 4] + w * r[k] + backward[i + 4];
      const h1 = forward[i + 5] - backward[i + 5];
      const e = r[k] - (both * h0 + (b - bb) * h1) * s;
      edf += w * both * s;
      rss += w * e * e;
    }
    this.edf = edf;
    this.rss = rss * weightScale;
    if (!Number.isFinite(this.edf + this.rss)) throw outOfRange(lambda);
  }

  /** prss, logDet, known and estimated only, by the forward pass alone; edf and rss keep what they were. */
  evaluateLikelihood(lambda: number): void {
    const { series, forward } = this;
    this.q = scaledInverse(series, lambda);
    this.lambda = lambda;
    this.isLaterStored = false;
    this.state.fill(0);
    const logDelta = filterRange(series.gap, series.pull, series.r, this.q, 0, series.n, this.state, forward);
    this.prss = penalisedRss(series, forward) * series.weightScale;
    this.logDet = logDeterminant(series, this.state, logDelta) + this.constant;
    if (!Number.isFinite(this.prss + this.logDet)) throw outOfRange(lambda);
    const { known, estimated } = restrictedDeviance(series.pullCount, this.prss, this.logDet);
    this.known = known;
    this.estimated = estimated;
  }

  /**
   * Mean of a pulling lot's residuals from the fit without it, weighted as in the fit, at the last lambda.
   * @throws BaselineError 'insufficient-data' when the other lots do not determine a line
   */
  meanResidual(lot: number): number {
    const { series, posterior: p } = this;
    const from = series.lotStart[lot];
    if (series.lotStart[lot + 1] - from !== 1) return this.deleter.meanResidual(lot);
    const i = series.pointsByLot[from];
    if (!combine(this.forward, STATE_SIZE * i, this.backward, STATE_SIZE * i, 0, 0, p)) throw nothingLeft(lot);
    return series.r[i] - p.value;
  }

  /**
   * Leave-one-lot-out criterion at the last lambda: sum over pulling lots of W_j m_j^2, m_j the lot's {@link meanResidual}, W_j its sum of weights (raw, with
   * factors).
   * @throws BaselineError 'insufficient-data' when a lot holds all but one of the distinct times, 'ill-posed'
   */
  lotCv(): number {
    const { pull, pointsByLot, lotStart, weightScale } = this.series;
    let total = 0;
    for (let lot = 0; lot + 1 < lotStart.length; lot++) {
      const from = lotStart[lot];
      const to = lotStart[lot + 1];
      if (from === to || pull[pointsByLot[from]] === 0) continue;
      let weight = 0;
      for (let s = from; s < to; s++) weight += pull[pointsByLot[s]];
      const mean = this.meanResidual(lot);
      total += weight * mean * mean;
    }
    if (!Number.isFinite(total)) throw outOfRange(this.lambda);
    return total * weightScale;
  }
}
