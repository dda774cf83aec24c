import { columnLetters } from '../container/cell-names';
import type { ChannelContext, ColumnRole } from '../types';
import type { ChannelNames } from './channel-names';
import type { Findings } from './findings';
import type { Header } from './header';
import type { HeaderColumn } from './header-cell';
import { isSameUnit } from './names';
import type { ColumnHabits } from './values';

export interface ValueColumn {
  column: number;
  letters: string;
  /** Null where each row names its channel. */
  channel: ChannelContext | null;
  /** The reading's position where its column gives one. */
  position: string | null;
  unit: string | null;
  isDeviation: boolean;
  habits: ColumnHabits;
}

/** A day that a sheet gives for all its rows, in a title or in its name. */
export interface SheetDay {
  /** Its midnight on the sheet's clocks, in milliseconds as if it were UTC. */
  localMs: number;
  /** Where it stands: 'cell B2', 'the sheet\'s name'. */
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
  /** For times without a date; null where neither a title nor the sheet's name gives a day. */
  day: SheetDay | null;
  /** The header says UTC or GMT, so the plant's zone does not apply. */
  isUtc: boolean;
}

/** Settles what a sheet's columns are for, and says what is missing, contradictory or not used. */
export function resolveLayout(sheet: string, header: Header, channels: ChannelNames, findings: Findings): SheetLayout {
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
    day: null,
    isUtc: /^(utc|gmt|z)$/i.test(time?.unit ?? ''),
  };
  layout.values = isLong
    ? longValues(layout, all('value'), channels, findings)
    : wideValues(layout, findings, channels);
  if (layout.channelColumns.length === 0 && layout.values.length > 1) layout.kind = 'wide';
  sayWhatIsMissing(layout, channels, findings);
  return layout;
}

function longValues(
  { sheet, header, channelColumns }: SheetLayout,
  columns: HeaderColumn[],
  channels: ChannelNames,
  findings: Findings,
): ValueColumn[] {
  const channel = channelColumns.length > 0 ? null : (channels.findOne(sheet) ?? channels.only() ?? null);
  if (!channel && channelColumns.length === 0) {
    findings.add(
      'blocking',
      'no-channel-column',
      { sheet, row: header.row },
      () =>
        `has a column of values but none that names the channel; add one headed "Characteristic", or name the sheet after the channel (${channels.list()})`,
    );
  }
  return columns
    .filter((column) => !channel || isUnitRight(sheet, header.row, column, channel, findings))
    .map((column) => toValueColumn(column, channel));
}

function wideValues({ sheet, header }: SheetLayout, findings: Findings, channels: ChannelNames): ValueColumn[] {
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
    if (!isUnitRight(sheet, header.row, column, channel, findings)) continue;
    values.push(toValueColumn(column, channel));
  }
  return values;
}

const toValueColumn = (
  { column, unit, position, isDeviation }: HeaderColumn,
  channel: ChannelContext | null,
): ValueColumn => ({
  column,
  letters: columnLetters(column),
  channel,
  position,
  unit,
  isDeviation,
  habits: { sawDecimalComma: false },
});

function isUnitRight(
  sheet: string,
  row: number,
  column: HeaderColumn,
  channel: ChannelContext,
  findings: Findings,
): boolean {
  if (column.unit === null || isSameUnit(column.unit, channel.unit)) return true;
  findings.add(
    'blocking',
    'unit-differs',
    { sheet, row, column: column.column },
    () =>
      `gives "${column.name}" in ${column.unit}, but the channel "${channel.name}" is in ${channel.unit || 'no unit'}; values are not converted, so store them in ${channel.unit || 'no unit'} and say so in the header`,
  );
  return false;
}

function sayWhatIsMissing(layout: SheetLayout, channels: ChannelNames, findings: Findings): void {
  const { sheet, header } = layout;
  const place = { sheet, row: header.row };
  if (!layout.time && !layout.date) {
    findings.add(
      'blocking',
      'no-time-column',
      place,
      () => 'has no column headed "Time" (or "Date" and "Time"); add one',
    );
  }
  if (!layout.lot) findings.add('blocking', 'no-lot-column', place, () => 'has no column headed "Lot"; add one');
  if (!layout.product) {
    findings.add(
      'notice',
      'no-product-column',
      place,
      () => 'has no column headed "Product", so no lot on it names its product',
    );
  }
  if (
    layout.values.length === 0 &&
    !header.columns.some((column) => column.role === 'channel_values' || column.role === 'value')
  ) {
    findings.add(
      'blocking',
      'no-value-column',
      place,
      () =>
        `has no column of values; head one "Value" beside one headed "Characteristic", or head columns with the line's channels (${channels.list()})`,
    );
  }
  for (const column of header.columns.filter((one) => one.isUnknown)) {
    findings.add(
      'notice',
      'column-not-used',
      { ...place, column: column.column },
      () =>
        `is headed "${column.header}", which is no channel of this line and no other column that is read, so the column is not used`,
    );
  }
}
