import type { ChannelNames } from './channel-names';
import { plainColumn, recogniseText, type HeaderColumn } from './header-cell';
import { positionOf } from './positions';

const isValues = ({ role }: HeaderColumn): boolean => role === 'channel_values' || role === 'value';
/** A role of its own, apart from values: time, lot, product … */
const isOther = (column: HeaderColumn): boolean => column.role !== 'ignored' && !isValues(column);

/**
 * Joins two header rows: names over positions ("Coat weight" over 1, 2, 3), places over names ("Cavity 1" over
 * "Diameter", "Length"), or names split over both. A text of the upper row reaches to the right over blank cells, as a
 * merged title does, until a column of another kind begins.
 *
 * @param upper texts by column number from 1
 * @param lower the same of the row below
 * @returns the columns, or null where the rows do not belong together
 */
export function joinTexts(
  upper: readonly (string | null)[],
  lower: readonly (string | null)[],
  channels: ChannelNames,
): HeaderColumn[] | null {
  const columns: HeaderColumn[] = [];
  const over: string[] = [];
  let reaching: HeaderColumn | null = null;
  for (let column = 1; column < Math.max(upper.length, lower.length); column += 1) {
    const [above, below] = [upper[column] ?? null, lower[column] ?? null];
    if (above === null && below === null) reaching = null;
    if (above !== null) reaching = recogniseText(above, column, channels);
    if (below === null) {
      if (above !== null) columns.push({ ...reaching! });
      continue;
    }
    const own = recogniseText(below, column, channels);
    if (reaching === null) {
      columns.push(own);
      continue;
    }
    const both = recogniseText(`${reaching.header} ${below}`, column, channels);
    const joined = join(reaching, own, both);
    if (joined === null) return null;
    if (above === null && joined === own && isOther(own)) reaching = null;
    if (joined !== own || isValues(own)) over[column] = reaching?.header ?? '';
    columns.push(joined);
  }
  nameByUpper(columns, over);
  return columns;
}

/** What a lower text means under an upper one; null where a header has nothing like it. */
function join(upper: HeaderColumn, own: HeaderColumn, both: HeaderColumn): HeaderColumn | null {
  if (!both.isUnknown) return both;
  if (isValues(upper)) {
    if (isOther(own) || (own.role === 'ignored' && !own.isUnknown)) return own;
    if (own.role === 'channel_values') return { ...own, header: both.header, position: own.position ?? upper.position };
    const bracketed = /^[[(](.+)[\])]$/.exec(own.header);
    if (bracketed) return { ...upper, column: own.column, unit: upper.unit ?? bracketed[1] };
    const position = own.position ?? positionOf(own.header)?.position ?? own.header;
    return { ...upper, column: own.column, header: both.header, position };
  }
  if (isOther(upper)) return own.isUnknown ? null : own;
  if (own.role === 'channel_values') return { ...own, header: both.header, position: own.position ?? upper.position };
  return own.isUnknown ? plainColumn(own.column, both.header) : own;
}

/** Where one channel stands under several upper texts without a number, those texts are its positions. */
function nameByUpper(columns: HeaderColumn[], over: readonly string[]): void {
  const groups = new Map<number, HeaderColumn[]>();
  for (const column of columns) {
    if (column.role !== 'channel_values' || column.position !== null || !over[column.column]) continue;
    groups.set(column.channelId!, [...(groups.get(column.channelId!) ?? []), column]);
  }
  for (const group of groups.values()) {
    if (group.length > 1) for (const column of group) column.position = over[column.column];
  }
}
