import type { SetUpPlaces, SheetKey } from './document';

/** A row as far as it could be read: a field that could not is undefined. */
export type LooseRow = Record<string, unknown>;
export type LooseDocument = Partial<Record<SheetKey, LooseRow[]>>;

/** What a check says and where. */
export type Say = (sheet: SheetKey, index: number, field: string, code: string, what: string, whatToDo: string) => void;

/** The cell of a row's field in the workbook that was read, such as "B4". */
export function cellOf(places: SetUpPlaces, sheet: SheetKey, index: number, field: string): string {
  const { rows, columns } = places[sheet];
  return `${columns[field] ?? 'A'}${rows[index] ?? 2}`;
}
