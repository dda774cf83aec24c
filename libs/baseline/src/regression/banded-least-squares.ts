import { BaselineError } from '../baseline-error';

/** A pivot of R below this share of its column's norm means that the column is not determined: two thirds of a double's digits are gone. */
export const RANK_TOLERANCE = 1e-10;

/**
 * Weighted linear least squares, row by row: minimises  sum_i (s_i (y_i - x_i' beta))^2  where each row x_i has at most `width` numbers, side by side.
 *
 * Every row is rotated into an upper triangular R of half bandwidth `width` by Givens rotations, so that the errors grow with cond(X) and not, as
 * with normal equations, with its square; Q is not kept. Rows in the order of their first column cost O(width^2) each (Cox 1981, IMA J.
 * Numer. Anal. 1:3); any other order is right too, only slower. With width = dimension it is dense least squares.
 * @example
 * const system = new BandedLeastSquares(2, 2); // a line
 * for (let i = 0; i < n; i++) system.add(0, Float64Array.of(1, x[i]), 0, 1, y[i]);
 * const [level, slope] = system.solve();
 */
export class BandedLeastSquares {
  /** R by rows: R[i][i + d] stands at width * i + d. */
  readonly r: Float64Array;
  /** Q' y. */
  readonly rhs: Float64Array;
  /** Sum of squares of each column, sum_i (s_i x_ij)^2. */
  readonly squares: Float64Array;
  /** Sum_i (s_i (y_i - x_i' beta))^2, kept by the rotations. */
  rss = 0;
  private readonly row: Float64Array;

  /**
   * @param dimension number of unknowns, >= 1
   * @param width most numbers in a row, 1 .. dimension
   * @throws BaselineError 'bad-argument'
   */
  constructor(
    readonly dimension: number,
    readonly width: number,
  ) {
    if (!(Number.isInteger(dimension) && Number.isInteger(width) && width >= 1 && width <= dimension)) {
      throw new BaselineError('bad-argument', `Rows of ${width} numbers for ${dimension} unknowns are not possible.`);
    }
    this.r = new Float64Array(dimension * width);
    this.rhs = new Float64Array(dimension);
    this.squares = new Float64Array(dimension);
    this.row = new Float64Array(width);
  }

  /** Forgets all rows. */
  clear(): void {
    this.r.fill(0);
    this.rhs.fill(0);
    this.squares.fill(0);
    this.rss = 0;
  }

  /**
   * Takes in one row.
   * @param first column of its first number, 0 .. dimension - width
   * @param values holds its `width` numbers from `offset` on
   * @param scale s, the square root of its weight
   * @param y its right-hand side
   */
  add(first: number, values: Float64Array, offset: number, scale: number, y: number): void {
    const { r, rhs, row, width, dimension, squares } = this;
    for (let d = 0; d < width; d++) {
      const x = scale * values[offset + d];
      row[d] = x;
      squares[first + d] += x * x;
    }
    let right = scale * y;
    let left = width;
    for (let j = first; j < dimension && left > 0; j++) {
      const x = row[0];
      const k = width * j;
      const pivot = r[k];
      const norm = Math.sqrt(pivot * pivot + x * x);
      if (x !== 0 && norm > 0) {
        const c = pivot / norm;
        const s = x / norm;
        r[k] = norm;
        left = 0;
        for (let d = 1; d < width; d++) {
          const above = r[k + d];
          const own = row[d];
          r[k + d] = c * above + s * own;
          row[d - 1] = c * own - s * above;
          if (row[d - 1] !== 0) left = d;
        }
        const above = rhs[j];
        rhs[j] = c * above + s * right;
        right = c * right - s * above;
      } else {
        left--;
        for (let d = 1; d < width; d++) row[d - 1] = row[d];
      }
      row[width - 1] = 0;
    }
    this.rss += right * right;
  }

  /** The first column that the rows do not determine (see RANK_TOLERANCE); -1 when they determine all. */
  undeterminedColumn(): number {
    for (let j = 0; j < this.dimension; j++) {
      if (!(Math.abs(this.r[this.width * j]) > RANK_TOLERANCE * Math.sqrt(this.squares[j]))) return j;
    }
    return -1;
  }

  /**
   * beta = R^-1 Q' y.
   * @throws BaselineError 'ill-posed' when the rows do not determine it
   */
  solve(): Float64Array {
    const column = this.undeterminedColumn();
    if (column >= 0) throw new BaselineError('ill-posed', `The rows do not determine unknown ${column}.`);
    const beta = this.rhs.slice();
    solveUpper(this.r, this.width, beta);
    return beta;
  }
}

/** x := R^-1 x for a banded upper triangular R (rows of `width` numbers). */
export function solveUpper(r: Float64Array, width: number, x: Float64Array): void {
  const p = x.length;
  for (let i = p - 1; i >= 0; i--) {
    const k = width * i;
    const end = Math.min(width, p - i);
    let sum = x[i];
    for (let d = 1; d < end; d++) sum -= r[k + d] * x[i + d];
    x[i] = sum / r[k];
  }
}

/** z := R^-T z, where z is zero before `first`. */
export function solveTransposed(r: Float64Array, width: number, z: Float64Array, first: number): void {
  const p = z.length;
  for (let i = first; i < p; i++) {
    const k = width * i;
    const x = z[i] / r[k];
    z[i] = x;
    const end = Math.min(width, p - i);
    for (let d = 1; d < end; d++) z[i + d] -= r[k + d] * x;
  }
}

/** Sum of products; the same for (a, b) and (b, a) to the last bit. */
export function dot(a: Float64Array, b: Float64Array): number {
  let sum = 0;
  for (let i = 0; i < a.length; i++) sum += a[i] * b[i];
  return sum;
}
