/** Largest minus smallest. */
export function rangeOf(values: ArrayLike<number>): number {
  let low = Infinity;
  let high = -Infinity;
  for (let i = 0; i < values.length; i++) {
    low = Math.min(low, values[i]);
    high = Math.max(high, values[i]);
  }
  return high - low;
}

/** max |a - b| / (max b - min b); NaN anywhere counts as infinitely wrong. */
export function shareOfRange(a: ArrayLike<number>, b: ArrayLike<number>): number {
  let worst = 0;
  for (let i = 0; i < b.length; i++) {
    const difference = Math.abs(a[i] - b[i]);
    if (!(difference <= worst)) worst = Number.isNaN(difference) ? Infinity : difference;
  }
  return worst / rangeOf(b);
}
