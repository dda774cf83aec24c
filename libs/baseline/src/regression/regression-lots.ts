import { BaselineError } from '../baseline-error';
import type { DeletedLot, LotScores } from '../baseline-fit';
import { dot, solveTransposed } from './banded-least-squares';
import { LotRemover } from './lot-remover';
import type { RegressionSystem } from './regression-system';

/** Leverages below this are divided by as 1 - h, losing at most a bit; the others go through the coefficients. */
const SAFE_LEVERAGE = 0.5;

/** The regression against each of its lots: what it says of them without them. */
export class RegressionLots {
  private readonly remover: LotRemover;
  private readonly z: Float64Array;

  /**
   * @param residual value minus baseline at each point
   * @param variance of the baseline at each point (sigma^2 = 1, raw weights)
   */
  constructor(
    private readonly system: RegressionSystem,
    private readonly residual: Float64Array,
    private readonly variance: Float64Array,
    private readonly leverage: Float64Array,
  ) {
    this.remover = new LotRemover(system, residual, leverage);
    this.z = new Float64Array(system.fit.dimension);
  }

  delete(lot: number): DeletedLot {
    const { pointsByLot, lotStart, obs, weightScale } = this.system.series;
    const indices = pointsByLot.slice(lotStart[lot], lotStart[lot + 1]);
    const m = indices.length;
    const residual = new Float64Array(m);
    const covariance = new Float64Array(m * m);
    const i = indices[0];
    if (m === 1 && this.leverage[i] < SAFE_LEVERAGE) {
      residual[0] = this.residual[i] / (1 - this.leverage[i]);
      covariance[0] = 1 / obs.weight[i] + this.variance[i] / (1 - this.leverage[i]);
    } else if (m > 0) {
      if (!this.remover.remove(lot)) {
        throw new BaselineError('insufficient-data', `Without lot ${lot} the other lots do not determine a baseline.`);
      }
      const p = this.z.length;
      const all = new Float64Array(m * p);
      for (let s = 0; s < m; s++) {
        const z = all.subarray(s * p, (s + 1) * p);
        this.direction(indices[s], 1, z);
        solveTransposed(this.remover.factor, this.system.fit.width, z, this.system.first[indices[s]]);
        residual[s] = this.deletedResidual(indices[s]);
        for (let q = 0; q <= s; q++) {
          const c = dot(z, all.subarray(q * p, (q + 1) * p)) / weightScale;
          covariance[s * m + q] = c;
          covariance[q * m + s] = c;
        }
        covariance[s * m + s] += 1 / obs.weight[indices[s]];
      }
    }
    if (!(residual.every(Number.isFinite) && covariance.every(Number.isFinite))) throw outOfRange(lot);
    return { lot, indices, residual, covariance };
  }

  /** @param count weight of each point in its lot's mean */
  score(count: Float64Array | undefined): LotScores {
    const { pointsByLot, lotStart, obs, n } = this.system.series;
    const lotCount = obs.pulls.length;
    if (count !== undefined) checkCounts(count, n);
    const deletedResidual = new Float64Array(n);
    const residual = new Float64Array(lotCount);
    const variance = new Float64Array(lotCount).fill(Infinity);
    const undetermined: number[] = [];
    for (let lot = 0; lot < lotCount; lot++) {
      const from = lotStart[lot];
      const to = lotStart[lot + 1];
      const i = pointsByLot[from];
      if (to === from) continue;
      let total = 0;
      for (let k = from; k < to; k++) total += count === undefined ? 1 : count[pointsByLot[k]];
      if (!(total > 0)) throw new BaselineError('bad-argument', `The counts of lot ${lot} are all 0.`);
      if (to - from === 1 && this.leverage[i] < SAFE_LEVERAGE) {
        deletedResidual[i] = residual[lot] = this.residual[i] / (1 - this.leverage[i]);
        variance[lot] = 1 / obs.weight[i] + this.variance[i] / (1 - this.leverage[i]);
      } else if (this.remover.remove(lot)) {
        variance[lot] = this.meanVariance(from, to, total, count);
        for (let k = from; k < to; k++) {
          const point = pointsByLot[k];
          deletedResidual[point] = this.deletedResidual(point);
          residual[lot] += (deletedResidual[point] * (count === undefined ? 1 : count[point])) / total;
        }
      } else {
        undetermined.push(lot);
        continue;
      }
      if (!Number.isFinite(residual[lot] + variance[lot])) throw outOfRange(lot);
    }
    return { deletedResidual, residual, variance, undetermined };
  }

  /** a' Cov a = sum a^2 / w + |U^-T X_I' a|^2, for the lot that was removed last. */
  private meanVariance(from: number, to: number, total: number, count: Float64Array | undefined): number {
    const { z, system, remover } = this;
    const { pointsByLot, obs, weightScale } = system.series;
    let own = 0;
    let start = z.length;
    z.fill(0);
    for (let k = from; k < to; k++) {
      const i = pointsByLot[k];
      const a = (count === undefined ? 1 : count[i]) / total;
      own += (a * a) / obs.weight[i];
      this.direction(i, a, z);
      start = Math.min(start, system.first[i]);
    }
    solveTransposed(remover.factor, system.fit.width, z, start);
    return own + dot(z, z) / weightScale;
  }

  /** z += a b(t_i). */
  private direction(i: number, a: number, z: Float64Array): void {
    const { first, rows, fit } = this.system;
    for (let d = 0; d < fit.width; d++) z[first[i] + d] += a * rows[fit.width * i + d];
  }

  private deletedResidual(i: number): number {
    const { first, rows, fit } = this.system;
    let e = this.residual[i];
    for (let d = 0; d < fit.width; d++) e -= rows[fit.width * i + d] * this.remover.delta[first[i] + d];
    return e;
  }
}

function checkCounts(count: Float64Array, n: number): void {
  if (count.length !== n) throw new BaselineError('bad-argument', `${count.length} counts were given for ${n} points.`);
  for (let i = 0; i < n; i++) {
    if (!(count[i] >= 0 && count[i] < Infinity)) {
      throw new BaselineError(
        count[i] < 0 ? 'bad-argument' : 'non-finite',
        `The count of point ${i} is not a number from 0 on.`,
      );
    }
  }
}

function outOfRange(lot: number): BaselineError {
  return new BaselineError('ill-posed', `Without lot ${lot} the fit leaves the range of double precision.`);
}
