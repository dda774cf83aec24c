import { columnLetters } from '../container/cell-names';
import type { ChannelContext, ColumnRole } from '../types';
import { channelOfSheet } from './channel-of-sheet';
import { isUnitRight } from './column-units';
import type { Findings } from './findings';
import type { Header } from './header';
import type { HeaderColumn } from './header-cell';
import type { ChannelNames } from './channel-names';
import { sayWhatIsMissing } from './missing-columns';
import type { Questions } from './questions';
import { dayOfSheet } from './sheet-day';
import type { Titles } from './titles';

export interface ValueColumn {
  column: number;
  letters: string;
  /** Null where each row names its channel. */
  channel: ChannelContext | null;
  /** The reading's position where its column gives one. */
  position: string | null;
  unit: string | null;
  isDeviation: boolean;
}

/** A day that a sheet gives for all its rows, in a title or in its name. */
export interface SheetDay {
  /** Its midnight on the sheet's clocks, in milliseconds as if it were UTC. */
  localMs: number;
  /** Where it stands: 'cell B2', 'the sheet's name'. */
  from: string;
  /** It is the day on which a night shift began: times after midnight belong to the next. */
  isShiftDate: boolean;
}

/** Where a sheet's rows have what. Columns are numbered from 1. */
export interface SheetLayout {
  sheet: string;
  kind: 'long' | 'wide';
  header: Header;
  time?: HeaderColumn;
  date?: HeaderColumn;
  clock?: HeaderColumn;
  lot?: HeaderColumn;
  product?: HeaderColumn;
  unit?: HeaderColumn;
  serial?: HeaderColumn;
  position?: HeaderColumn;
  quantity?: HeaderColumn;
  channelColumns: HeaderColumn[];
  values: ValueColumn[];
  /** What the titles above the header give for every row without its own. */
  titles: Titles;
  /** For times without a date; null where neither a title nor the sheet's name gives a day. */
  day: SheetDay | null;
  /** The header says UTC or GMT, so the plant's zone does not apply. */
  isUtc: boolean;
}

export interface LayoutParts {
  channels: ChannelNames;
  findings: Findings;
  questions: Questions;
}

/** Settles what a sheet's columns are for, and says what is missing, contradictory or not used. */
export function resolveLayout(sheet: string, header: Header, titles: Titles, parts: LayoutParts): SheetLayout {
  const first = (role: ColumnRole): HeaderColumn | undefined => header.columns.find((column) => column.role === role);
  const all = (role: ColumnRole): HeaderColumn[] => header.columns.filter((column) => column.role === role);
  const isLong = all('value').length > 0 && (all('channel').length > 0 || all('channel_values').length === 0);
  for (const column of all(isLong ? 'channel_values' : 'value')) {
    column.role = 'ignored';
    column.channelId = null;
    column.isUnknown = true;
  }
  const time = first('time') ?? first('date');
  const layout: SheetLayout = {
    sheet,
    kind: isLong ? 'long' : 'wide',
    header,
    time: first('time'),
    date: first('date'),
    clock: first('time_of_day'),
    lot: first('lot'),
    product: first('product'),
    unit: first('unit'),
    serial: first('serial'),
    position: first('position'),
    quantity: first('quantity'),
    channelColumns: isLong ? all('channel') : [],
    values: [],
    titles,
    day: dayOfSheet(sheet, titles),
    isUtc: /^(utc|gmt|z)$/i.test(time?.unit ?? ''),
  };
  layout.values = isLong ? longValues(layout, all('value'), parts) : wideValues(layout, parts);
  if (layout.channelColumns.length === 0 && layout.values.length > 1) layout.kind = 'wide';
  sayWhatIsMissing(layout, parts);
  return layout;
}

function longValues(layout: SheetLayout, columns: HeaderColumn[], parts: LayoutParts): ValueColumn[] {
  const { channelColumns, titles } = layout;
  const channel = channelColumns.length > 0 ? null : channelOfSheet(layout, columns, parts);
  return columns
    .map((column) => toValueColumn(column, channel, titles))
    .filter((source) => !channel || isUnitRight(layout, source, channel, parts));
}

function wideValues(layout: SheetLayout, parts: LayoutParts): ValueColumn[] {
  const { channels, findings } = parts;
  const { sheet, header, titles } = layout;
  const seen = new Map<string, HeaderColumn>();
  const values: ValueColumn[] = [];
  for (const column of header.columns) {
    if (column.role !== 'channel_values') continue;
    const channel = channels.get(column.channelId!);
    const key = `${channel.id} ${column.position ?? ''}`;
    const twin = seen.get(key);
    if (twin) {
      findings.add(
        'blocking',
        'channel-in-two-columns',
        { sheet, row: header.row, column: column.column },
        () =>
          `is headed "${column.header}" and so is "${channel.name}" a second time (first: "${twin.header}"); keep one of the two columns`,
      );
      continue;
    }
    seen.set(key, column);
    const source = toValueColumn(column, channel, titles);
    if (isUnitRight(layout, source, channel, parts)) values.push(source);
  }
  return values;
}

const toValueColumn = (
  { column, unit, position, isDeviation }: HeaderColumn,
  channel: ChannelContext | null,
  titles: Titles,
): ValueColumn => ({
  column,
  letters: columnLetters(column),
  channel,
  position,
  unit: unit ?? titles.unit?.value ?? null,
  isDeviation,
});
