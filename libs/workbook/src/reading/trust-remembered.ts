import type { ColumnAnswer } from '../answers';
import { columnLetters } from '../container/cell-names';
import type { ChannelNames } from './channel-names';
import type { Header } from './header';
import type { Titles } from './titles';

export interface TrustedColumns {
  columns: Record<string, ColumnAnswer>;
  /** Columns whose remembered channel is not used, since the sheet names another. */
  dropped: string[];
}

/**
 * The remembered columns of a header, without the channels that the sheet itself contradicts: sheets of two gauges may
 * have one header, so that a channel remembered for "Value" on the one must not pass for the other's.
 *
 * @param header as recognised, before any answer
 * @param said columns that were spoken of for this workbook; they stand
 */
export function trustRemembered(
  sheet: string,
  header: Header,
  titles: Titles,
  columns: Readonly<Record<string, ColumnAnswer>>,
  said: Readonly<Record<string, ColumnAnswer>>,
  channels: ChannelNames,
): TrustedColumns {
  const named = titles.channels?.value ?? channels.findWithin(sheet);
  const trusted = { ...columns };
  const dropped: string[] = [];
  for (const { column, role } of header.columns) {
    const letters = columnLetters(column);
    const id = trusted[letters]?.channelId;
    if (role !== 'value' || letters in said || id === undefined) continue;
    if (named.size === 0 || named.has(id)) continue;
    delete trusted[letters];
    dropped.push(letters);
  }
  return { columns: trusted, dropped };
}
