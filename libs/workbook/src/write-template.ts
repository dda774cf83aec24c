import { type TableColumn, writeTables } from './write-table';

export interface TemplateContext {
  lineName: string;
  /** IANA name of the plant's zone. */
  timeZone: string;
  channels: { name: string; unit: string }[];
  products: { code: string; name: string }[];
}

const WIDE = 18;

/**
 * A blank workbook for a line: a sheet with a column a channel, and one that says how to fill it in. What is read of it needs no answer: it is the
 * wide layout, in the channels' own names and units.
 *
 * @returns the file's bytes, .xlsx
 */
export function writeTemplate({ lineName, timeZone, channels, products }: TemplateContext): Promise<Buffer> {
  const columns: TableColumn[] = [
    { header: 'Time', type: 'datetime', width: 22 },
    { header: 'Lot', type: 'text', width: WIDE },
    { header: 'Product', type: 'text', width: WIDE },
    { header: 'Quantity', type: 'number' },
    ...channels.map(({ name, unit }): TableColumn => ({ header: name, unit, type: 'number', width: WIDE })),
  ];
  const rows = [
    ['Time', `Date and time of the reading on the clocks of ${timeZone}, for example 2026-03-02 06:15:00.`],
    ['Lot', "The lot's number, the same on each of its rows."],
    ['Product', `The lot's product: ${products.map(({ code }) => code).join(', ') || 'none is set up yet'}.`],
    ['Quantity', 'How much the lot is, on any one of its rows; it may stay empty.'],
    ...channels.map(({ name, unit }) => [
      name,
      `One reading a row${unit ? `, in ${unit}` : ''}. Empty: not measured. OL or <0.05: off the gauge's scale. A missing value is not 0.`,
    ]),
  ];
  const explanation: TableColumn[] = [
    { header: 'Column', type: 'text', width: 24 },
    { header: 'What goes into it', type: 'text', width: 90 },
  ];
  return writeTables([
    { sheetName: lineName, columns, rows: [], timeZone },
    { sheetName: 'How to fill it in', columns: explanation, rows, timeZone },
  ]);
}
