import { BaselineError } from '../baseline-error';
import type { Posterior } from './information-state';
import type { FilteredSeries } from './filtered-series';
import { GainProducts } from './gain-products';
import { LotBlock } from './lot-block';
import { LotWalk } from './lot-walk';

/** A lot whose span is at most this many times its points is walked over; see {@link isWalkCheaper}. */
const WALK_SHARE = 4;
/** Points that are walked over in the time of so many steps of a Cholesky factorisation (m^3/6). */
const STEPS_PER_POINT = 50;

export function nothingLeft(lot: number): BaselineError {
  return new BaselineError('insufficient-data', `Without lot ${lot} the other lots do not determine a line.`);
}

/**
 * Takes single lots out of a filtered series: by walking over the lot's span (LotWalk) where that is short, by the block of S (LotBlock) where the lot is
 * spread out among others; where the block says that the lot nearly determines its own fit, by walking all the same.
 */
export class LotDeleter {
  /** Of the last lot that was scored: deleted residual of each point (at least m numbers), their mean and its variance by the given weights. */
  residual = new Float64Array(16);
  mean = 0;
  variance = 0;
  private share = new Float64Array(16);
  private readonly posterior: Posterior = { value: 0, slope: 0, variance: 0, covariance: 0, slopeVariance: 0 };
  private readonly pair = new Float64Array(2);
  private readonly walk: LotWalk;
  private readonly block: LotBlock;
  private ownGains?: GainProducts;
  private gainsOf = NaN;

  constructor(private readonly filtered: FilteredSeries) {
    this.walk = new LotWalk(filtered);
    this.block = new LotBlock(filtered);
  }

  /**
   * Residuals of a lot's points, their weighted mean r = a' e and Var r = a' Cov a, in O(m) beyond the lot's span.
   * @param count weight of each point of the series in its lot's mean; none: all alike @returns false when the other lots do not determine a line
   */
  score(lot: number, count?: Float64Array): boolean {
    const { pointsByLot, lotStart, weightScale, obs } = this.filtered.series;
    const from = lotStart[lot];
    const m = lotStart[lot + 1] - from;
    this.reserve(m);
    const { share } = this;
    let total = 0;
    for (let s = 0; s < m; s++) total += share[s] = count === undefined ? 1 : count[pointsByLot[from + s]];
    let own = 0;
    for (let s = 0; s < m; s++) {
      share[s] /= total;
      own += (share[s] * share[s]) / obs.weight[pointsByLot[from + s]];
    }
    const scaled = this.deleteByBlock(from, m) ? this.block.quadratic(share) : this.scoreByWalk(from, m);
    if (scaled < 0) return false;
    let mean = 0;
    for (let s = 0; s < m; s++) mean += share[s] * this.residual[s];
    this.mean = mean;
    this.variance = own + scaled / weightScale;
    return true;
  }

  /**
   * Writes the residuals (m) and the covariance (m x m) of a lot.
   * @throws BaselineError 'insufficient-data' when fewer than two distinct times are left.
   */
  delete(lot: number, residual: Float64Array, covariance: Float64Array): void {
    const { series } = this.filtered;
    const { pointsByLot, lotStart, weightScale } = series;
    const from = lotStart[lot];
    const m = lotStart[lot + 1] - from;
    this.reserve(m);
    if (this.deleteByBlock(from, m)) this.block.deletedCovariance(covariance);
    else if (!this.covarianceByWalk(from, m, covariance)) throw nothingLeft(lot);
    for (let s = 0; s < m; s++) residual[s] = this.residual[s];
    for (let i = 0; i < m * m; i++) covariance[i] /= weightScale;
    for (let s = 0; s < m; s++) covariance[s * m + s] += 1 / series.obs.weight[pointsByLot[from + s]];
  }

  /**
   * Mean of a pulling lot's deleted residuals, weighted as in the fit.
   * @throws BaselineError 'insufficient-data' when fewer than two distinct times are left.
   */
  meanResidual(lot: number): number {
    const { pointsByLot, lotStart, pull } = this.filtered.series;
    const from = lotStart[lot];
    const m = lotStart[lot + 1] - from;
    this.reserve(m);
    if (!this.deleteByBlock(from, m) && !this.residualByWalk(from, m)) throw nothingLeft(lot);
    let sum = 0;
    let weight = 0;
    for (let s = 0; s < m; s++) {
      const w = pull[pointsByLot[from + s]];
      sum += w * this.residual[s];
      weight += w;
    }
    return sum / weight;
  }

  /** S_II = C_II W, m x m row-major, unit-free. */
  smootherBlock(lot: number): Float64Array {
    const { pointsByLot, lotStart, pull } = this.filtered.series;
    const from = lotStart[lot];
    const m = lotStart[lot + 1] - from;
    const out = new Float64Array(m * m);
    if (m === 0 || pull[pointsByLot[from]] === 0) return out;
    this.block.fill(from, m, this.gains());
    for (let p = 0; p < m; p++)
      for (let s = 0; s < m; s++) out[p * m + s] = this.block.covariance[p * m + s] * pull[pointsByLot[from + s]];
    return out;
  }

  /** Fills residual, when the block is the cheaper way and has its digits. */
  private deleteByBlock(from: number, m: number): boolean {
    const { pointsByLot } = this.filtered.series;
    if (m < 2 || isWalkCheaper(pointsByLot[from + m - 1] - pointsByLot[from] + 1, m)) return false;
    this.block.fill(from, m, this.gains());
    if (!this.block.delete()) return false;
    for (let s = 0; s < m; s++) this.residual[s] = this.block.residual[s];
    return true;
  }

  /** Fills residual and gives a' Cov(g | others) a by carrying u = sum over later points j of a_j Cov(x_s, g_j) backwards; -1 when there is none. */
  private scoreByWalk(from: number, m: number): number {
    const { walk, posterior: p, pair, share, residual } = this;
    const { pointsByLot, r } = this.filtered.series;
    walk.walk(from, m);
    let total = 0;
    pair[0] = 0;
    pair[1] = 0;
    for (let s = m - 1; s >= 0; s--) {
      if (s + 1 < m) walk.stepBack(s, pair);
      if (!walk.posterior(s, p)) return -1;
      const a = share[s];
      residual[s] = r[pointsByLot[from + s]] - p.value;
      total += a * (a * p.variance + 2 * pair[0]);
      pair[0] += a * p.variance;
      pair[1] += a * p.covariance;
    }
    return Math.max(0, total);
  }

  private covarianceByWalk(from: number, m: number, covariance: Float64Array): boolean {
    const { walk, posterior: p, pair } = this;
    if (!this.residualByWalk(from, m)) return false;
    for (let s = m - 1; s >= 0; s--) {
      walk.posterior(s, p);
      covariance[s * m + s] = p.variance;
      pair[0] = p.variance;
      pair[1] = p.covariance;
      for (let k = s - 1; k >= 0; k--) {
        walk.stepBack(k, pair);
        covariance[k * m + s] = pair[0];
        covariance[s * m + k] = pair[0];
      }
    }
    return true;
  }

  private residualByWalk(from: number, m: number): boolean {
    const { walk, posterior: p, residual } = this;
    const { pointsByLot, r } = this.filtered.series;
    walk.walk(from, m);
    for (let s = 0; s < m; s++) {
      if (!walk.posterior(s, p)) return false;
      residual[s] = r[pointsByLot[from + s]] - p.value;
    }
    return true;
  }

  private gains(): GainProducts {
    const { series, q, forward, gains } = this.filtered;
    if (gains !== undefined) return gains;
    this.ownGains ??= new GainProducts(series.n);
    if (this.gainsOf !== q) this.ownGains.fill(series, q, forward);
    this.gainsOf = q;
    return this.ownGains;
  }

  private reserve(m: number): void {
    if (this.residual.length >= m) return;
    this.residual = new Float64Array(m);
    this.share = new Float64Array(m);
  }
}

/** Both ways are exact; this compares their costs. */
function isWalkCheaper(span: number, m: number): boolean {
  return span <= WALK_SHARE * m + (m * m * m) / (6 * STEPS_PER_POINT);
}
