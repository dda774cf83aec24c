import type { TimeRange } from '../../../shared/chart/range';

const MOST_COLUMNS = 1000;

/** The range that the address asks for, in epoch ms; null when it asks for none or for nonsense. */
export function parseRange(from: string | null, to: string | null): TimeRange | null {
  if (from === null || to === null || !/^\d+$/.test(from) || !/^\d+$/.test(to)) return null;
  const range = { from: Number(from), to: Number(to) };
  return range.to > range.from ? range : null;
}

/** Half a range more on both sides, so that panning does not run into white before the next answer. */
export function withMargin({ from, to }: TimeRange): TimeRange {
  const half = (to - from) / 2;
  return { from: from - half, to: to + half };
}

/** Columns of readings worth asking for on a window so wide, in steps, so that a resize seldom asks again. */
export function columnsFor(windowWidth: number): number {
  return Math.min(Math.max(Math.ceil(windowWidth / 200) * 200, 400), MOST_COLUMNS);
}
