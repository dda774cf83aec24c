import type { SetUpDocument, SheetKey } from './document';
import { SHEETS, sheetOf } from './sheets';

/** One row of the workbook against what is there. */
export interface RowComparison {
  /** Of the row in the wanted document. */
  index: number;
  kind: 'added' | 'changed' | 'unchanged';
  /** Fields that differ, where there is such a thing already. */
  fields: string[];
  /** Of the row in the present document. */
  presentIndex: number | null;
}

export interface SheetComparison {
  sheet: SheetKey;
  rows: RowComparison[];
  /** Rows of the present document that the workbook does not name; they stay. */
  left: number[];
}

/** Excel shows 15 digits, and some programs store no more. */
const RELATIVE_TOLERANCE = 1e-14;

/** The fields that name a row, as one text. */
export const identityOf = (sheet: SheetKey, row: object): string =>
  JSON.stringify(sheetOf(sheet).identity.map((field) => (row as Record<string, unknown>)[field]));

/**
 * What a workbook would change of a set-up. Rows are matched by what names them; the plant's one row matches whatever it is called.
 *
 * @param present what is there
 * @param wanted what the workbook says
 */
export function compareSetUps(present: SetUpDocument, wanted: SetUpDocument): SheetComparison[] {
  return SHEETS.map(({ key, columns }) => {
    const old = new Map(present[key].map((row, index) => [identityOf(key, row), { row, index }]));
    const named = new Set<number>();
    const rows = wanted[key].map((row, index): RowComparison => {
      const known = old.get(identityOf(key, row));
      if (!known) return { index, kind: 'added', fields: [], presentIndex: null };
      named.add(known.index);
      const fields = columns
        .map((column) => column.key)
        .filter((field) => !isSame(valueOf(known.row, field), valueOf(row, field)));
      return { index, kind: fields.length > 0 ? 'changed' : 'unchanged', fields, presentIndex: known.index };
    });
    return { sheet: key, rows, left: present[key].map((_, index) => index).filter((index) => !named.has(index)) };
  });
}

const valueOf = (row: object, field: string): unknown => (row as Record<string, unknown>)[field];

function isSame(one: unknown, other: unknown): boolean {
  if (Array.isArray(one) && Array.isArray(other))
    return one.length === other.length && one.every((item) => other.includes(item));
  if (typeof one === 'number' && typeof other === 'number')
    return Math.abs(one - other) <= RELATIVE_TOLERANCE * Math.max(Math.abs(one), Math.abs(other));
  return one === other;
}
