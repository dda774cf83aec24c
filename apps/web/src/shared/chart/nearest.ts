/** The item of a time-ordered list whose instant is nearest to `at`; undefined for an empty list. */
export function nearestAt<T extends { at: number }>(items: readonly T[], at: number): T | undefined {
  let low = 0;
  let high = items.length;
  while (low < high) {
    const middle = (low + high) >> 1;
    if (items[middle].at < at) low = middle + 1;
    else high = middle;
  }
  const before = items[low - 1];
  const after = items[low];
  if (before === undefined || after === undefined) return before ?? after;
  return at - before.at <= after.at - at ? before : after;
}
