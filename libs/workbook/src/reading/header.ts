import { columnLetters } from '../container/cell-names';
import type { SheetRow } from '../container/sheet-rows';
import type { ColumnRole, RecognisedColumn } from '../types';
import type { ChannelNames } from './channel-names';
import { foldName, splitUnit } from './names';
import { meaningOf, type HeaderMeaning } from './synonyms';

/** A column of a header row as recognised; several may have one role. */
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
  /** Neither a role nor one of the ordinary columns that are not used. */
  isUnknown: boolean;
}

export interface Header {
  row: number;
  columns: HeaderColumn[];
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
/** Roles in which a second column would contradict the first. */
const SINGLE: ColumnRole[] = [
  'time',
  'date',
  'time_of_day',
  'lot',
  'product',
  'unit',
  'serial',
  'position',
  'quantity',
];
const FIRST: HeaderMeaning[] = ['stamp', 'date', 'clock', 'lot'];

/** What the texts of one row mean, if the row is a header. */
export function recogniseRow(row: SheetRow, channels: ChannelNames): Header {
  const columns: HeaderColumn[] = [];
  row.cells.forEach((cell, column) => {
    if (cell?.kind === 'text' && cell.text.trim() !== '') columns.push(recogniseCell(cell.text, column, channels));
  });
  settleTime(columns);
  for (const role of SINGLE) {
    for (const again of columns.filter((one) => one.role === role).slice(1)) {
      again.role = 'ignored';
      again.isUnknown = true;
    }
  }
  return { row: row.number, columns };
}

function recogniseCell(text: string, column: number, channels: ChannelNames): HeaderColumn {
  const header = text.replace(/\s+/g, ' ').trim().slice(0, 200);
  const split = splitUnit(header);
  const base = { column, header, isGauge: false, channelId: null, isUnknown: false };
  const whole = { name: header, unit: null };
  for (const { name, unit } of split.unit === null ? [split] : [whole, split]) {
    const meaning = meaningOf(foldName(name));
    const channel = meaning && FIRST.includes(meaning) ? undefined : channels.findOne(name);
    if (channel) return { ...base, name, unit, role: 'channel_values', channelId: channel.id };
    if (meaning) return { ...base, name, unit, role: ROLE[meaning], isGauge: meaning === 'gauge' };
  }
  return { ...base, ...split, role: 'ignored', isUnknown: true };
}

/** "Time" beside "Date" is the time of day; alone, either holds both. */
function settleTime(columns: HeaderColumn[]): void {
  const has = (role: ColumnRole): boolean => columns.some((column) => column.role === role);
  const [hasStamp, hasDate, hasClock] = [has('time'), has('date'), has('time_of_day')];
  for (const column of columns) {
    if (column.role !== 'date' && column.role !== 'time_of_day') continue;
    if (hasStamp) column.role = 'ignored';
    else if (!(hasDate && hasClock)) column.role = 'time';
  }
}

/** How much a row looks like a header: 0 for one that cannot be. */
export function headerScore({ columns }: Header): number {
  const has = (...roles: ColumnRole[]): number => (columns.some((column) => roles.includes(column.role)) ? 1 : 0);
  const [time, lot, value] = [has('time', 'date'), has('lot'), has('value', 'channel_values')];
  if (time + lot === 0 || time + lot + value + has('channel', 'product') < 2) return 0;
  return 4 * time + 3 * lot + 4 * value + 2 * has('channel') + has('product') + has('serial', 'position', 'quantity');
}

/** Finds the header among a sheet's first rows: the one that looks most like one, the first of equals. */
export function findHeader(rows: readonly SheetRow[], channels: ChannelNames): Header | null {
  let best: Header | null = null;
  let bestScore = 0;
  for (const row of rows) {
    const header = recogniseRow(row, channels);
    const score = headerScore(header);
    if (score > bestScore) [best, bestScore] = [header, score];
  }
  return best;
}

/**
 * Takes the units from a row of units under the header: texts alone, under columns of values, none where time and lot
 * are.
 *
 * @returns whether the row was such a row
 */
export function takeUnitsRow(header: Header, row: SheetRow): boolean {
  const units = new Map<HeaderColumn, string>();
  for (const column of header.columns) {
    const cell = row.cells[column.column];
    if (!cell || cell.text.trim() === '') continue;
    if (cell.kind !== 'text' || cell.text.length > 20 || /^[<>]|^[\d.,]+$/.test(cell.text.trim())) return false;
    if (['channel_values', 'value', 'quantity'].includes(column.role)) units.set(column, cell.text);
    else if (column.role !== 'ignored' && !/^[[(].*[\])]$/.test(cell.text.trim())) return false;
  }
  if (![...units.keys()].some((column) => column.role !== 'quantity')) return false;
  if (![...units.values()].every((text) => isUnitText(text.trim()))) return false;
  for (const [column, text] of units) column.unit ??= text.trim().replace(/^[[(]\s*|\s*[\])]$/g, '');
  return true;
}

const isUnitText = (text: string): boolean =>
  /[\p{L}%°]|^[[(]?[-1][\])]?$/u.test(text) && !/^(n\/?a|k\.?a\.?|ol|ul|over|under|err|fail|ok|nok)$/i.test(text);

export const toRecognised = (sheet: string, column: HeaderColumn): RecognisedColumn => ({
  sheet,
  column: columnLetters(column.column),
  header: column.header,
  unit: column.unit,
  role: column.role,
  channelId: column.channelId,
});
