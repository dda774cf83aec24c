import { columnLetters } from '../container/cell-names';
import type { SheetFacts } from '../container/sheet-rows';
import type { Findings } from './findings';
import type { HeaderColumn } from './header-cell';

export interface ReadSheet {
  sheet: string;
  isHidden: boolean;
  /** Null where nothing on it was read. */
  headerRow: number | null;
  columns: readonly HeaderColumn[];
  hiddenRows: number;
}

/** Says what of a sheet was merged, and what was hidden and read all the same. */
export function sayOfSheet(read: ReadSheet, { mergedUntil, hiddenColumns }: SheetFacts, findings: Findings): void {
  const { sheet, isHidden, headerRow, hiddenRows } = read;
  if (headerRow === null) return;
  const notice = (code: string, say: () => string): void => findings.add('notice', code, { sheet }, say);
  const merged = mergedUntil.filter((row) => row > headerRow).length;
  if (merged > 0) {
    notice(
      'merged-cells',
      () =>
        `has merged cells below its header (${merged}); only the first cell of each area holds its content, the others are read as blank`,
    );
  }
  if (hiddenRows > 0) {
    notice('hidden-rows-read', () => `has hidden or filtered rows (${hiddenRows}); they were read like the others`);
  }
  const columns = hiddenOf(read.columns, hiddenColumns);
  if (columns.length > 0) {
    notice('hidden-columns-read', () => `has hidden columns that are read like the others (${columns.join(', ')})`);
  }
  if (isHidden) notice('hidden-sheet-read', () => 'is hidden; it was read like the others');
}

/** Letters of the hidden columns that are used. */
function hiddenOf(columns: readonly HeaderColumn[], hiddenColumns: SheetFacts['hiddenColumns']): string[] {
  const used = columns.filter(({ role }) => role !== 'ignored');
  const hidden = used.filter(({ column }) => hiddenColumns.some(({ from, to }) => column >= from && column <= to));
  return [...new Set(hidden.map(({ column }) => columnLetters(column)))];
}
