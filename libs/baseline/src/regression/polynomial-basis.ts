import { BaselineError } from '../baseline-error';
import type { Basis, BasisRow } from './basis';
import { RANK_TOLERANCE } from './banded-least-squares';

/**
 * Polynomials q_0 .. q_d that are orthogonal over the weighted points, by the three-term recurrence of Forsythe (1957, J. SIAM 5:74):
 * with v = 2u - 1,  b_(j+1) q_(j+1) = (v - a_j) q_j - b_j q_(j-1),  scaled so that the weighted mean of q_j^2 is 1.
 */
export class PolynomialBasis implements Basis {
  readonly dimension: number;
  readonly width: number;
  readonly breaks = new Float64Array(0);
  private readonly a: Float64Array;
  private readonly b: Float64Array;

  /**
   * @param degree 0, 1, ...
   * @param u times of the points on [0, 1]
   * @param weight their weights, >= 0
   * @throws BaselineError 'ill-posed' when the times cluster so closely that doubles cannot tell the degrees apart
   */
  constructor(degree: number, u: Float64Array, weight: Float64Array) {
    this.dimension = degree + 1;
    this.width = degree + 1;
    this.a = new Float64Array(degree + 1);
    this.b = new Float64Array(degree + 1);
    const n = u.length;
    let before = new Float64Array(n);
    let q = new Float64Array(n).fill(1);
    let total = 0;
    for (let i = 0; i < n; i++) total += weight[i];
    for (let j = 0; j < degree; j++) {
      let mean = 0;
      for (let i = 0; i < n; i++) mean += weight[i] * (2 * u[i] - 1) * q[i] * q[i];
      this.a[j] = mean / total;
      let square = 0;
      for (let i = 0; i < n; i++) {
        before[i] = (2 * u[i] - 1 - this.a[j]) * q[i] - this.b[j] * before[i];
        square += weight[i] * before[i] * before[i];
      }
      const norm = Math.sqrt(square / total);
      if (!(norm > RANK_TOLERANCE)) {
        throw new BaselineError('ill-posed', `The times cluster too closely for a polynomial of degree ${degree}.`);
      }
      for (let i = 0; i < n; i++) before[i] /= norm;
      this.b[j + 1] = norm;
      [before, q] = [q, before];
    }
  }

  support(): { from: number; to: number } {
    return { from: 0, to: 1 };
  }

  evaluate(u: number, row: BasisRow): void {
    const { a, b, dimension } = this;
    const { value, slope, curvature } = row;
    const v = 2 * u - 1;
    row.first = 0;
    value[0] = 1;
    slope[0] = 0;
    curvature[0] = 0;
    for (let j = 0; j + 1 < dimension; j++) {
      const x = v - a[j];
      const c = 1 / b[j + 1];
      const k = j > 0 ? j - 1 : 0;
      const back = j > 0 ? b[j] : 0;
      value[j + 1] = c * (x * value[j] - back * value[k]);
      slope[j + 1] = c * (x * slope[j] + 2 * value[j] - back * slope[k]);
      curvature[j + 1] = c * (x * curvature[j] + 4 * slope[j] - back * curvature[k]);
    }
  }

  /** Coefficient of (u - at)^k in q_j, row-major: k * dimension + j. */
  powers(at: number): Float64Array {
    const { a, b, dimension } = this;
    const result = new Float64Array(dimension * dimension);
    const v = 2 * at - 1;
    result[0] = 1;
    for (let j = 0; j + 1 < dimension; j++) {
      for (let k = 0; k < dimension; k++) {
        const i = k * dimension + j;
        const lower = k > 0 ? 2 * result[i - dimension] : 0;
        const before = j > 0 ? b[j] * result[i - 1] : 0;
        result[i + 1] = ((v - a[j]) * result[i] + lower - before) / b[j + 1];
      }
    }
    return result;
  }
}
