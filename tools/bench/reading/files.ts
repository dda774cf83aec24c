import ExcelJS from 'exceljs';
import type { LineContext } from '@app/workbook';
import { drawsOf, normal } from '../draws';

export type Layout = 'long' | 'wide';

const NAMES = Array.from({ length: 8 }, (_, index) => `Zone ${index + 1}`);
const PRODUCT = 'P-1';
const STARTS_AT = Date.parse('2026-01-05T06:00:00Z');
const SECONDS = 5;
const ROWS_PER_LOT = 500;

/** The invented line that the files are of. */
export const LINE: LineContext = {
  timeZone: 'UTC',
  now: Date.parse('2026-12-01T00:00:00Z'),
  channels: NAMES.map((name, index) => ({ id: index + 1, name, aliases: [], unit: 'µm' })),
  products: [{ code: PRODUCT, name: 'Product 1' }],
};

/** Writes a workbook of so many readings on eight channels: a row a reading, or a row an instant with a column a channel. */
export async function writeReadings(path: string, layout: Layout, readings: number): Promise<void> {
  const draw = drawsOf(readings);
  const book = new ExcelJS.stream.xlsx.WorkbookWriter({ filename: path, useStyles: true, useSharedStrings: true });
  const sheet = book.addWorksheet('Readings');
  const values = layout === 'long' ? ['Channel', 'Value'] : NAMES;
  sheet.columns = [
    { header: 'Time', style: { numFmt: 'yyyy-mm-dd hh:mm:ss' } },
    ...['Lot', 'Product', ...values].map((header) => ({ header })),
  ];
  const rows = layout === 'long' ? readings : Math.ceil(readings / NAMES.length);
  for (let row = 0; row < rows; row += 1) {
    const head = [new Date(STARTS_AT + row * SECONDS * 1000), `L-${1000 + Math.floor(row / ROWS_PER_LOT)}`, PRODUCT];
    const value = (): number => Math.round((25 + 0.3 * normal(draw)) * 1000) / 1000;
    sheet.addRow([...head, ...(layout === 'long' ? [NAMES[row % NAMES.length], value()] : NAMES.map(value))]).commit();
  }
  sheet.commit();
  await book.commit();
}
