import type { Basis, BasisRow } from './basis';

/**
 * Cubic B-splines on [0, 1] with interior knots, and quadruple knots at 0 and 1 (de Boor 1978, A Practical Guide to Splines, ch. IX-X). Four are not zero in
 * each span between knots. Beyond 0 and 1 the cubics of the end spans go on.
 */
export class BSplineBasis implements Basis {
  readonly dimension: number;
  readonly width = 4;
  private readonly knots: Float64Array;

  /** @param breaks interior knots, strictly increasing within (0, 1) */
  constructor(readonly breaks: Float64Array) {
    const count = breaks.length;
    this.dimension = count + 4;
    this.knots = new Float64Array(count + 8);
    this.knots.set(breaks, 4);
    this.knots.fill(1, count + 4);
  }

  support(column: number): { from: number; to: number } {
    return { from: this.knots[column], to: this.knots[column + 4] };
  }

  /** Number of the span that holds u: between interior knots s - 1 and s. */
  span(u: number): number {
    const { breaks } = this;
    let low = 0;
    let high = breaks.length;
    while (low < high) {
      const middle = (low + high) >>> 1;
      if (breaks[middle] <= u) low = middle + 1;
      else high = middle;
    }
    return low;
  }

  /** The recurrence of Cox and de Boor from degree 1 to 3; derivatives are differences of the lower degrees' values. */
  evaluate(u: number, row: BasisRow): void {
    const s = this.span(u);
    const { knots } = this;
    const { value, slope, curvature } = row;
    row.first = s;
    const toA = u - knots[s + 1];
    const toB = u - knots[s + 2];
    const toC = u - knots[s + 3];
    const fromD = knots[s + 4] - u;
    const fromE = knots[s + 5] - u;
    const fromF = knots[s + 6] - u;
    const h = knots[s + 4] - knots[s + 3];
    const h20 = knots[s + 4] - knots[s + 2];
    const h21 = knots[s + 5] - knots[s + 3];
    const h30 = knots[s + 4] - knots[s + 1];
    const h31 = knots[s + 5] - knots[s + 2];
    const h32 = knots[s + 6] - knots[s + 3];
    const p0 = fromD / h;
    const p1 = toC / h;
    const q0 = (p0 * fromD) / h20;
    const q1 = (p0 * toB) / h20 + (p1 * fromE) / h21;
    const q2 = (p1 * toC) / h21;
    value[0] = (q0 * fromD) / h30;
    value[1] = (q0 * toA) / h30 + (q1 * fromE) / h31;
    value[2] = (q1 * toB) / h31 + (q2 * fromF) / h32;
    value[3] = (q2 * toC) / h32;
    slope[0] = (-3 * q0) / h30;
    slope[1] = 3 * (q0 / h30 - q1 / h31);
    slope[2] = 3 * (q1 / h31 - q2 / h32);
    slope[3] = (3 * q2) / h32;
    const d0 = (-2 * p0) / h20;
    const d1 = 2 * (p0 / h20 - p1 / h21);
    const d2 = (2 * p1) / h21;
    curvature[0] = (-3 * d0) / h30;
    curvature[1] = 3 * (d0 / h30 - d1 / h31);
    curvature[2] = 3 * (d1 / h31 - d2 / h32);
    curvature[3] = (3 * d2) / h32;
  }
}
