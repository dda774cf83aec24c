import { PassThrough } from 'node:stream';
import { buffer } from 'node:stream/consumers';
import { stream } from 'exceljs';
import { IANAZone } from 'luxon';

export interface TableColumn {
  header: string;
  unit?: string;
  /** In characters. */
  width?: number;
  type: 'text' | 'number' | 'datetime';
  /** An Excel number format, e.g. "0.00". */
  format?: string;
}

export interface TableOptions {
  sheetName: string;
  columns: TableColumn[];
  /** Cells in the columns' order; a datetime is a Date or epoch milliseconds; null leaves the cell empty. */
  rows: AsyncIterable<unknown[]> | Iterable<unknown[]>;
  /** IANA zone in which datetimes are shown. */
  timeZone: string;
}

const DEFAULT_FORMAT = { text: '@', number: 'General', datetime: 'yyyy-mm-dd hh:mm:ss' } as const;

/**
 * Writes rows as an .xlsx file with one sheet: real numbers and dates, a frozen header, a filter over the columns.
 * Excel dates have no zone, so instants are written as the wall clock of `timeZone`. A text that begins with = + - @,
 * a tab or a line break gets an apostrophe in front, so that no program takes it for a formula.
 *
 * @returns the file's bytes
 * @throws RangeError when `timeZone` is no IANA zone
 */
export function writeTable(options: TableOptions): Promise<Buffer> {
  return writeTables([options]);
}

/** The same with a sheet a table, in their order. */
export async function writeTables(tables: TableOptions[]): Promise<Buffer> {
  const zones = tables.map(({ timeZone }) => {
    const zone = IANAZone.create(timeZone);
    if (!zone.isValid) throw new RangeError(`"${timeZone}" is no IANA time zone.`);
    return zone;
  });
  const out = new PassThrough();
  const whole = buffer(out);
  const book = new stream.xlsx.WorkbookWriter({ stream: out, useStyles: true, useSharedStrings: false });
  for (const [index, table] of tables.entries()) await writeSheet(book, table, zones[index]);
  await book.commit();
  return whole;
}

async function writeSheet(book: stream.xlsx.WorkbookWriter, options: TableOptions, zone: IANAZone): Promise<void> {
  const sheet = book.addWorksheet(toSheetName(options.sheetName), { views: [{ state: 'frozen', ySplit: 1 }] });
  sheet.columns = options.columns.map((column) => {
    const header = column.unit ? `${column.header} [${column.unit}]` : column.header;
    return {
      header: escapeFormula(header),
      width: column.width ?? Math.max(10, Math.min(40, header.length + 4)),
      style: { numFmt: column.format ?? DEFAULT_FORMAT[column.type] },
    };
  });
  sheet.getRow(1).font = { bold: true };
  let count = 1;
  for await (const row of options.rows) {
    count += 1;
    sheet.addRow(options.columns.map((column, index) => toCell(row[index], column, zone))).commit();
  }
  sheet.autoFilter = { from: { row: 1, column: 1 }, to: { row: count, column: options.columns.length } };
  sheet.commit();
}

/** Makes a text harmless in any spreadsheet program by an apostrophe in front where it could start a formula. */
export function escapeFormula(text: string): string {
  return /^[=+\-@\t\r\n]/.test(text) ? `'${text}` : text;
}

/** Excel allows 31 characters and none of * ? : \ / [ ]. */
function toSheetName(name: string): string {
  return name.replace(/[*?:\\/[\]]/g, ' ').slice(0, 31) || 'Sheet';
}

function toCell(value: unknown, column: TableColumn, zone: IANAZone): string | number | Date | null {
  if (value == null) return null;
  if (column.type === 'number') {
    const number = typeof value === 'string' && value.trim() === '' ? NaN : Number(value);
    return Number.isFinite(number) ? number : null;
  }
  if (column.type === 'datetime') {
    const at = value instanceof Date ? value.getTime() : Number(value);
    return Number.isFinite(at) ? new Date(at + zone.offset(at) * 60_000) : null;
  }
  return escapeFormula(typeof value === 'string' ? value : JSON.stringify(value));
}
