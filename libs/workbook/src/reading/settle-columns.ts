import type { ColumnRole } from '../types';
import type { HeaderColumn } from './header-cell';

/** Roles in which a second column would contradict the first. */
export const SINGLE: ColumnRole[] = [
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

/**
 * Settles what columns mean beside each other: tables side by side, times, numbered readings, and roles that only one
 * column of a table may have.
 */
export function settleColumns(columns: HeaderColumn[]): HeaderColumn[] {
  numberBlocks(columns);
  for (const block of new Set(columns.map((column) => column.block))) {
    const own = columns.filter((column) => column.block === block);
    if (block < 0) for (const column of own) setAside(column);
    else settleBlock(own);
  }
  return columns;
}

function setAside(column: HeaderColumn): void {
  column.role = 'ignored';
  column.channelId = null;
  column.isUnknown = false;
}

function settleBlock(columns: HeaderColumn[]): void {
  settleTime(columns);
  settlePositions(columns);
  for (const role of SINGLE) {
    for (const again of columns.filter((one) => one.role === role).slice(1)) {
      again.role = 'ignored';
      again.isUnknown = true;
    }
  }
}

const TIMES: ColumnRole[] = ['time', 'date', 'time_of_day'];
const has = (columns: readonly HeaderColumn[], ...roles: ColumnRole[]): boolean =>
  columns.some((column) => roles.includes(column.role));
const hasValues = (columns: readonly HeaderColumn[]): boolean =>
  has(columns, 'value', 'channel_values') || columns.filter((column) => column.isPositionAlone).length > 1;

/**
 * Finds tables side by side: after an empty column, columns that repeat a time of the table before and have values. They
 * are a table by themselves when they have a lot too, or when the table before has none either.
 */
function numberBlocks(columns: HeaderColumn[]): void {
  let block = 0;
  let table: HeaderColumn[] = [];
  for (const group of groupsOf(columns)) {
    const repeats = TIMES.some((role) => has(group, role) && has(table, role));
    const isApart = repeats && hasValues(group) && hasValues(table);
    const isWhole = has(group, 'lot') || !has(table, 'lot');
    if (isApart && isWhole) {
      block += 1;
      table = [];
    }
    for (const column of group) column.block = isApart && !isWhole ? -1 : block;
    if (!isApart || isWhole) table.push(...group);
  }
}

/** Runs of columns without an empty one between. */
function groupsOf(columns: readonly HeaderColumn[]): HeaderColumn[][] {
  const groups: HeaderColumn[][] = [];
  for (const column of columns) {
    const before = groups.at(-1)?.at(-1);
    if (before && before.column === column.column - 1) groups.at(-1)!.push(column);
    else groups.push([column]);
  }
  return groups;
}

/** "Time" beside "Date" is the time of day; alone, either holds both. */
function settleTime(columns: HeaderColumn[]): void {
  const [hasStamp, hasDate, hasClock] = [has(columns, 'time'), has(columns, 'date'), has(columns, 'time_of_day')];
  for (const column of columns) {
    if (column.role !== 'date' && column.role !== 'time_of_day') continue;
    if (hasStamp) column.role = 'ignored';
    else if (!(hasDate && hasClock)) column.role = 'time';
  }
}

/** "1", "2", "3" or "Cavity 1", "Cavity 2" are readings of a row where no other column holds values. */
function settlePositions(columns: HeaderColumn[]): void {
  const numbered = columns.filter((column) => column.isPositionAlone && column.role === 'ignored');
  if (has(columns, 'value', 'channel_values') || numbered.length < 2) return;
  for (const column of numbered) {
    column.role = 'value';
    column.isUnknown = false;
  }
}
