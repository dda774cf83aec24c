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

/** Settles what columns mean beside each other: times, numbered readings, and roles that only one may have. */
export function settleColumns(columns: HeaderColumn[]): HeaderColumn[] {
  settleTime(columns);
  settlePositions(columns);
  for (const role of SINGLE) {
    for (const again of columns.filter((one) => one.role === role).slice(1)) {
      again.role = 'ignored';
      again.isUnknown = true;
    }
  }
  return columns;
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

/** "1", "2", "3" or "Cavity 1", "Cavity 2" are readings of a row where no other column holds values. */
function settlePositions(columns: HeaderColumn[]): void {
  const numbered = columns.filter((column) => column.isPositionAlone && column.role === 'ignored');
  const hasValues = columns.some(({ role }) => role === 'channel_values' || role === 'value');
  if (hasValues || numbered.length < 2) return;
  for (const column of numbered) {
    column.role = 'value';
    column.isUnknown = false;
  }
}
