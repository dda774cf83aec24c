/** A span of time, epoch milliseconds; `from` < `to`. */
export interface TimeRange {
  from: number;
  to: number;
}

/** Nothing shorter than a minute can be zoomed into. */
export const SHORTEST_SPAN_MS = 60_000;
const KEY_PAN_SHARE = 0.2;
const KEY_ZOOM_FACTOR = 1.5;

/** Keeps a range within bounds: its length first, then its place. */
export function clampRange(range: TimeRange, bounds: TimeRange): TimeRange {
  const whole = bounds.to - bounds.from;
  const span = Math.min(Math.max(range.to - range.from, Math.min(SHORTEST_SPAN_MS, whole)), whole);
  const middle = (range.from + range.to) / 2;
  const from = Math.min(Math.max(middle - span / 2, bounds.from), bounds.to - span);
  return { from, to: from + span };
}

/** Moves a range by a share of its own length, positive towards later; it stops at the bounds. */
export function panRange(range: TimeRange, share: number, bounds: TimeRange): TimeRange {
  const step = (range.to - range.from) * share;
  return clampRange({ from: range.from + step, to: range.to + step }, bounds);
}

/** Makes a range `factor` times as long (below 1: zooms in), keeping the instant `anchor` at its place on the screen. */
export function zoomRange(range: TimeRange, factor: number, anchor: number, bounds: TimeRange): TimeRange {
  const whole = bounds.to - bounds.from;
  const old = range.to - range.from;
  const span = Math.min(Math.max(old * factor, Math.min(SHORTEST_SPAN_MS, whole)), whole);
  const share = old > 0 ? (anchor - range.from) / old : 0.5;
  const from = anchor - share * span;
  return clampRange({ from, to: from + span }, bounds);
}

/** What a key does to a range: arrows pan, + and − zoom about the middle, 0 goes back to `home`; undefined for other keys. */
export function rangeForKey(key: string, range: TimeRange, bounds: TimeRange, home: TimeRange): TimeRange | undefined {
  const middle = (range.from + range.to) / 2;
  switch (key) {
    case 'ArrowLeft':
      return panRange(range, -KEY_PAN_SHARE, bounds);
    case 'ArrowRight':
      return panRange(range, KEY_PAN_SHARE, bounds);
    case '+':
    case '=':
      return zoomRange(range, 1 / KEY_ZOOM_FACTOR, middle, bounds);
    case '-':
    case '\u2212':
    case '_':
      return zoomRange(range, KEY_ZOOM_FACTOR, middle, bounds);
    case '0':
      return clampRange(home, bounds);
    default:
      return undefined;
  }
}

export const isSameRange = (a: TimeRange, b: TimeRange) => Math.abs(a.from - b.from) < 1 && Math.abs(a.to - b.to) < 1;
