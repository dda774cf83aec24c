import { parse, type CsvError, type Parser } from 'csv-parse';
import { MAX_COLUMN } from '../container/cell-names';
import { assertRoomForCell, type Cell, type CellCount, type SheetRow } from '../container/sheet-rows';
import { GENERAL } from '../container/formats';
import { assertShort } from '../container/texts';
import type { ReadLimits } from '../limits';
import { WorkbookRefusedError } from '../refused';
import { SPLITTING } from './separators';
import type { Separator } from './text-facts';

/** Of one row, in units of the longest cell. */
const LONGEST_ROW = 8;
/** `="00123"`, by which some programs keep spreadsheets from dropping zeros. */
const KEPT_TEXT = /^="([^"]*)"$/;
/** The mark with which old programs end a text file. */
const END_OF_FILE = '\u001a';

export interface HowSplit {
  separator: Separator;
  /** The first row names the separator and is no row of the table. */
  isFirstLeftOut: boolean;
}

/**
 * The rows of a text in groups as its pieces come, each cell a text; empty cells and rows are left out.
 *
 * @throws WorkbookRefusedError corrupt (quotes that never end), too-large, too-many-cells
 */
export async function* readTextRows(
  pieces: Iterable<string>,
  { separator, isFirstLeftOut }: HowSplit,
  limits: ReadLimits,
): AsyncGenerator<SheetRow[]> {
  const count: CellCount = { cells: 0 };
  let rows: SheetRow[] = [];
  let number = 0;
  let failure: unknown;
  const take = (record: string[]): null => {
    number += 1;
    if (failure !== undefined || (number === 1 && isFirstLeftOut)) return null;
    try {
      const row = toRow(number, record, limits, count);
      if (row.cells.length > 0) rows.push(row);
    } catch (error) {
      failure = error;
    }
    return null;
  };
  const parser = parse({
    ...SPLITTING,
    delimiter: separator,
    max_record_size: LONGEST_ROW * limits.maxStringLength,
    on_record: take,
  });
  const isDone = (error: unknown): void => {
    failure ??= error ? refusalOf(error as CsvError, number + 1) : undefined;
    if (failure !== undefined) throw failure as Error;
  };
  parser.on('error', () => undefined); // told by the callbacks too
  try {
    for (const piece of pieces) {
      isDone(await write(parser, piece));
      if (rows.length > 0) yield rows;
      rows = [];
    }
    isDone(await end(parser));
    if (rows.length > 0) yield rows;
  } finally {
    parser.destroy();
  }
}

const write = (parser: Parser, piece: string): Promise<unknown> =>
  new Promise((resolve) => parser.write(piece, (error) => resolve(error)));

/** Ends the parser's input; resolves with what went wrong, if anything. */
const end = (parser: Parser): Promise<unknown> =>
  new Promise((resolve) => {
    parser.once('error', resolve);
    parser.once('finish', () => resolve(undefined));
    parser.end();
  });

function toRow(number: number, record: readonly string[], limits: ReadLimits, count: CellCount): SheetRow {
  const cells: (Cell | undefined)[] = [];
  for (const [index, field] of record.entries()) {
    const text = field.startsWith('=') ? field.replace(KEPT_TEXT, '$1') : field;
    if (text === '' || text === END_OF_FILE || index >= MAX_COLUMN) continue;
    assertShort(text, limits);
    assertRoomForCell(count, limits);
    cells[index + 1] = { kind: 'text', number: NaN, text, format: GENERAL };
  }
  return { number, cells, isHidden: false };
}

function refusalOf(error: CsvError, row: number): WorkbookRefusedError {
  const isEndless = error.code === 'CSV_QUOTE_NOT_CLOSED' || error.code === 'CSV_MAX_RECORD_SIZE';
  const what = isEndless ? 'begins a text in quotation marks that does not end' : 'cannot be split into columns';
  return new WorkbookRefusedError(
    'corrupt',
    `Row ${row} of the text file ${what}. Look at the quotation marks in it, save the file and upload it again.`,
    { cause: error },
  );
}
