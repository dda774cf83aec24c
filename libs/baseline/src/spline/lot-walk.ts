import { advance, backwardGain, combine, STATE_SIZE, type Posterior } from './information-state';
import type { FilteredSeries } from './filtered-series';
import { multiply } from './gain-products';

/**
 * A lot's points under the fit without the lot. The information from before its first point and from after its last is carried towards each other over
 * the lot's span, leaving its own points out and taking in those of others in between. So it is exact, costs the lot's span, and keeps its digits
 * when the lot determines its own fit (where (I - S_II)^-1 (y - g) has none left).
 */
export class LotWalk {
  private readonly gain = new Float64Array(4);
  private ahead = new Float64Array(0);
  private behind = new Float64Array(0);
  private gains = new Float64Array(0);

  constructor(private readonly filtered: FilteredSeries) {}

  /** Walks over the m points pointsByLot[from], ...; the other methods speak of these. */
  walk(from: number, m: number): void {
    this.reserve(m);
    const { ahead, behind, gains, gain } = this;
    const { q, forward, backward } = this.filtered;
    const { pointsByLot, gap, pull, r } = this.filtered.series;
    const first = STATE_SIZE * pointsByLot[from];
    const last = STATE_SIZE * pointsByLot[from + m - 1];
    const end = STATE_SIZE * (m - 1);
    for (let j = 0; j < STATE_SIZE; j++) {
      ahead[j] = forward[first + j];
      behind[end + j] = backward[last + j];
    }
    for (let s = 0; s + 1 < m; s++) {
      const own = pointsByLot[from + s];
      const next = pointsByLot[from + s + 1];
      const at = STATE_SIZE * (s + 1);
      backwardGain(ahead, at - STATE_SIZE, 0, gap[own], q, gains, 4 * s);
      advance(ahead, at - STATE_SIZE, ahead, at, 0, 0, gap[own], q);
      for (let k = own + 1; k < next; k++) {
        backwardGain(ahead, at, pull[k], gap[k], q, gain, 0);
        multiply(gains, 4 * s, gain, 0, gains, 4 * s);
        advance(ahead, at, ahead, at, pull[k], pull[k] * r[k], gap[k], q);
      }
    }
    for (let s = m - 2; s >= 0; s--) {
      const own = pointsByLot[from + s + 1];
      const next = pointsByLot[from + s];
      const at = STATE_SIZE * s;
      advance(behind, at + STATE_SIZE, behind, at, 0, 0, gap[own - 1], q);
      for (let k = own - 1; k > next; k--) {
        advance(behind, at, behind, at, pull[k], pull[k] * r[k], gap[k - 1], q);
      }
    }
  }

  /** The state at the lot's point s without the lot (scaled). @returns false when the other lots do not determine a line */
  posterior(s: number, out: Posterior): boolean {
    return combine(this.ahead, STATE_SIZE * s, this.behind, STATE_SIZE * s, 0, 0, out);
  }

  /** x := G_s x: from point s + 1 of the lot to point s. */
  stepBack(s: number, x: Float64Array): void {
    const g = 4 * s;
    const x0 = x[0];
    x[0] = this.gains[g] * x0 + this.gains[g + 1] * x[1];
    x[1] = this.gains[g + 2] * x0 + this.gains[g + 3] * x[1];
  }

  private reserve(m: number): void {
    if (this.ahead.length >= STATE_SIZE * m) return;
    const room = Math.max(m, 16);
    this.ahead = new Float64Array(STATE_SIZE * room);
    this.behind = new Float64Array(STATE_SIZE * room);
    this.gains = new Float64Array(4 * room);
  }
}
