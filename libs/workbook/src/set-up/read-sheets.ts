import { columnLetters } from '../container/cell-names';
import { readSheetRows, type SheetRow } from '../container/sheet-rows';
import type { OpenWorkbook } from '../container/workbook-parts';
import type { ReadLimits } from '../limits';
import { foldName, splitUnit } from '../reading/names';
import { cellText } from '../reading/texts';
import { isBlank } from '../reading/values';
import type { ProblemList } from './problem-list';
import { type ColumnDefinition, EXPLANATION_SHEET, headerOf, type SheetDefinition, SHEETS } from './sheets';
import { quoted } from './texts';

/** Rows of one sheet that are read; a plant with more is set up in parts. */
export const MAX_ROWS = 5_000;

/** A sheet of the workbook with the columns that were found on it. */
export interface FoundSheet {
  definition: SheetDefinition;
  /** Number of each column by its field. */
  columns: Map<string, number>;
  rows: SheetRow[];
}

/** Finds the sheets and columns by their names; says what is missing (a problem) and what is not known (a notice). */
export async function readSheets(
  book: OpenWorkbook,
  limits: ReadLimits,
  problems: ProblemList,
  notices: ProblemList,
): Promise<FoundSheet[]> {
  const count = { cells: 0 };
  const found: FoundSheet[] = [];
  for (const part of book.sheets) {
    if (foldName(part.name) === foldName(EXPLANATION_SHEET)) continue;
    const definition = SHEETS.find((one) => foldName(one.name) === foldName(part.name));
    if (!definition || found.some((one) => one.definition === definition)) {
      notices.add({
        sheet: part.name,
        cell: null,
        code: 'unknown-sheet',
        what: `The sheet ${quoted(part.name)} is none of the set-up’s.`,
        whatToDo: 'It is not used.',
      });
      continue;
    }
    const rows: SheetRow[] = [];
    for await (const some of readSheetRows(book, part, limits, count))
      for (const row of some)
        if (row.cells.some((cell) => !isBlank(cell)) && rows.length <= MAX_ROWS + 1) rows.push(row);
    const sheet = readHeader(definition, rows, problems, notices);
    if (sheet) found.push(sheet);
  }
  for (const definition of SHEETS)
    if (!book.sheets.some((part) => foldName(part.name) === foldName(definition.name)))
      problems.add({
        sheet: definition.name,
        cell: null,
        code: 'sheet-missing',
        what: `The sheet ${definition.name} is missing.`,
        whatToDo: `Add it with the columns ${definition.columns.map(headerOf).join(', ')}, or begin from a fresh download.`,
      });
  return found;
}

function readHeader(
  definition: SheetDefinition,
  [header, ...rows]: SheetRow[],
  problems: ProblemList,
  notices: ProblemList,
): FoundSheet | null {
  const sheet = definition.name;
  const columns = new Map<string, number>();
  header?.cells.forEach((cell, number) => {
    const title = cellText(cell);
    if (title === null) return;
    const column = definition.columns.find((one) => isHeader(title, one));
    const place = { sheet, cell: `${columnLetters(number)}${header.number}` };
    if (!column)
      notices.add({
        ...place,
        code: 'unknown-column',
        what: `The column ${quoted(title)} is none of this sheet’s.`,
        whatToDo: 'It is not used.',
      });
    else if (columns.has(column.key))
      problems.add({
        ...place,
        code: 'column-twice',
        what: `The column ${column.header} stands here a second time.`,
        whatToDo: 'Delete one of both.',
      });
    else columns.set(column.key, number);
  });
  const missing = definition.columns.filter((column) => !columns.has(column.key));
  for (const column of missing)
    problems.add({
      sheet,
      cell: null,
      code: `column-missing`,
      what: `The sheet ${sheet} has no column ${headerOf(column)}.`,
      whatToDo: `Write ${quoted(headerOf(column))} into its first row${column.isRequired ? '' : '; its cells may be empty'}.`,
    });
  if (rows.length > MAX_ROWS)
    problems.add({
      sheet,
      cell: `A${rows[MAX_ROWS].number}`,
      code: 'too-many-rows',
      what: `The sheet has more than ${MAX_ROWS} rows, and at most as many are read.`,
      whatToDo: 'Delete rows, or set the plant up by two workbooks.',
    });
  return missing.length === 0 && rows.length <= MAX_ROWS ? { definition, columns, rows } : null;
}

const isHeader = (title: string, column: ColumnDefinition): boolean =>
  foldName(splitUnit(title).name) === foldName(column.header);
