import { BasisRow, type Basis } from './basis';
import { BSplineBasis } from './b-spline-basis';

/**
 * Natural cubic splines on [0, 1] with K >= 1 interior knots: cubic B-splines whose combinations have no second derivative at 0 and 1, straight beyond.
 *
 * At 0 only B0, B1, B2 have second derivatives, d0 > 0, d1 < 0, d2 > 0. Instead of the three the basis has |d1| B0 + d0 B1 and d2 B1 + |d1| B2, which
 * have none, and the same mirrored at 1, so that still at most four functions are not zero at one time. With a single knot B2 reaches both ends, and the
 * middle function is B2 - (d2/d1) B1 - (e2/e1) B3. All coefficients are positive; each function is scaled so that its largest is 1.
 * (Green & Silverman 1994, ch. 2, for what a natural spline is; the local combinations are our own.)
 */
export class NaturalBasis implements Basis {
  readonly dimension: number;
  readonly width: number;
  readonly breaks: Float64Array;
  private readonly splines: BSplineBasis;
  private readonly inner = new BasisRow(4);
  /** B-spline j is part of function target[2j] with share[2j] and of target[2j + 1] with share[2j + 1]. */
  private readonly target: Int32Array;
  private readonly share: Float64Array;

  /** @param knots interior knots, at least one, strictly increasing within (0, 1) */
  constructor(knots: Float64Array) {
    const count = knots.length;
    this.splines = new BSplineBasis(knots);
    this.dimension = count + 2;
    this.width = Math.min(4, this.dimension);
    this.breaks = Float64Array.of(0, ...knots, 1);
    this.target = new Int32Array(2 * (count + 4));
    this.share = new Float64Array(2 * (count + 4));
    const last = count + 3;
    for (let j = 3; j <= last - 3; j++) this.put(j, 0, j - 1, 1);
    this.splines.evaluate(0, this.inner);
    const [d0, d1, d2] = this.inner.curvature;
    this.splines.evaluate(1, this.inner);
    const [, e2, e1, e0] = this.inner.curvature;
    this.combine(0, 0, -d1, 1, d0);
    this.combine(this.dimension - 1, last, -e1, last - 1, e0);
    if (count === 1) {
      const largest = Math.max(1, -d2 / d1, -e2 / e1);
      this.put(1, 1, 1, -d2 / d1 / largest);
      this.put(2, 0, 1, 1 / largest);
      this.put(3, 1, 1, -e2 / e1 / largest);
    } else {
      this.combine(1, 2, -d1, 1, d2, 1);
      this.combine(this.dimension - 2, last - 2, -e1, last - 1, e2, 1);
    }
  }

  support(column: number): { from: number; to: number } {
    const { dimension, splines } = this;
    const last = splines.dimension - 1;
    const from = column < 2 ? 0 : splines.support(Math.min(column + 1, last)).from;
    const to = column >= dimension - 2 ? 1 : splines.support(column + 1).to;
    return { from, to };
  }

  evaluate(u: number, row: BasisRow): void {
    const inside = Math.min(1, Math.max(0, u));
    const { inner, target, share, splines } = this;
    const { value, slope, curvature } = row;
    splines.evaluate(inside, inner);
    const first = Math.min(Math.max(0, inner.first - 1), this.dimension - this.width);
    row.first = first;
    value.fill(0);
    slope.fill(0);
    curvature.fill(0);
    for (let d = 0; d < 4; d++) {
      for (let k = 2 * (inner.first + d), end = k + 2; k < end; k++) {
        const a = share[k];
        if (a === 0) continue;
        const c = target[k] - first;
        value[c] += a * inner.value[d];
        slope[c] += a * inner.slope[d];
        curvature[c] += a * inner.curvature[d];
      }
    }
    if (inside === u) return;
    for (let c = 0; c < value.length; c++) {
      value[c] += (u - inside) * slope[c];
      curvature[c] = 0;
    }
  }

  /** Function c = a B_i + b B_j, scaled; `slot` of B_i is 0, that of B_j is given. */
  private combine(c: number, i: number, a: number, j: number, b: number, slotOfJ = 0): void {
    const largest = Math.max(a, b);
    this.put(i, 0, c, a / largest);
    this.put(j, slotOfJ, c, b / largest);
  }

  private put(j: number, slot: number, function_: number, share: number): void {
    this.target[2 * j + slot] = function_;
    this.share[2 * j + slot] = share;
  }
}
