import ExcelJS from 'exceljs';
import { scatter } from '../../support/shift-workbook';

/** A workbook of a bottling plant in its own layout: a row a reading, by the wall clock of the hall. */
export const FILLER = {
  product: 'PITANGA-500',
  channel: 'Fill mass',
  /** Bottles a lot, and grams in one. */
  lotSize: 12_000,
  nominal: 500,
};

const HOURS_A_LOT = 4;
const READINGS_A_LOT = 10;
const MINUTES_APART = 20;
/** The load cell creeps: up and down again in six days, g. */
const CREEP = 1.2;
const CREEP_HOURS = 144;
/** Beside the others, well inside the specification, g. */
const LIGHT = -8;

const LOT_NOISE = scatter(0, 60, 1.6, 23);

/** Lots are numbered from 1; the first began on Monday 2 March 2026 at 06:00 of the hall's clock, and each lasts four hours. */
export const lotNumber = (index: number): string => `VC-${String(index).padStart(3, '0')}`;
const startOf = (index: number): number => Date.UTC(2026, 2, 2, 6) + (index - 1) * HOURS_A_LOT * 3_600_000;

/** The readings of a lot, g. */
export function readingsOf(index: number, isLight: boolean): number[] {
  const creep = CREEP * Math.sin((2 * Math.PI * (index - 1) * HOURS_A_LOT) / CREEP_HOURS);
  const centre = FILLER.nominal + creep + LOT_NOISE[index] + (isLight ? LIGHT : 0);
  return scatter(centre, READINGS_A_LOT, 3, 7 * index + 1).map((value) => Math.round(value * 10) / 10);
}

export interface Filled {
  from: number;
  to: number;
  /** The one that is under-filled. */
  light: number;
}

export async function fillerWorkbook({ from, to, light }: Filled): Promise<Buffer> {
  const workbook = new ExcelJS.Workbook();
  const sheet = workbook.addWorksheet('Filler 3');
  sheet.addRow(['Measured at', 'Lot', 'Product', 'Lot size (bottles)', 'Channel', 'Value', 'Unit']);
  for (let index = from; index <= to; index++)
    for (const [i, value] of readingsOf(index, index === light).entries()) {
      const at = new Date(startOf(index) + i * MINUTES_APART * 60_000);
      const cells = [at, lotNumber(index), FILLER.product, FILLER.lotSize, FILLER.channel, value, 'g'];
      sheet.addRow(cells).getCell(1).numFmt = 'yyyy-mm-dd hh:mm';
    }
  return Buffer.from(await workbook.xlsx.writeBuffer());
}
