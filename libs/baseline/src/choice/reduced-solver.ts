import { BAND, type ReducedSystem } from './reduced-system';

/** Products above this are turned into a logarithm and started afresh. */
const PRODUCT_LIMIT = 1e200;

/**
 * Solves (B'WB + lambda P) c = B'Wr for one lambda after another, in buffers that are made once: LDL' of four bands, the band of its inverse by the backward
 * recursion (Takahashi, Fagan & Chin 1973; for splines Hutchinson & de Hoog 1985, Numer. Math. 47:99). The fields speak of the last solution.
 */
export class ReducedSolver {
  /** tr (B'WB + lambda P)^-1 B'WB. */
  edf = 0;
  /** r'WB c, so that PRSS = r'Wr - explained. */
  explained = 0;
  /** c'B'WB c: RSS = r'Wr - 2 explained + square. */
  square = 0;
  /** log det (B'WB + lambda P). */
  logDet = 0;
  /** l1, l2, l3, 1/d of each row, and the solution of the lower triangle over d. */
  private readonly factor: Float64Array;
  private readonly half: Float64Array;

  constructor(mostIntervals: number) {
    this.factor = new Float64Array(BAND * (mostIntervals + 3));
    this.half = new Float64Array(mostIntervals + 3);
  }

  /**
   * Its numbers are declared one by one: a pattern that takes an array apart keeps them as objects, a hundred bytes a row.
   * @returns false when the system is not positive definite in doubles
   */
  solve(system: ReducedSystem, lambda: number): boolean {
    return this.factorise(system, lambda) && this.invert(system);
  }

  private factorise({ intervals, gram, moment, penalty }: ReducedSystem, lambda: number): boolean {
    const { factor, half } = this;
    const size = intervals + 3;
    let p0 = 0;
    let p1 = 0;
    let p2 = 0;
    let p3 = 0;
    let l1 = 0;
    let l2 = 0;
    let l3 = 0;
    let q0 = 0;
    let q1 = 0;
    let r0 = 0;
    let z = 0;
    let f1 = 0;
    let f2 = 0;
    let explained = 0;
    let product = 1;
    let logDet = 0;
    for (let j = 0, i = 0; j < size; j++, i += BAND) {
      const a0 = gram[i] + lambda * penalty[i] + q0 - l1 * p1;
      const a1 = gram[i + 1] + lambda * penalty[i + 1] + q1 - l1 * p2;
      const a2 = gram[i + 2] + lambda * penalty[i + 2] - l1 * p3;
      q0 = r0 - l2 * p2;
      q1 = -l2 * p3;
      r0 = -l3 * p3;
      const f0 = moment[j] + f1 - l1 * z;
      f1 = f2 - l2 * z;
      f2 = -l3 * z;
      p0 = a0;
      p1 = a1;
      p2 = a2;
      p3 = gram[i + 3] + lambda * penalty[i + 3];
      if (!(p0 > 0)) return false;
      const inverse = 1 / p0;
      l1 = p1 * inverse;
      l2 = p2 * inverse;
      l3 = p3 * inverse;
      z = f0;
      factor[i] = l1;
      factor[i + 1] = l2;
      factor[i + 2] = l3;
      factor[i + 3] = inverse;
      half[j] = z * inverse;
      explained += z * z * inverse;
      product *= p0;
      if (!(product < PRODUCT_LIMIT && product > 1 / PRODUCT_LIMIT)) {
        logDet += Math.log(product);
        product = 1;
      }
    }
    this.explained = explained;
    this.logDet = logDet + Math.log(product);
    return true;
  }

  private invert({ intervals, gram }: ReducedSystem): boolean {
    const { factor, half } = this;
    let v11 = 0;
    let v12 = 0;
    let v13 = 0;
    let v22 = 0;
    let v23 = 0;
    let v33 = 0;
    let c1 = 0;
    let c2 = 0;
    let c3 = 0;
    let edf = 0;
    let square = 0;
    for (let j = intervals + 2, i = BAND * j; j >= 0; j--, i -= BAND) {
      const l1 = factor[i];
      const l2 = factor[i + 1];
      const l3 = factor[i + 2];
      const v01 = -(l1 * v11 + l2 * v12 + l3 * v13);
      const v02 = -(l1 * v12 + l2 * v22 + l3 * v23);
      const v03 = -(l1 * v13 + l2 * v23 + l3 * v33);
      const v00 = factor[i + 3] - (l1 * v01 + l2 * v02 + l3 * v03);
      const c0 = half[j] - (l1 * c1 + l2 * c2 + l3 * c3);
      const g0 = gram[i];
      const g1 = gram[i + 1];
      const g2 = gram[i + 2];
      const g3 = gram[i + 3];
      edf += g0 * v00 + 2 * (g1 * v01 + g2 * v02 + g3 * v03);
      square += c0 * (g0 * c0 + 2 * (g1 * c1 + g2 * c2 + g3 * c3));
      v33 = v22;
      v23 = v12;
      v22 = v11;
      v13 = v02;
      v12 = v01;
      v11 = v00;
      c3 = c2;
      c2 = c1;
      c1 = c0;
    }
    this.edf = edf;
    this.square = square;
    return Number.isFinite(edf + square);
  }
}
