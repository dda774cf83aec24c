import type { PreparedSeries } from '../prepared-series';
import { addBackward } from './backward-sums';
import { outOfRange, scaledInverse, type FilteredSeries } from './filtered-series';
import { filterBackward, filterForward, filterRange } from './filter-passes';
import { combine, STATE_SIZE, type Posterior } from './information-state';
import { LotDeleter, nothingLeft } from './lot-deletion';
import { pointsHeld } from './smooth-series';
import { determinantConstant, logDeterminant, restrictedDeviance } from './restricted-likelihood';

/**
 * What the rules for choosing lambda look at, for one series and many lambda, in buffers that are made once: exact, O(n) a call. The fields speak of the last call of
 * {@link evaluate}. The information is that of the fit, combined at each point without writing the fit; only the leaving out of lots needs the states of all
 * points, and makes room for them when it is first asked for.
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

  q = 0;
  private lambda = NaN;
  private readonly block: number;
  private readonly states: Float64Array;
  private readonly starts: Float64Array;
  private readonly state = new Float64Array(STATE_SIZE);
  private readonly later = new Float64Array(STATE_SIZE);
  /** edf, RSS and PRSS in scaled weights. */
  private readonly sums = new Float64Array(3);
  private logInformation = 0;
  private constant: number | undefined;
  private forwardStates: Float64Array | undefined;
  private backwardStates: Float64Array | undefined;
  private isForwardStored = false;
  private isBackwardStored = false;
  private readonly deleter: LotDeleter;
  private readonly posterior: Posterior = { value: 0, slope: 0, variance: 0, covariance: 0, slopeVariance: 0 };

  constructor(readonly series: PreparedSeries) {
    const { n } = series;
    this.block = pointsHeld(n);
    this.states = new Float64Array(STATE_SIZE * this.block);
    this.starts = new Float64Array(STATE_SIZE * Math.ceil(n / this.block));
    this.deleter = new LotDeleter(this);
  }

  /**
   * All fields at a lambda.
   * @param lambda weight * s^3, > 0; Infinity is the straight line
   * @throws BaselineError 'bad-argument', 'non-finite', 'ill-posed'
   */
  evaluate(lambda: number): void {
    const { series, block, states, starts, state, later, sums } = this;
    const { n, gap, pull, r, weightScale } = series;
    const q = scaledInverse(series, lambda);
    this.q = q;
    this.lambda = lambda;
    this.isForwardStored = false;
    this.isBackwardStored = false;
    const blocks = starts.length / STATE_SIZE;
    state.fill(0);
    let logDelta = 0;
    for (let k = 0; k < blocks; k++) {
      starts.set(state, STATE_SIZE * k);
      logDelta += filterRange(gap, pull, r, q, k * block, Math.min(n, (k + 1) * block), state, states);
    }
    this.logInformation = logDeterminant(series, state, logDelta);
    later.fill(0);
    sums.fill(0);
    for (let k = blocks - 1; k >= 0; k--) {
      const from = k * block;
      const to = Math.min(n, from + block);
      if (k < blocks - 1) {
        for (let j = 0; j < STATE_SIZE; j++) state[j] = starts[STATE_SIZE * k + j];
        filterRange(gap, pull, r, q, from, to, state, states);
      }
      addBackward(series, q, from, to, states, later, sums);
    }
    this.edf = sums[0];
    this.rss = sums[1] * weightScale;
    this.prss = sums[2] * weightScale;
    if (!Number.isFinite(this.edf + this.rss + this.prss + this.logInformation)) throw outOfRange(lambda);
  }

  /** log|A| - (m - 2) log alpha (see logDeterminant). */
  get logDet(): number {
    this.constant ??= determinantConstant(this.series);
    return this.logInformation + this.constant;
  }

  /** -2 log restricted likelihood with sigma^2 = 1: PRSS + logDet. */
  get known(): number {
    return restrictedDeviance(this.series.pullCount, this.prss, this.logDet).known;
  }

  /** The same with sigma^2 profiled out: (N - 2) log(PRSS/(N - 2)) + logDet. */
  get estimated(): number {
    return restrictedDeviance(this.series.pullCount, this.prss, this.logDet).estimated;
  }

  /** States before each point from the earlier points, of the last lambda. */
  get forward(): Float64Array {
    const { series, block, states } = this;
    if (block === series.n) return states;
    this.forwardStates ??= new Float64Array(STATE_SIZE * series.n);
    if (!this.isForwardStored) filterForward(series.gap, series.pull, series.r, this.q, this.forwardStates);
    this.isForwardStored = true;
    return this.forwardStates;
  }

  /** States before each point from the later points, of the last lambda. */
  get backward(): Float64Array {
    const { series } = this;
    this.backwardStates ??= new Float64Array(STATE_SIZE * series.n);
    if (!this.isBackwardStored) filterBackward(series.gap, series.pull, series.r, this.q, this.backwardStates);
    this.isBackwardStored = true;
    return this.backwardStates;
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
   * Terms of the leave-one-lot-out criterion at the last lambda: W_j m_j^2 of each pulling lot, m_j its {@link meanResidual}, W_j its sum of weights (raw, with factors).
   * @param terms receives them, in the order of the lots
   * @returns J, their number
   * @throws BaselineError 'insufficient-data' when a lot holds all but one of the distinct times, 'ill-posed'
   */
  lotTerms(terms: Float64Array): number {
    const { pull, pointsByLot, lotStart, weightScale } = this.series;
    let count = 0;
    for (let lot = 0; lot + 1 < lotStart.length; lot++) {
      const from = lotStart[lot];
      const to = lotStart[lot + 1];
      if (from === to || pull[pointsByLot[from]] === 0) continue;
      let weight = 0;
      for (let s = from; s < to; s++) weight += pull[pointsByLot[s]];
      const mean = this.meanResidual(lot);
      const term = weight * weightScale * mean * mean;
      if (!Number.isFinite(term)) throw outOfRange(this.lambda);
      terms[count++] = term;
    }
    return count;
  }
}
