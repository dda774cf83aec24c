import type { SheetRow } from '../container/sheet-rows';
import type { HeaderColumn } from './header-cell';

/**
 * Takes the units from a row of units under a header: texts alone, under columns of values, none where time and lot are.
 *
 * @returns whether the row was such a row
 */
export function takeUnits(columns: readonly HeaderColumn[], row: SheetRow): boolean {
  const units = new Map<HeaderColumn, string>();
  const byColumn = new Map(columns.map((column) => [column.column, column]));
  for (const [number, cell] of row.cells.entries()) {
    if (!cell || cell.text.trim() === '') {
      if (cell?.kind === 'number') return false;
      continue;
    }
    const text = cell.text.trim();
    if (cell.kind !== 'text' || text.length > 20 || /^[<>]|^[\d.,]+$/.test(text)) return false;
    const column = byColumn.get(number);
    if (!column) continue;
    if (['channel_values', 'value', 'quantity'].includes(column.role)) units.set(column, text);
    else if (column.role !== 'ignored' && !/^[[(].*[\])]$/.test(text)) return false;
  }
  if (![...units.keys()].some((column) => column.role !== 'quantity')) return false;
  if (![...units.values()].every(isUnitText)) return false;
  for (const [column, text] of units) column.unit ??= text.replace(/^[[(]\s*|\s*[\])]$/g, '');
  return true;
}

const isUnitText = (text: string): boolean =>
  /[\p{L}%°]|^[[(]?[-1][\])]?$/u.test(text) && !/^(n\/?a|k\.?a\.?|ol|ul|over|under|err|fail|ok|nok)$/i.test(text);
