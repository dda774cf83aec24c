import { BaselineError } from '../baseline-error';
import { advance, backwardGain, combine, STATE_SIZE, type Posterior } from './information-filter';
import type { PreparedSeries } from '../prepared-series';

/** A lot against the baseline fitted without it, at the same lambda. */
export interface DeletedLot {
  lot: number;
  /** Its points, in time order. */
  indices: Int32Array;
  /** Value minus the baseline without the lot, at each of its points. */
  residual: Float64Array;
  /** m x m, row-major: W_I^-1 + Cov(g_I | all other pulling lots). */
  covariance: Float64Array;
}

/** States before each point from both sides, and 1/lambda, in scaled units. */
export interface FilteredSeries {
  series: PreparedSeries;
  q: number;
  forward: Float64Array;
  backward: Float64Array;
}

const blank = (): Posterior => ({ value: 0, slope: 0, variance: 0, covariance: 0, slopeVariance: 0 });

function nothingLeft(lot: number): BaselineError {
  return new BaselineError('insufficient-data', `Without lot ${lot} the other lots do not determine a line.`);
}

/**
 * Takes single lots out of a filtered series. The information from before the lot's first point and from after its last is carried towards each other over
 * the lot's span, leaving its own points out and taking in those of other lots in between. So it is exact, costs the lot's span,
 * and stays safe when the lot determines its own fit (where (I - S_II)^-1 (y - g) has no digits left).
 */
export class LotDeleter {
  private readonly posterior = blank();
  private readonly state = new Float64Array(STATE_SIZE);
  private readonly gain = new Float64Array(4);
  private ahead = new Float64Array(0);
  private behind = new Float64Array(0);
  private gains = new Float64Array(0);

  constructor(private readonly filtered: FilteredSeries) {}

  /**
   * Writes the residuals (m) and the covariance (m x m) of a lot.
   * @throws BaselineError 'insufficient-data' when fewer than two distinct times are left.
   */
  delete(lot: number, residual: Float64Array, covariance: Float64Array): void {
    const { series, forward, backward } = this.filtered;
    const { pointsByLot, lotStart, weightScale } = series;
    const from = lotStart[lot];
    const m = lotStart[lot + 1] - from;
    if (m === 1) {
      const i = pointsByLot[from];
      if (!combine(forward, STATE_SIZE * i, backward, STATE_SIZE * i, 0, 0, this.posterior)) throw nothingLeft(lot);
      residual[0] = series.r[i] - this.posterior.value;
      covariance[0] = 1 / series.obs.weight[i] + this.posterior.variance / weightScale;
      return;
    }
    if (m === 0) return;
    this.walk(from, m);
    const p = this.posterior;
    for (let s = m - 1; s >= 0; s--) {
      const i = pointsByLot[from + s];
      if (!combine(this.ahead, STATE_SIZE * s, this.behind, STATE_SIZE * s, 0, 0, p)) throw nothingLeft(lot);
      residual[s] = series.r[i] - p.value;
      covariance[s * m + s] = 1 / series.obs.weight[i] + p.variance / weightScale;
      this.fillColumn(s, m, p, covariance);
    }
  }

  /**
   * Weighted mean of a pulling lot's deleted residuals.
   * @throws BaselineError 'insufficient-data' when fewer than two distinct times are left.
   */
  meanResidual(lot: number): number {
    const { series, forward, backward } = this.filtered;
    const { pointsByLot, lotStart } = series;
    const from = lotStart[lot];
    const m = lotStart[lot + 1] - from;
    const p = this.posterior;
    if (m === 1) {
      const i = pointsByLot[from];
      if (!combine(forward, STATE_SIZE * i, backward, STATE_SIZE * i, 0, 0, p)) throw nothingLeft(lot);
      return series.r[i] - p.value;
    }
    this.walk(from, m);
    let sum = 0;
    let weight = 0;
    for (let s = 0; s < m; s++) {
      const i = pointsByLot[from + s];
      if (!combine(this.ahead, STATE_SIZE * s, this.behind, STATE_SIZE * s, 0, 0, p)) throw nothingLeft(lot);
      sum += series.pull[i] * (series.r[i] - p.value);
      weight += series.pull[i];
    }
    return sum / weight;
  }

  /** Cov(g_p, g_s) = e0' G_p ... G_(s-1) P_s e0 for the earlier points p of the lot. */
  private fillColumn(s: number, m: number, posterior: Posterior, covariance: Float64Array): void {
    const { gains } = this;
    let x = posterior.variance / this.filtered.series.weightScale;
    let y = posterior.covariance / this.filtered.series.weightScale;
    for (let p = s - 1; p >= 0; p--) {
      const g = 4 * p;
      const x0 = gains[g] * x + gains[g + 1] * y;
      y = gains[g + 2] * x + gains[g + 3] * y;
      x = x0;
      covariance[p * m + s] = x;
      covariance[s * m + p] = x;
    }
  }

  /** Fills ahead, behind (states at the lot's points without the lot) and gains (from each point of the lot to its next). */
  private walk(from: number, m: number): void {
    const { series, q, forward, backward } = this.filtered;
    const { pointsByLot, gap, pull, r } = series;
    this.reserve(m);
    const { state, ahead, behind, gains, gain } = this;
    const first = pointsByLot[from];
    const last = pointsByLot[from + m - 1];
    copyState(forward, first, state);
    for (let k = first, s = 0; k <= last; k++) {
      const isOwn = k === pointsByLot[from + s];
      if (isOwn) {
        ahead.set(state, STATE_SIZE * s);
        gains[4 * s] = 1;
        gains[4 * s + 1] = 0;
        gains[4 * s + 2] = 0;
        gains[4 * s + 3] = 1;
        s++;
      }
      if (k === last) break;
      const w = isOwn ? 0 : pull[k];
      backwardGain(state, 0, w, gap[k], q, gain);
      multiplyInto(gains, 4 * (s - 1), gain);
      advance(state, 0, state, 0, w, w * r[k], gap[k], q);
    }
    copyState(backward, last, state);
    for (let k = last, s = m - 1; k >= first; k--) {
      const isOwn = k === pointsByLot[from + s];
      if (isOwn) behind.set(state, STATE_SIZE * s--);
      if (k === first) break;
      const w = isOwn ? 0 : pull[k];
      advance(state, 0, state, 0, w, w * r[k], gap[k - 1], q);
    }
  }

  private reserve(m: number): void {
    if (this.ahead.length >= STATE_SIZE * m) return;
    this.ahead = new Float64Array(STATE_SIZE * m);
    this.behind = new Float64Array(STATE_SIZE * m);
    this.gains = new Float64Array(4 * m);
  }
}

function copyState(from: Float64Array, k: number, to: Float64Array): void {
  for (let i = 0; i < STATE_SIZE; i++) to[i] = from[STATE_SIZE * k + i];
}

/** left[i..i+3] := left * right, 2 x 2. */
function multiplyInto(left: Float64Array, i: number, right: Float64Array): void {
  const a = left[i];
  const b = left[i + 1];
  const c = left[i + 2];
  const d = left[i + 3];
  left[i] = a * right[0] + b * right[2];
  left[i + 1] = a * right[1] + b * right[3];
  left[i + 2] = c * right[0] + d * right[2];
  left[i + 3] = c * right[1] + d * right[3];
}
