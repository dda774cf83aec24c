/** Least and greatest value in columns of time, in time order. */
export interface Columns {
  at: readonly number[];
  low: readonly number[];
  high: readonly number[];
}

/**
 * Merges columns into at most `count` equal ones over [from, to], each with the least low and the greatest high of its part,
 * so that no extreme is lost. Columns outside the range are left out; a merged column stands at the middle of its part.
 */
export function mergeColumns(columns: Columns, from: number, to: number, count: number): Columns {
  const at: number[] = [];
  const low: number[] = [];
  const high: number[] = [];
  if (!(to > from) || !(count >= 1)) return { at, low, high };
  const width = (to - from) / Math.floor(count);
  let current = -1;
  for (let i = 0; i < columns.at.length; i++) {
    if (columns.at[i] < from || columns.at[i] > to) continue;
    const column = Math.min(Math.floor((columns.at[i] - from) / width), Math.floor(count) - 1);
    const last = at.length - 1;
    if (column === current) {
      low[last] = Math.min(low[last], columns.low[i]);
      high[last] = Math.max(high[last], columns.high[i]);
    } else {
      at.push(from + (column + 0.5) * width);
      low.push(columns.low[i]);
      high.push(columns.high[i]);
      current = column;
    }
  }
  return { at, low, high };
}
