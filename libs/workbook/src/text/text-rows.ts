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
/** More rows than a piece can have: the parser never waits for them to be taken. */
const MANY = 1_000_000;
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
  const options = {
    ...SPLITTING,
    delimiter: separator,
    max_record_size: LONGEST_ROW * limits.maxStringLength,
    readableHighWaterMark: MANY,
  };
  const parser = parse(options);
  parser.on('error', () => undefined); // what went wrong is told by `write` and `end`
  let number = 0;
  const takeRows = (): SheetRow[] => {
    const rows: SheetRow[] = [];
    for (let record = next(parser); record !== null; record = next(parser)) {
      number += 1;
      if (number === 1 && isFirstLeftOut) continue;
      const row = toRow(number, record, limits, count);
      if (row.cells.length > 0) rows.push(row);
    }
    return rows;
  };
  try {
    for (const piece of pieces) {
      const error = await write(parser, piece);
      if (error) throw refusalOf(error, parser.info.records + 1);
      yield takeRows();
    }
    const error = await end(parser);
    if (error) throw refusalOf(error, parser.info.records + 1);
    yield takeRows();
  } finally {
    parser.destroy();
  }
}

const next = (parser: Parser): string[] | null => parser.read() as string[] | null;

type Failure = CsvError | undefined;

/** Resolves when the piece is split, with what went wrong, if anything. */
const write = (parser: Parser, piece: string): Promise<Failure> =>
  new Promise((resolve) => parser.write(piece, (error) => resolve((error ?? undefined) as Failure)));

/** Ends the parser's input; resolves with what went wrong, if anything. */
const end = (parser: Parser): Promise<Failure> =>
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
