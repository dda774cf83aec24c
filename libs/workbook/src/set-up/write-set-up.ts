import { Workbook, type Worksheet } from 'exceljs';
import { IANAZone } from 'luxon';
import { ROLE_NAMES, type Role } from '@app/contracts';
import { columnLetters } from '../container/cell-names';
import { ZoneClock } from '../reading/zone-clock';
import { joinList } from './cell-values';
import type { SetUpDocument } from './document';
import { addExplanation } from './explanation-sheet';
import { MAX_ROWS } from './read-sheets';
import { type CellStyle, type ColumnDefinition, headerOf, type SheetDefinition, sheetOf, SHEETS } from './sheets';
import { escapeText } from './texts';

const FORMATS: Record<CellStyle, string> = {
  text: '@',
  list: '@',
  roles: '@',
  yes_no: '@',
  number: 'General',
  clock: 'hh:mm',
  day: 'yyyy-mm-dd',
  stamp: 'yyyy-mm-dd hh:mm:ss',
};
const MINUTE = 60_000;
/** Rows below the last one for which cells offer their choices. */
const ROOM = 200;
/** Excel's day 0 as the library counts it. */
const DAY_ZERO = Date.UTC(1899, 11, 30);

/**
 * Writes a set-up as an .xlsx file: a sheet that explains every column, then one sheet each with real numbers, dates and times, a frozen
 * header, filters, and lists to choose from where a cell names something of another sheet. Instants stand as the plant's wall clock.
 *
 * @returns the file's bytes; `readSetUp` gives the same document back
 * @throws RangeError when the plant's zone is no IANA zone
 */
export async function writeSetUp(document: SetUpDocument): Promise<Buffer> {
  const timeZone = document.plant[0]?.timeZone ?? 'UTC';
  const zone = new ZoneClock(timeZone);
  const offsets = IANAZone.create(timeZone);
  const localOf = (at: number): Date | string => {
    const local = at + offsets.offset(at) * MINUTE;
    return zone.instantsOf(local).length === 1 && Number.isInteger(at) ? new Date(local) : new Date(at).toISOString();
  };
  const book = new Workbook();
  addExplanation(book, document.plant[0]?.name ?? 'a new plant', timeZone);
  for (const definition of SHEETS) {
    const sheet = book.addWorksheet(definition.name, { views: [{ state: 'frozen', ySplit: 1 }] });
    sheet.columns = definition.columns.map((column) => ({
      header: headerOf(column),
      width: Math.max(column.width, headerOf(column).length + 4),
      style: { numFmt: FORMATS[column.style] },
    }));
    sheet.getRow(1).font = { bold: true };
    const rows = document[definition.key] as unknown as Record<string, unknown>[];
    for (const row of rows) sheet.addRow(definition.columns.map((column) => toCell(row[column.key], column, localOf)));
    sheet.autoFilter = { from: { row: 1, column: 1 }, to: { row: rows.length + 1, column: definition.columns.length } };
    offerChoices(sheet, definition, rows.length);
  }
  return Buffer.from(await book.xlsx.writeBuffer());
}

function toCell(
  value: unknown,
  { style }: ColumnDefinition,
  localOf: (at: number) => Date | string,
): string | number | Date | null {
  if (value === null || value === undefined || value === '') return null;
  switch (style) {
    case 'number':
      return value as number;
    case 'yes_no':
      return value ? 'yes' : 'no';
    case 'clock':
      return new Date(DAY_ZERO + Date.parse(`1970-01-01T${value as string}:00Z`));
    case 'day':
      return new Date(`${value as string}T00:00:00Z`);
    case 'stamp':
      return localOf(value as number);
    case 'roles':
      return (value as Role[]).map((role) => ROLE_NAMES[role]).join('; ');
    case 'list':
      return escapeText(joinList(value as string[])) || null;
    case 'text':
      return escapeText(value as string);
  }
}

function offerChoices(sheet: Worksheet, { columns }: SheetDefinition, count: number): void {
  columns.forEach(({ style, choices }, index) => {
    const formula = choices ? rangeOf(choices) : style === 'yes_no' ? '"yes,no"' : null;
    if (formula === null) return;
    for (let row = 2; row <= Math.min(count + ROOM, MAX_ROWS) + 1; row += 1)
      sheet.getCell(row, index + 1).dataValidation = {
        type: 'list',
        allowBlank: true,
        formulae: [formula],
        showErrorMessage: false,
      };
  });
}

function rangeOf({ sheet, key }: NonNullable<ColumnDefinition['choices']>): string {
  const { name, columns } = sheetOf(sheet);
  const letters = columnLetters(columns.findIndex((column) => column.key === key) + 1);
  return `${name}!$${letters}$2:$${letters}$${MAX_ROWS + 1}`;
}
