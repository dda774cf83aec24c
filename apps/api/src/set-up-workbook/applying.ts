import type { Transaction } from '@app/data';
import { identityOf, type RowComparison, type SetUpDocument, type SheetKey, titleOf } from '@app/workbook';
import type { Change } from '../set-up/change';
import type { PresentSetUp } from './present-set-up';
import type { RowProblems } from './row-problems';

/** One workbook on its way into a set-up. */
export interface Applying {
  change: Change;
  fileName: string;
  present: PresentSetUp;
  wanted: SetUpDocument;
  rows: RowProblems;
  /** Jobs and mails that are owed once the transaction stands. */
  owedJobIds: number[];
  mailIds: number[];
}

/** The id of what a row names; undefined when its own row was refused, which is told there. */
export const idOf = ({ present }: Applying, sheet: SheetKey, named: object): number | undefined =>
  present.ids[sheet].get(identityOf(sheet, named));

/** Adds or changes rows of a sheet one by one; a row that names something retired is refused. */
export async function eachRow<K extends SheetKey>(
  applying: Applying,
  sheet: K,
  comparisons: RowComparison[],
  field: string,
  work: {
    add(tx: Transaction, row: SetUpDocument[K][number], index: number): Promise<number | undefined>;
    change(tx: Transaction, id: number, row: SetUpDocument[K][number], comparison: RowComparison): Promise<unknown>;
  },
): Promise<void> {
  const { present, rows, wanted } = applying;
  for (const comparison of comparisons) {
    if (comparison.kind === 'unchanged') continue;
    const row = wanted[sheet][comparison.index] as SetUpDocument[K][number];
    const key = identityOf(sheet, row);
    if (present.retired[sheet].has(key)) {
      const what = `${titleOf(sheet, row)} is retired.`;
      const whatToDo = 'Bring it back into use on its own page first, or delete the row.';
      rows.say(sheet, comparison.index, field, 'retired', { what, whatToDo });
      continue;
    }
    const known = present.ids[sheet].get(key);
    const id = await rows.attempt(sheet, comparison.index, field, async (tx) => {
      if (known === undefined) return work.add(tx, row, comparison.index);
      await work.change(tx, known, row, comparison);
      return known;
    });
    if (id !== undefined) present.ids[sheet].set(key, id);
  }
}

/** Only the fields that differ. */
export function pickFields<T extends object>(row: T, fields: readonly string[]): Partial<T> {
  return Object.fromEntries(Object.entries(row).filter(([key]) => fields.includes(key))) as Partial<T>;
}
