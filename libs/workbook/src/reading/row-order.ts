/** Steps against the order of the rows up to this long are rows a little out of order, not the clock put back. */
const JITTER = 10 * 60_000;

/**
 * Tells the two passes through the repeated hour at the end of daylight saving apart by the order of the rows.
 * In a series that runs forward the first pass lasts until the clock steps back by more than ten minutes; in one that
 * runs backward the second pass comes first. One series per sheet and channel.
 */
export class RowOrder {
  private previous: number | null = null;
  /** Steps forward less steps backward, so far. */
  private balance = 0;
  private hasStepped = false;

  /** Records an instant that is beyond doubt. */
  note(at: number): void {
    if (this.previous !== null) this.balance += Math.sign(at - this.previous);
    this.previous = at;
    this.hasStepped = false;
  }

  /**
   * @param early the instant on the first pass, epoch milliseconds
   * @param late the instant on the second pass
   * @param answered the pass that was said where the order of the rows does not tell
   * @returns the one that the order of the rows asks for, or null when no row before it tells and nothing was said
   */
  choose(early: number, late: number, answered?: 'first' | 'second'): number | null {
    const { previous } = this;
    const isForward = this.balance >= 0;
    const lead = previous === null ? null : (previous - (isForward ? early : late)) * (isForward ? 1 : -1);
    if (lead === null || lead > late - early + JITTER) {
      if (answered === undefined) return null;
      this.previous = answered === 'first' ? early : late;
      this.hasStepped = isForward === (answered === 'second');
      return this.previous;
    }
    this.hasStepped ||= lead > JITTER;
    this.previous = this.hasStepped === isForward ? late : early;
    return this.previous;
  }
}
