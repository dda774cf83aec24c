import type { Cell } from '../container/sheet-rows';
import type { ColumnRole } from '../types';
import type { ChannelNames } from './channel-names';
import { foldName, splitUnit } from './names';
import { positionOf } from './positions';
import { meaningOf, type HeaderMeaning } from './synonyms';

/** A column of a header as recognised; several may have one role. */
export interface HeaderColumn {
  /** From 1. */
  column: number;
  header: string;
  name: string;
  unit: string | null;
  role: ColumnRole;
  /** In the role `channel`: whether it names the characteristic or the gauge. */
  isGauge: boolean;
  channelId: number | null;
  /** Of a column of values: the position, cavity or number of the reading within its row. */
  position: string | null;
  /** Named by a position alone ("Cavity 2", "3"): values only beside others like it. */
  isPositionAlone: boolean;
  /** In the role of values: they are deviations from the nominal value. */
  isDeviation: boolean;
  /** Neither a role nor one of the ordinary columns that are not used. */
  isUnknown: boolean;
  /** Of tables that stand side by side: the table's number from 0; -1 in one that cannot be read by itself. */
  block: number;
}

const ROLE: Record<HeaderMeaning, ColumnRole> = {
  stamp: 'time',
  date: 'date',
  clock: 'time_of_day',
  lot: 'lot',
  product: 'product',
  characteristic: 'channel',
  gauge: 'channel',
  value: 'value',
  unit: 'unit',
  serial: 'serial',
  position: 'position',
  quantity: 'quantity',
  remark: 'remark',
  known: 'ignored',
};
const FIRST: HeaderMeaning[] = ['stamp', 'date', 'clock', 'lot'];

/** What a header cell says: its text, or a small whole number that numbers a reading; null for any other cell. */
export function headerText(cell: Cell | undefined): string | null {
  if (cell?.kind === 'text') return cell.text.replace(/\s+/g, ' ').trim().slice(0, 200) || null;
  const isNumbering =
    cell?.kind === 'number' &&
    !cell.format.isDate &&
    !cell.format.isPercent &&
    Number.isInteger(cell.number) &&
    cell.number >= 1 &&
    cell.number <= 999;
  return isNumbering ? String(cell.number) : null;
}

/** A column of which only its header is known. */
export const plainColumn = (column: number, header: string): HeaderColumn => ({
  column,
  header,
  name: header,
  unit: null,
  role: 'ignored',
  isGauge: false,
  channelId: null,
  position: null,
  isPositionAlone: false,
  isDeviation: false,
  isUnknown: true,
  block: 0,
});

/** What one header text may mean by itself. */
export function recogniseText(header: string, column: number, channels: ChannelNames): HeaderColumn {
  const split = splitUnit(header);
  const base = { ...plainColumn(column, header), isUnknown: false };
  const whole = { name: header, unit: null };
  const isNumbered = /^#?\d{1,3}$/.test(split.unit ?? '');
  const readings = split.unit === null || isNumbered ? [whole] : [whole, split];
  for (const { name, unit } of readings) {
    const meaning = meaningOf(foldName(name));
    const channel = meaning && FIRST.includes(meaning) ? undefined : channels.findOne(name);
    if (channel) return { ...base, name, unit, role: 'channel_values', channelId: channel.id };
    if (meaning) return { ...base, name, unit, role: ROLE[meaning], isGauge: meaning === 'gauge' };
  }
  for (const { name, unit } of readings) {
    const found = positionOf(name);
    if (!found) continue;
    const channel = found.of === '' ? undefined : channels.findOne(found.of);
    const numbered = { ...base, name, unit, position: found.position };
    if (channel) return { ...numbered, role: 'channel_values', channelId: channel.id };
    if (found.kind === 'reading') return { ...numbered, role: 'value' };
    if (found.kind === 'place') return { ...numbered, isPositionAlone: true, isUnknown: true };
  }
  return { ...plainColumn(column, header), ...(isNumbered ? whole : split) };
}
