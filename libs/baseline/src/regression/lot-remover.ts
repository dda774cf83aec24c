import { BandedLeastSquares, dot, solveTransposed, solveUpper } from './banded-least-squares';
import { addPoints, undetermined, type RegressionSystem } from './regression-system';

/** Below this share of A's diagonal a pivot of A - X_I' V W X_I has lost too many digits, and the other points are fitted anew. */
const SAFE_PIVOT = 1e-3;
/** So have they where the weight of a point times the variance of the others' baseline there, h / (1 - h) for a single one, is above this. */
const SAFE_VARIANCE = 1e3;
/** Lots whose leverages sum to less than this are too light for either. */
const LIGHT = 0.5;

/**
 * Takes single lots out of a regression in the space of its coefficients. With A = R'R of all pulling points, X_I the rows of the lot and e its residuals,
 * the others' factor is the banded Cholesky factor of A_- = A - X_I' V W X_I, and the coefficients change by delta = -A_-^-1 X_I' V W e:
 * O(K) a lot plus O(K) a point, whatever the lot's size. Where subtraction leaves too few digits (a lot that nearly alone determines
 * a stretch: at most as many as there are coefficients), the other points go through the rotations again.
 */
export class LotRemover {
  /** Factor of the fit without the lot: U'U = A_-, banded as R. */
  readonly factor: Float64Array;
  /** Coefficients without the lot less those with it. */
  readonly delta: Float64Array;
  private readonly normal: Float64Array;
  private readonly reduced: Float64Array;
  private readonly z: Float64Array;
  private readonly anew: BandedLeastSquares;

  /** @param residual of each point from the fit of all pulling points, and its leverage there */
  constructor(
    private readonly system: RegressionSystem,
    private readonly residual: Float64Array,
    private readonly leverage: Float64Array,
  ) {
    const { r, dimension: p, width } = system.fit;
    this.factor = new Float64Array(r.length);
    this.reduced = new Float64Array(r.length);
    this.delta = new Float64Array(p);
    this.z = new Float64Array(p);
    this.anew = new BandedLeastSquares(p, width);
    this.normal = new Float64Array(r.length);
    for (let k = 0; k < p; k++) {
      const end = Math.min(width, p - k);
      for (let i = 0; i < end; i++) {
        for (let j = i; j < end; j++) this.normal[width * (k + i) + j - i] += r[width * k + i] * r[width * k + j];
      }
    }
  }

  /** Sets factor and delta for a lot; false when the other points do not determine the coefficients. */
  remove(lot: number): boolean {
    const { series, first, rows, fit } = this.system;
    const { pointsByLot, lotStart, pull } = series;
    const { r, width, dimension } = fit;
    const { delta, factor, reduced, residual } = this;
    const from = lotStart[lot];
    const to = lotStart[lot + 1];
    delta.fill(0);
    factor.set(r);
    let start = dimension;
    for (let k = from; k < to; k++) if (pull[pointsByLot[k]] > 0) start = Math.min(start, first[pointsByLot[k]]);
    if (start === dimension) return true;
    reduced.set(this.normal);
    for (let k = from; k < to; k++) {
      const i = pointsByLot[k];
      const w = pull[i];
      const b = width * i;
      for (let d = 0; d < width; d++) {
        const x = w * rows[b + d];
        const a = width * (first[i] + d) - d;
        delta[first[i] + d] -= x * residual[i];
        for (let e = d; e < width; e++) reduced[a + e] -= x * rows[b + e];
      }
    }
    if (!(this.factorise(start) && this.isSafe(from, to))) return this.fitAnew(lot);
    solveTransposed(factor, width, delta, start);
    solveUpper(factor, width, delta);
    return true;
  }

  /** Banded Cholesky from row `start`; the rows before it are those of R. False when a pivot has lost too many digits. */
  private factorise(start: number): boolean {
    const { factor, reduced, normal } = this;
    const { width, dimension: p } = this.system.fit;
    for (let i = start; i < p; i++) {
      const end = Math.min(width, p - i);
      for (let d = 0; d < end; d++) {
        let sum = reduced[width * i + d];
        for (let k = Math.max(0, i + d - width + 1); k < i; k++) {
          sum -= factor[width * k + i - k] * factor[width * k + i - k + d];
        }
        if (d > 0) {
          factor[width * i + d] = sum / factor[width * i];
        } else {
          if (!(sum > SAFE_PIVOT * normal[width * i])) return false;
          factor[width * i] = Math.sqrt(sum);
        }
      }
    }
    return true;
  }

  /** A pivot shows only the last column of a near dependence; the variance at the lot's own points shows all of it. */
  private isSafe(from: number, to: number): boolean {
    const { series, first, rows, fit } = this.system;
    const { pointsByLot, pull } = series;
    const { width } = fit;
    const { factor, z } = this;
    let sum = 0;
    for (let k = from; k < to; k++) sum += this.leverage[pointsByLot[k]];
    if (sum < LIGHT) return true;
    for (let k = from; k < to; k++) {
      const i = pointsByLot[k];
      z.fill(0);
      for (let d = 0; d < width; d++) z[first[i] + d] = rows[width * i + d];
      solveTransposed(factor, width, z, first[i]);
      if (!(pull[i] * dot(z, z) < SAFE_VARIANCE)) return false;
    }
    return true;
  }

  private fitAnew(lot: number): boolean {
    const { system, anew, factor, delta } = this;
    anew.clear();
    addPoints(system, anew, this.residual, lot);
    if (undetermined(system, anew, lot) >= 0) return false;
    factor.set(anew.r);
    delta.set(anew.rhs);
    solveUpper(factor, anew.width, delta);
    return true;
  }
}
