import { identityOf, type RowComparison, type SetUpDocument } from '@app/workbook';
import { proposeSpecification } from '../set-up/specifications';
import { type Applying, idOf } from './applying';

type Row = SetUpDocument['specifications'][number];
const FIELDS = ['nominal', 'lower', 'upper', 'appliesToIndividuals', 'validFrom'] as const;

/** Whether the rows say the same; an empty time in the workbook says nothing of its own. */
const isSame = (there: Row, wanted: Row): boolean =>
  FIELDS.every((field) => there[field] === wanted[field] || (field === 'validFrom' && wanted.validFrom === null));

/** Proposes what differs from the newest version and from what waits; a row that is as either of both asks for nothing. */
export async function applySpecifications(applying: Applying, comparisons: RowComparison[]): Promise<void> {
  const { change, present, rows, wanted } = applying;
  for (const comparison of comparisons) {
    if (comparison.kind === 'unchanged') continue;
    const { index, presentIndex } = comparison;
    const row = wanted.specifications[index];
    const shown = presentIndex === null ? undefined : present.document.specifications[presentIndex];
    const newest = present.newestVersions.get(identityOf('specifications', row));
    if ([shown, newest].some((there) => there && isSame(there, row))) {
      comparison.kind = 'unchanged';
      continue;
    }
    const isPending = shown !== undefined && (newest === undefined || !isSame(newest, shown));
    if (shown && !isPending && shown.validFrom === row.validFrom) {
      rows.say('specifications', index, 'validFrom', 'valid-from-kept', {
        what: 'The values differ from those that are there, but Valid from is still the same.',
        whatToDo: 'Write from when the new values hold, or empty the cell: then they hold from the import on.',
      });
      continue;
    }
    const productId = idOf(applying, 'products', { code: row.product });
    const characteristicId = idOf(applying, 'characteristics', { name: row.characteristic });
    if (productId === undefined || characteristicId === undefined) continue;
    const { nominal, lower, upper, appliesToIndividuals } = row;
    const validFrom = (row.validFrom === null ? change.at : new Date(row.validFrom)).toISOString();
    const reason = `From the workbook ${applying.fileName}.`;
    const body = { productId, characteristicId, nominal, lower, upper, appliesToIndividuals, validFrom, reason };
    await rows.attempt('specifications', index, 'product', (tx) => proposeSpecification(tx, change, body));
  }
}
