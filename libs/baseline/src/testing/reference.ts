import { readFileSync } from 'node:fs';
import { join } from 'node:path';

/** A file of fixtures/reference (see its PROVENANCE.md). */
export function reference<T>(name: string): T {
  return JSON.parse(readFileSync(join(__dirname, '../../../../fixtures/reference', name), 'utf8')) as T;
}

/** Largest absolute difference of two lists of the same length; NaN is not overlooked. */
export function worstDifference(actual: ArrayLike<number>, expected: ArrayLike<number>): number {
  expect(actual).toHaveLength(expected.length);
  let worst = 0;
  for (let i = 0; i < expected.length; i++) {
    const difference = Math.abs(actual[i] - expected[i]);
    if (!(difference <= worst)) worst = difference;
    if (Number.isNaN(worst)) return NaN;
  }
  return worst;
}

/** Largest minus smallest. */
export function rangeOf(x: ArrayLike<number>): number {
  return Array.from(x).reduce((a, b) => Math.max(a, b)) - Array.from(x).reduce((a, b) => Math.min(a, b));
}
