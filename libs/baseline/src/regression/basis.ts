/** The functions of a basis that are not zero at one time: their numbers are first .. first + width - 1. */
export class BasisRow {
  first = 0;
  readonly value: Float64Array;
  readonly slope: Float64Array;
  readonly curvature: Float64Array;

  constructor(width: number) {
    this.value = new Float64Array(width);
    this.slope = new Float64Array(width);
    this.curvature = new Float64Array(width);
  }
}

/** What a regression baseline is made of: functions of u = (t - first pulling time) / (last - first pulling time). */
export interface Basis {
  /** Number of functions. */
  readonly dimension: number;
  /** Most functions that are not zero at one time; at most `dimension`. */
  readonly width: number;
  /** Where the curve changes from one cubic to the next, in u, increasing. */
  readonly breaks: Float64Array;
  /** Values and derivatives (by u) of the functions at any u. */
  evaluate(u: number, row: BasisRow): void;
  /** The stretch of [0, 1] outside which the function of this number is zero. */
  support(column: number): { from: number; to: number };
}
