import type { Choice, ColumnRole } from '../answers';
import { columnLetters } from '../container/cell-names';
import type { LayoutParts, SheetLayout } from './sheet-layout';

const MAX_CHOICES = 6;

/** Says which columns a sheet lacks, and asks which of those that are not used it may be. */
export function sayWhatIsMissing(layout: SheetLayout, { channels, findings, questions }: LayoutParts): void {
  const { sheet, header, titles } = layout;
  const place = { sheet, row: header.row };
  const ask = (code: string, text: string, ...roles: ColumnRole[]): void =>
    questions.ask(code, place, text, 0, choicesFor(layout, roles));
  if (!layout.time && !layout.date) {
    ask('no-time-column', 'has no column headed "Time" (or "Date" and "Time"); which one is it?', 'time');
  }
  if (!layout.lot && !titles.lot) {
    ask('no-lot-column', 'has no column headed "Lot", and no title that gives the lot; which one is it?', 'lot');
  }
  if (!layout.product && !titles.product) {
    findings.add(
      'notice',
      'no-product-column',
      place,
      () => 'has no column headed "Product", so no lot on it names its product',
    );
  }
  const roles = header.columns.map((column) => column.role);
  if (layout.values.length === 0 && !roles.includes('channel_values') && !roles.includes('value')) {
    ask(
      'no-value-column',
      `has no column of values (the line's channels: ${channels.list()}); which one is it?`,
      'value',
    );
  }
  const aside = header.columns.filter((column) => column.block < 0);
  if (aside.length > 0) {
    findings.add(
      'notice',
      'side-table-not-used',
      { ...place, column: aside[0].column },
      () =>
        'begins another table beside the first, which has no lots of its own, so it is not used; give it a column "Lot", or move it to a sheet of its own',
    );
  }
  for (const column of header.columns.filter((one) => one.isUnknown)) {
    findings.add(
      'notice',
      'column-not-used',
      { ...place, column: column.column },
      () =>
        `is headed "${column.header}", which is no channel of this line and no other column that is read, so the column is not used`,
    );
  }
}

/** The columns without a use, each in the role that is lacking, and leaving the sheet out. */
function choicesFor({ sheet, header }: SheetLayout, roles: ColumnRole[]): Choice[] {
  const free = header.columns.filter(
    ({ role, header: text, block }) => role === 'ignored' && text !== '' && block >= 0,
  );
  const columns = [...free.filter((one) => one.isUnknown), ...free.filter((one) => !one.isUnknown)];
  const taken = columns.slice(0, MAX_CHOICES).flatMap(({ column, header: text }) =>
    roles.map((role) => ({
      label: `Column ${columnLetters(column)}, "${text}"`,
      answers: { sheets: { [sheet]: { columns: { [columnLetters(column)]: { role } } } } },
    })),
  );
  return [...taken, leaveOut(sheet)];
}

/** The choice of reading nothing on a sheet. */
export const leaveOut = (sheet: string): Choice => ({
  label: 'Nothing on this sheet is read',
  answers: { sheets: { [sheet]: { headerRow: null } } },
});
