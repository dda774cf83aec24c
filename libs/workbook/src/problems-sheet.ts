import type { Workbook } from 'exceljs';
import type { Problem, Severity } from './types';
import { escapeFormula } from './write-table';

const EFFECT: Record<Severity, string> = {
  blocking: 'nothing can be taken in until this is mended',
  row_not_used: 'row not used',
  cell_not_used: 'cell not used',
  notice: 'notice',
};

/** Adds a sheet that lists problems, each with a link to its cell; `note` stands above the list. */
export function addProblemsSheet(book: Workbook, problems: readonly Problem[], note?: string): void {
  const sheet = book.addWorksheet(freeName(book), { views: [{ state: 'frozen', ySplit: note ? 2 : 1 }] });
  if (note) sheet.addRow([note]);
  const header = sheet.addRow(['Sheet', 'Cell', 'What it means for the intake', 'Problem']);
  header.font = { bold: true };
  for (const { sheet: name, row, column, severity, detail } of problems) {
    const cell = row === null ? (column ?? '') : `${column ?? 'A'}${row}`;
    const label = row === null ? cell : column === null ? `row ${row}` : cell;
    const isLinked = row !== null && book.getWorksheet(name) !== undefined;
    const link = isLinked ? { text: label, hyperlink: `#'${name.replace(/'/g, "''")}'!${cell}` } : label;
    sheet.addRow([escapeFormula(name), link, EFFECT[severity], escapeFormula(detail)]);
  }
  [18, 10, 30, 110].forEach((width, index) => (sheet.getColumn(index + 1).width = width));
  const first = note ? 2 : 1;
  sheet.autoFilter = { from: { row: first, column: 1 }, to: { row: first + problems.length, column: 4 } };
}

function freeName(book: Workbook): string {
  const taken = new Set(book.worksheets.map((sheet) => sheet.name.toLowerCase()));
  let name = 'Problems';
  for (let count = 2; taken.has(name.toLowerCase()); count += 1) name = `Problems ${count}`;
  return name;
}
