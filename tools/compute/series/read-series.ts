import type { Readable } from 'node:stream';
import { pipeline } from 'node:stream/promises';
import { CsvError, parse } from 'csv-parse';
import { InputError, quoted } from '../input-error';
import { readHeader, type Columns } from './read-header';
import { SeriesRows } from './series-rows';
import type { Series } from './series';

/** A quotation mark that is never closed must not take the whole file into memory. */
const LONGEST_ROW = 100_000;

const isBlank = (fields: readonly string[]): boolean => fields.length === 1 && fields[0] === '';

/**
 * Reads a series of comma-separated values as a stream: header, then one row a reading. Blank lines may stand at the end.
 * @throws InputError naming the row as a spreadsheet would number it (the header is row 1)
 */
export async function readSeries(input: Readable): Promise<Series> {
  let columns: Columns | undefined;
  let rows: SeriesRows | undefined;
  let row = 0;
  let blankRow = 0;
  const take = (fields: string[]): void => {
    row++;
    if (columns === undefined) {
      columns = readHeader(fields);
      rows = new SeriesRows(columns);
    } else if (isBlank(fields)) {
      blankRow ||= row;
    } else if (blankRow > 0) {
      throw new InputError(`row ${blankRow} is blank; leave it out`);
    } else {
      rows!.add(fields, row);
    }
  };
  const parser = parse({
    bom: true,
    trim: true,
    relax_column_count: true,
    record_delimiter: ['\r\n', '\n', '\r'],
    max_record_size: LONGEST_ROW,
  });
  // The pipeline may answer a consumer that throws with an abort of its own: the first problem is the one to tell.
  let problem: unknown;
  try {
    await pipeline(input, parser, async (records: AsyncIterable<string[]>) => {
      try {
        for await (const fields of records) take(fields);
      } catch (error) {
        problem = error;
        throw error;
      }
    });
  } catch (error) {
    const first = problem ?? error;
    throw first instanceof CsvError ? csvProblem(first) : first;
  }
  if (rows === undefined) throw new InputError('row 1: there is no header; columns are t,y[,w][,lot]');
  return rows.finish();
}

/** The parser counts the rows before the one that it cannot read. */
function csvProblem(error: CsvError): InputError {
  const row = Number(error.records) + 1;
  if (error.code === 'CSV_MAX_RECORD_SIZE' || error.code === 'CSV_QUOTE_NOT_CLOSED')
    return new InputError(`row ${row}: a quotation mark is opened and not closed`);
  if (error.code === 'INVALID_OPENING_QUOTE' || error.code === 'CSV_INVALID_CLOSING_QUOTE')
    return new InputError(
      `row ${row}: a quotation mark stands inside a field; quote the whole field and double the mark`,
    );
  return new InputError(`row ${row}: ${quoted(error.message)}`);
}
