import type { SheetGrid } from '../answers';
import { columnLetters } from '../container/cell-names';
import type { Cell, SheetRow } from '../container/sheet-rows';
import { serialToLocal } from './stamps';

const MAX_ROWS = 40;
const MAX_COLUMNS = 60;
const MAX_TEXT = 120;

/** Keeps the first rows of a sheet as texts. */
export class GridTaker {
  readonly rows: SheetGrid['rows'] = [];

  constructor(private readonly dateSystem: 1900 | 1904) {}

  take(row: SheetRow): void {
    if (this.rows.length >= MAX_ROWS) return;
    const cells: Record<string, string> = {};
    for (const [column, cell] of row.cells.entries()) {
      if (cell && column <= MAX_COLUMNS) cells[columnLetters(column)] = shownText(cell, this.dateSystem);
    }
    this.rows.push({ row: row.number, isHidden: row.isHidden, cells });
  }
}

/** A cell as Excel would show it, as far as its format is known; dates are written as 2026-03-02 06:10. */
export function shownText({ kind, number, text, format }: Cell, dateSystem: 1900 | 1904): string {
  if (kind === 'formula-without-result') return '(formula without a result)';
  if (kind !== 'number') return Buffer.from(text.slice(0, MAX_TEXT)).toString();
  if (format.isDate) {
    if (number >= 0 && number < 1) return new Date(Math.round(number * 86_400_000)).toISOString().slice(11, 19);
    const local = serialToLocal(number, dateSystem);
    if (local !== null)
      return new Date(local)
        .toISOString()
        .slice(0, 19)
        .replace('T', ' ')
        .replace(/(:00| 00:00:00)$/, '');
  }
  if (format.isPercent) return `${Number((number * 100).toPrecision(15))} %`;
  if (Number.isInteger(number) && number >= 0) return String(number).padStart(format.zeroFill, '0');
  return String(Number(number.toPrecision(15)));
}
