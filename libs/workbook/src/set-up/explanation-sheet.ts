import type { Workbook } from 'exceljs';
import { EXPLANATION_SHEET, headerOf, SHEETS } from './sheets';
import { escapeText } from './texts';

const HEADERS = [
  { header: 'Sheet', width: 18 },
  { header: 'Column', width: 38 },
  { header: 'Needed', width: 10 },
  { header: 'What it wants', width: 90 },
  { header: 'Example', width: 32 },
];

/** The first sheet: how the workbook is used, then a row a column of the others. */
export function addExplanation(book: Workbook, plantName: string, timeZone: string): void {
  const intro = [
    `The set-up of ${plantName}. Times are plant time, ${timeZone}.`,
    'Change or add rows on the sheets that follow, then drop the workbook on the page from which it came: it shows every problem with its cell, and what would change, before anything is applied.',
    'The workbook is applied as a whole or not at all. Nothing is removed by it: what has no row stays as it is, and is retired on its own page. Only a shift calendar is replaced as a whole.',
    'Things name each other by name or code, written as on their own sheet. A column or sheet that is none of these is passed over.',
    'A text that begins with = + - or @ stands with an apostrophe in front, so that no program takes it for a formula.',
  ];
  const top = intro.length + 2;
  const sheet = book.addWorksheet(EXPLANATION_SHEET, { views: [{ state: 'frozen', ySplit: top }] });
  sheet.columns = HEADERS.map(({ width }) => ({ width }));
  for (const sentence of intro) sheet.addRow([escapeText(sentence)]);
  sheet.addRow([]);
  sheet.addRow(HEADERS.map(({ header }) => header)).font = { bold: true };
  for (const { name, about, columns } of SHEETS) {
    sheet.addRow([name, '', '', about]).font = { italic: true };
    for (const column of columns)
      sheet.addRow([
        name,
        headerOf(column),
        column.isRequired ? 'yes' : 'may be empty',
        column.wants,
        escapeText(column.example),
      ]);
  }
  for (let row = top + 1; row <= sheet.rowCount; row += 1)
    sheet.getCell(row, 4).alignment = { wrapText: true, vertical: 'top' };
  sheet.autoFilter = { from: { row: top, column: 1 }, to: { row: sheet.rowCount, column: HEADERS.length } };
}
