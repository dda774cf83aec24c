import ExcelJS from 'exceljs';
import { CHANNELS, LOTS_PER_SHIFT, PRODUCT, SHIFT_SECONDS } from './bench-plant';
import { drawsOf, normal } from './draws';

export interface WorkbookPlan {
  path: string;
  /** Epoch seconds of the first shift, and how many shifts. */
  startsAt: number;
  shifts: number;
  readingsPerLotAndChannel: number;
  firstLot: number;
  seed: number;
}

/** Writes a long-layout workbook, a row a reading: shifts of twelve lots on eight channels that drift slowly. Returns the readings written. */
export async function writeBenchWorkbook(plan: WorkbookPlan): Promise<number> {
  const draw = drawsOf(plan.seed);
  const workbook = new ExcelJS.stream.xlsx.WorkbookWriter({
    filename: plan.path,
    useStyles: true,
    useSharedStrings: false,
  });
  const sheet = workbook.addWorksheet('Readings');
  sheet.columns = [
    { header: 'Time', style: { numFmt: 'yyyy-mm-dd hh:mm:ss' } },
    { header: 'Lot' },
    { header: 'Product' },
    { header: 'Channel' },
    { header: 'Value' },
  ];
  const lotSeconds = SHIFT_SECONDS / LOTS_PER_SHIFT;
  let count = 0;
  for (let lot = 0; lot < plan.shifts * LOTS_PER_SHIFT; lot++) {
    const startsAt = plan.startsAt + lot * lotSeconds;
    const effects = CHANNELS.map(() => 0.02 * normal(draw));
    for (let reading = 0; reading < plan.readingsPerLotAndChannel; reading++) {
      const at = startsAt + Math.floor((reading * lotSeconds) / plan.readingsPerLotAndChannel);
      for (const [index, channel] of CHANNELS.entries()) {
        const drift = 0.1 * Math.sin(at / (5 * 86_400) + index);
        const value = Math.round((10 + drift + effects[index] + 0.05 * normal(draw)) * 1000) / 1000;
        sheet.addRow([new Date(at * 1000), String(plan.firstLot + lot), PRODUCT, channel, value]).commit();
        count++;
      }
    }
  }
  sheet.commit();
  await workbook.commit();
  return count;
}
