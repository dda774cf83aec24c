import { readWorkbook, type ReadOptions } from '../read-workbook';
import type { LineContext, ParsedReading, WorkbookReport } from '../types';
import { makeWorkbook, type BookSpec, type CellSpec } from './make-workbook';

/** An invented coater with three channels, in Germany. */
export const COATER: LineContext = {
  timeZone: 'Europe/Berlin',
  now: Date.parse('2026-03-01T12:00:00Z'),
  channels: [
    { id: 11, name: 'Coat weight', aliases: ['BG-201', 'CW'], unit: 'g/m²' },
    { id: 12, name: 'Web thickness', aliases: ['LS-305', 'Dicke'], unit: 'µm' },
    { id: 13, name: 'Oven exit temperature', aliases: ['TC-118'], unit: '°C' },
  ],
  products: [
    { code: 'SEP-12', name: 'Separator 12 µm' },
    { code: 'SEP-16', name: 'Separator 16 µm' },
  ],
};

export interface Read {
  report: WorkbookReport;
  readings: ParsedReading[];
}

export async function read(bytes: Uint8Array, context = COATER, options: ReadOptions = {}): Promise<Read> {
  const readings: ParsedReading[] = [];
  const report = await readWorkbook(bytes, context, (batch) => void readings.push(...batch), options);
  return { report, readings };
}

export const readBook = (book: BookSpec, context = COATER): Promise<Read> => read(makeWorkbook(book), context);

export const readRows = (rows: CellSpec[][], name = 'Readings'): Promise<Read> =>
  readBook({ sheets: [{ name, rows }] });

/** Problems as "severity code cell". */
export const problemList = ({ report }: Read): string[] =>
  report.problems.map(({ severity, code, row, column }) => `${severity} ${code} ${column ?? ''}${row ?? ''}`.trim());
