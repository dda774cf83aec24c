/** Least and greatest of some values. */
export interface ValueSpan {
  low: number;
  high: number;
}

const PADDING_SHARE = 0.1;

/** The smallest span that holds all given ones; null when there is none. Non-finite ends are passed over. */
export function joinSpans(spans: readonly (ValueSpan | null)[]): ValueSpan | null {
  let low = Infinity;
  let high = -Infinity;
  for (const span of spans) {
    if (span === null || !Number.isFinite(span.low) || !Number.isFinite(span.high)) continue;
    low = Math.min(low, span.low);
    high = Math.max(high, span.high);
  }
  return low <= high ? { low, high } : null;
}

/** Span of the numbers in `values` whose instant lies within [from, to]; nulls are passed over. */
export function spanWithin(
  at: readonly number[],
  values: readonly (number | null)[],
  from: number,
  to: number,
): ValueSpan | null {
  let low = Infinity;
  let high = -Infinity;
  for (let i = 0; i < at.length; i++) {
    const value = values[i];
    if (value === null || at[i] < from || at[i] > to) continue;
    if (value < low) low = value;
    if (value > high) high = value;
  }
  return low <= high ? { low, high } : null;
}

/** Ends of a value axis: the span with a margin on both sides, never narrower than `leastHeight`; ±1 when nothing is drawn. */
export function axisEnds(span: ValueSpan | null, leastHeight: number): [low: number, high: number] {
  if (span === null) return [-1, 1];
  const height = Math.max(span.high - span.low, leastHeight, Number.EPSILON * Math.abs(span.high));
  const middle = (span.low + span.high) / 2;
  const half = (height > 0 ? height : 1) * (0.5 + PADDING_SHARE);
  return [middle - half, middle + half];
}
