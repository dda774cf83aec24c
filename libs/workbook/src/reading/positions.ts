import { foldName } from './names';

/** What a header numbers: readings of a row, places of a part or a tool, or something else by its name. */
export interface NumberedName {
  kind: 'reading' | 'place' | 'other';
  /** What stands before the number. */
  of: string;
  position: string;
}

const folded = (names: string): Set<string> => new Set(names.split(', ').map(foldName));
const READING = folded(
  'value, reading, measurement, measured value, actual, actual value, wert, messwert, messung, ist, istwert',
);
const PLACE = folded(
  'sample, samples, specimen, pos, position, point, measuring point, location, cavity, cav, nest, spindle, lane, track, zone, head, piece, part, x, n, m, no, nr, probe, stück, stueck, teil, messpunkt, punkt, kavität, kavitaet, spur, bahn, spindel, kopf, stelle',
).add('');

/**
 * Takes a header such as "Reading 3", "Cavity 07", "x1", "Coat weight #2" or "4" apart.
 *
 * @returns null where it does not end in a number of at most three digits
 */
export function positionOf(text: string): NumberedName | null {
  const match = /^(.*?)[\s.:_#(-]*?0*(\d{1,3})\)?$/u.exec(text.trim());
  if (!match || /\d[.,]?$/.test(match[1])) return null;
  const of = foldName(match[1]);
  const kind = READING.has(of) ? 'reading' : PLACE.has(of) ? 'place' : 'other';
  return { kind, of: match[1].trim(), position: match[2] };
}
