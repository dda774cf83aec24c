import type { ArrangedSeries } from '../series/arranged';
import { fileRow } from '../series/series';

/** Names that stand in one warning. */
const MOST_NAMES = 10;

function listNames(names: readonly string[]): string {
  const shown = names.slice(0, MOST_NAMES).join(', ');
  return names.length > MOST_NAMES ? `${shown} and ${names.length - MOST_NAMES} more` : shown;
}

/** How engine lots are called: by their names, or by the file's row where every row is a lot. */
export function lotWords({ lotNames, homeLot, rowOf }: ArrangedSeries, lots: readonly number[]): string {
  if (lotNames.length > 0)
    return `${lots.length === 1 ? 'lot' : 'lots'} ${listNames(lots.map((lot) => lotNames[lot]))}`;
  const wanted = new Set(lots);
  const rows = [...rowOf.keys()].filter((i) => wanted.has(homeLot[i])).map((i) => rowOf[i]);
  rows.sort((a, b) => a - b);
  return `${rows.length === 1 ? 'row' : 'rows'} ${listNames(rows.map((row) => String(fileRow(row))))}`;
}
