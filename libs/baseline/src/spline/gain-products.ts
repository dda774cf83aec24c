import type { PreparedSeries } from '../prepared-series';
import { backwardGain, STATE_SIZE } from './information-state';

/**
 * Products of the smoother's backward gains over any range of points. The smoothed states form a Markov chain, and
 * Cov(x_i, x_k | all) = G_i G_(i+1) ... G_(k-1) P_k for i < k, with P_k = Var(x_k | all) and the 2 x 2 gain G_i from point i to i + 1 (Rauch, Tung & Striebel
 * 1965; Kohn & Ansley 1987). A binary tree of partial products gives each range in O(log n).
 */
export class GainProducts {
  /** Node v holds the product of nodes 2 v and 2 v + 1; leaf i is node n + i. Four numbers a node, row-major. */
  private readonly tree: Float64Array;
  private readonly right = new Float64Array(4);

  constructor(private readonly n: number) {
    this.tree = new Float64Array(8 * n);
  }

  /** Works out the gains of a filtered series. The last leaf is the unit matrix. */
  fill(series: PreparedSeries, q: number, forward: Float64Array): void {
    const { n, tree } = this;
    const { gap, pull } = series;
    for (let i = 0; i < n; i++) {
      backwardGain(forward, STATE_SIZE * i, pull[i], gap[i], q, tree, 4 * (n + i));
    }
    for (let v = n - 1; v > 0; v--) multiply(tree, 8 * v, tree, 8 * v + 4, tree, 4 * v);
  }

  /** Writes G_from ... G_(to-1), row-major; the unit matrix when from = to. */
  product(from: number, to: number, out: Float64Array): void {
    const { n, tree, right } = this;
    if (to === from + 1) {
      const i = 4 * (n + from);
      for (let j = 0; j < 4; j++) out[j] = tree[i + j];
      return;
    }
    setUnit(out);
    setUnit(right);
    let low = n + from;
    let high = n + to;
    while (low < high) {
      if (low & 1) multiply(out, 0, tree, 4 * low++, out, 0);
      if (high & 1) multiply(tree, 4 * --high, right, 0, right, 0);
      low >>= 1;
      high >>= 1;
    }
    multiply(out, 0, right, 0, out, 0);
  }
}

function setUnit(m: Float64Array): void {
  m[0] = 1;
  m[1] = 0;
  m[2] = 0;
  m[3] = 1;
}

/** out[k..k+3] := x[i..i+3] * y[j..j+3], 2 x 2 row-major; out may be one of the factors. */
export function multiply(x: Float64Array, i: number, y: Float64Array, j: number, out: Float64Array, k: number): void {
  const a = x[i];
  const b = x[i + 1];
  const c = x[i + 2];
  const d = x[i + 3];
  const e = y[j];
  const f = y[j + 1];
  const g = y[j + 2];
  const h = y[j + 3];
  out[k] = a * e + b * g;
  out[k + 1] = a * f + b * h;
  out[k + 2] = c * e + d * g;
  out[k + 3] = c * f + d * h;
}
