import { Workbook, type Column, type Worksheet } from 'exceljs';
import type { DemoLine, DemoReading } from './types';
import { wallClockOf } from './wall-clock';

export interface WorkbookOptions {
  line: DemoLine;
  timeZone: string;
  /** Second title row, such as "Early shift, Monday 2 March 2026". */
  heading: string;
}

type Cell = string | number | Date | null;

const withUnit = (name: string, unit: string): string => (unit ? `${name} [${unit}]` : name);

/** Excel's own pattern for a value shown to a resolution: 0.01 gives "0.00". */
function numberFormatFor(resolution: number): string {
  const decimals = Math.max(0, Math.ceil(-Math.log10(resolution)));
  return decimals === 0 ? '0' : `0.${'0'.repeat(decimals)}`;
}

/**
 * How stamps are written for these readings: as Excel dates in the plant's wall-clock time; as ISO text with the
 * offset when the clocks go back among them, since the wall clock then shows an hour twice.
 */
function stampWriter(readings: DemoReading[], timeZone: string): (at: number) => Date | string {
  const clock = wallClockOf(timeZone);
  const goesBack = readings.length > 0 && clock.goesBackBetween(readings[0].at, readings[readings.length - 1].at);
  return goesBack ? clock.isoTextAt : clock.excelDateAt;
}

function startSheet(
  { line, heading, timeZone }: WorkbookOptions,
  columns: { header: string; style: Partial<Column> }[],
) {
  const workbook = new Workbook();
  const sheet = workbook.addWorksheet('Readings');
  columns.forEach(({ style }, index) => Object.assign(sheet.getColumn(index + 1), style));
  sheet.addRow([`Marrowby Works, ${line.name}`]).font = { bold: true, size: 14 };
  sheet.addRow([heading]);
  sheet.addRow([`Times: ${timeZone}`]);
  sheet.addRow([]);
  sheet.addRow(columns.map(({ header }) => header)).font = { bold: true };
  sheet.views = [{ state: 'frozen', ySplit: 5 }];
  return { workbook, sheet };
}

const LOT_COLUMNS = (line: DemoLine): { header: string; style: Partial<Column> }[] => [
  { header: 'Time', style: { width: 19, numFmt: 'dd/mm/yyyy hh:mm:ss' } },
  { header: 'Lot', style: { width: 10, numFmt: '@' } },
  { header: 'Product', style: { width: 10 } },
  { header: withUnit('Quantity', line.products[0].quantityUnit), style: { width: 14 } },
];

/** Bytes of the finished workbook, stamped with the time of its last reading and not with the clock's. */
async function bytesOf(workbook: Workbook, readings: DemoReading[]): Promise<Buffer> {
  const lastAt = readings.length > 0 ? readings[readings.length - 1].at : 0;
  workbook.creator = 'Marrowby Works';
  workbook.created = new Date(lastAt * 1000);
  workbook.modified = new Date(lastAt * 1000);
  return Buffer.from(await workbook.xlsx.writeBuffer());
}

function addLongRow(sheet: Worksheet, cells: Cell[], numberFormat: string): void {
  const row = sheet.addRow(cells);
  row.getCell(cells.length).numFmt = numberFormat;
}

/** A row a reading: time, lot, product, quantity, channel, value. `readings` in time order. */
export async function writeLongWorkbook(readings: Iterable<DemoReading>, options: WorkbookOptions): Promise<Buffer> {
  const all = [...readings];
  const stamp = stampWriter(all, options.timeZone);
  const { workbook, sheet } = startSheet(options, [
    ...LOT_COLUMNS(options.line),
    { header: 'Channel', style: { width: 24 } },
    { header: 'Value', style: { width: 10 } },
  ]);
  const formats = new Map(
    options.line.channels.map(({ name, characteristic }) => [name, numberFormatFor(characteristic.resolution)]),
  );
  for (const { at, lot, product, quantity, channel, value } of all) {
    addLongRow(sheet, [stamp(at), lot, product, quantity, channel, value], formats.get(channel) ?? 'General');
  }
  return bytesOf(workbook, all);
}

/** A row an instant: time, lot, product, quantity, and a column a channel, empty where its gauge did not read. `readings` in time order. */
export async function writeWideWorkbook(readings: Iterable<DemoReading>, options: WorkbookOptions): Promise<Buffer> {
  const all = [...readings];
  const stamp = stampWriter(all, options.timeZone);
  const { channels } = options.line;
  const { workbook, sheet } = startSheet(options, [
    ...LOT_COLUMNS(options.line),
    ...channels.map(({ name, characteristic }) => ({
      header: withUnit(name, characteristic.unit),
      style: { width: name.length + 10, numFmt: numberFormatFor(characteristic.resolution) },
    })),
  ]);
  for (let from = 0; from < all.length;) {
    const { at, lot, product, quantity } = all[from];
    const values: Cell[] = channels.map(() => null);
    while (from < all.length && all[from].at === at) {
      values[channels.findIndex(({ name }) => name === all[from].channel)] = all[from].value;
      from += 1;
    }
    sheet.addRow([stamp(at), lot, product, quantity, ...values]);
  }
  return bytesOf(workbook, all);
}
