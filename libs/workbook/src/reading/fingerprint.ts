import { createHash } from 'node:crypto';
import { foldName, foldUnit, splitUnit } from './names';

/**
 * The fingerprint of a header: SHA-256 (hex) over its rows' texts in the order of their columns, the row above and the
 * row of units included where the header has them.
 *
 * Each text counts without case, accents, blanks and punctuation; a unit in brackets counts in its own spelling, so that
 * mPa and MPa differ. Blank columns between the texts count, since answers name columns by their letters; those after
 * the last text do not. Titles above the header and the row in which it stands do not count either.
 *
 * @param lines texts by column number from 1, one list a row
 */
export function fingerprintOf(lines: readonly (readonly (string | null)[])[]): string {
  const folded = lines.map((texts) => {
    const parts = Array.from(texts).slice(1).map(foldText);
    while (parts.at(-1) === '') parts.pop();
    return parts;
  });
  return createHash('sha256').update(JSON.stringify(folded)).digest('hex');
}

function foldText(text: string | null | undefined): string {
  if (text == null) return '';
  const { name, unit } = splitUnit(text);
  return unit === null ? foldName(text) : `${foldName(name)} ${foldUnit(unit)}`;
}
