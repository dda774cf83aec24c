import { readFileSync } from 'node:fs';
import { join } from 'node:path';

/** A committed file of reference values (fixtures/reference/PROVENANCE.md says how it was made). */
export const referenceFile = <T>(name: string): T =>
  JSON.parse(readFileSync(join(__dirname, '..', '..', '..', 'fixtures', 'reference', name), 'utf8')) as T;

/** Largest absolute difference, as a share of a scale. */
export function largestMiss(found: readonly (number | null)[], wanted: readonly number[], scale: number): number {
  if (found.length !== wanted.length) return Infinity;
  return Math.max(...wanted.map((value, i) => (found[i] === null ? Infinity : Math.abs(found[i] - value) / scale)));
}

export const rangeOf = (values: readonly number[]): number => Math.max(...values) - Math.min(...values);
