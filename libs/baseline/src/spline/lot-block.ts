import { combine, STATE_SIZE, type Posterior } from './information-state';
import type { FilteredSeries } from './filtered-series';
import type { GainProducts } from './gain-products';

/** Smallest pivot of I - S_II at which the block is used: with it, at most 4 of the 13 digits of the covariances are lost. */
const SMALLEST_PIVOT = 1e-4;

/**
 * A lot's points under the fit without the lot, from the fit with it: with C the posterior covariance of g at its points and W the pulling weights,
 * S_II = C W, e = (I - C W)^-1 (y - g) and Cov(g_I | others) = (I - C W)^-1 C = C + C W^1/2 H^-1 W^1/2 C, H = I - W^1/2 C W^1/2 = L L' by Cholesky.
 * The cost, m^3/6 + m log n, does not depend on how far the points lie apart.
 */
export class LotBlock {
  private readonly posterior: Posterior = { value: 0, slope: 0, variance: 0, covariance: 0, slopeVariance: 0 };
  private readonly gain = new Float64Array(4);
  private chain = new Float64Array(0);
  private factor = new Float64Array(0);
  private work = new Float64Array(0);
  private m = 0;
  private isPulling = false;
  /** C of the last lot, m x m row-major, scaled. */
  covariance = new Float64Array(0);
  /** y - g, after {@link delete} e = y - g without the lot. */
  residual = new Float64Array(0);
  private root = new Float64Array(0);

  constructor(private readonly filtered: FilteredSeries) {}

  /** Fills covariance and residual for the m points pointsByLot[from], ... from the full fit. */
  fill(from: number, m: number, gains: GainProducts): void {
    this.reserve(m);
    const { posterior: p, gain, chain, covariance, residual, root } = this;
    const { forward, backward } = this.filtered;
    const { pointsByLot, pull, r } = this.filtered.series;
    for (let s = 0; s + 1 < m; s++) {
      gains.product(pointsByLot[from + s], pointsByLot[from + s + 1], gain);
      for (let j = 0; j < 4; j++) chain[4 * s + j] = gain[j];
    }
    for (let s = m - 1; s >= 0; s--) {
      const i = pointsByLot[from + s];
      const w = pull[i];
      combine(forward, STATE_SIZE * i, backward, STATE_SIZE * i, w, w * r[i], p);
      residual[s] = r[i] - p.value;
      root[s] = Math.sqrt(w);
      let x = p.variance;
      let y = p.covariance;
      covariance[s * m + s] = x;
      for (let k = s - 1, g = 4 * k; k >= 0; k--, g -= 4) {
        const x0 = chain[g] * x + chain[g + 1] * y;
        y = chain[g + 2] * x + chain[g + 3] * y;
        x = x0;
        covariance[k * m + s] = x;
        covariance[s * m + k] = x;
      }
    }
    this.isPulling = root[0] > 0;
  }

  /** Turns residual into that of the fit without the lot. @returns false when the lot nearly determines its own fit */
  delete(): boolean {
    if (!this.isPulling) return true;
    if (!this.factorise()) return false;
    const { m, residual, root, factor, work } = this;
    for (let s = 0; s < m; s++) work[s] = root[s] * residual[s];
    this.solveLower(work, 0);
    for (let s = m - 1; s >= 0; s--) {
      let sum = work[s];
      for (let k = s + 1; k < m; k++) sum -= factor[k * m + s] * work[k];
      work[s] = sum / factor[s * m + s];
      residual[s] = work[s] / root[s];
    }
    return true;
  }

  /** a' Cov(g_I | others) a, scaled; after {@link delete}. @param a weights of the m points */
  quadratic(a: Float64Array): number {
    const { m, covariance, root, work } = this;
    let total = 0;
    for (let s = 0; s < m; s++) {
      let sum = 0;
      for (let k = 0; k < m; k++) sum += covariance[s * m + k] * a[k];
      total += a[s] * sum;
      work[s] = root[s] * sum;
    }
    if (!this.isPulling) return Math.max(0, total);
    this.solveLower(work, 0);
    for (let s = 0; s < m; s++) total += work[s] * work[s];
    return Math.max(0, total);
  }

  /** Writes Cov(g_I | others), m x m, scaled; after {@link delete}. */
  deletedCovariance(out: Float64Array): void {
    const { m, covariance, root } = this;
    for (let i = 0; i < m * m; i++) out[i] = covariance[i];
    if (!this.isPulling) return;
    // Row s of `half` becomes L^-1 W^1/2 times column s of C.
    const half = new Float64Array(m * m);
    for (let s = 0; s < m; s++) {
      for (let k = 0; k < m; k++) half[s * m + k] = root[k] * covariance[s * m + k];
      this.solveLower(half, s * m);
    }
    for (let s = 0; s < m; s++) {
      for (let k = 0; k <= s; k++) {
        let sum = 0;
        for (let j = 0; j < m; j++) sum += half[s * m + j] * half[k * m + j];
        out[s * m + k] += sum;
        if (k < s) out[k * m + s] += sum;
      }
    }
  }

  /** H = L L', L in the lower half of factor. */
  private factorise(): boolean {
    const { m, covariance, root, factor } = this;
    for (let s = 0; s < m; s++) {
      for (let k = 0; k <= s; k++) {
        let sum = (k === s ? 1 : 0) - root[s] * root[k] * covariance[s * m + k];
        for (let j = 0; j < k; j++) sum -= factor[s * m + j] * factor[k * m + j];
        if (k < s) factor[s * m + k] = sum / factor[k * m + k];
        else if (sum > SMALLEST_PIVOT) factor[s * m + s] = Math.sqrt(sum);
        else return false;
      }
    }
    return true;
  }

  /** x[at..at+m-1] := L^-1 of it. */
  private solveLower(x: Float64Array, at: number): void {
    const { m, factor } = this;
    for (let s = 0; s < m; s++) {
      let sum = x[at + s];
      for (let k = 0; k < s; k++) sum -= factor[s * m + k] * x[at + k];
      x[at + s] = sum / factor[s * m + s];
    }
  }

  private reserve(m: number): void {
    this.m = m;
    if (this.residual.length >= m) return;
    const room = Math.max(m, 16);
    this.chain = new Float64Array(4 * room);
    this.factor = new Float64Array(room * room);
    this.covariance = new Float64Array(room * room);
    this.work = new Float64Array(room);
    this.residual = new Float64Array(room);
    this.root = new Float64Array(room);
  }
}
