import ExcelJS from 'exceljs';
import { CHANNELS, LOTS_PER_SHIFT, PRODUCT, SHIFT_SECONDS } from './bench-plant';

/** Seeded by its argument, so that two runs bench the same figures (mulberry32). */
export function drawsOf(seed: number): () => number {
  let state = seed >>> 0;
  return () => {
    state = (state + 0x6d2b79f5) >>> 0;
    let mixed = Math.imul(state ^ (state >>> 15), state | 1);
    mixed ^= mixed + Math.imul(mixed ^ (mixed >>> 7), mixed | 61);
    return ((mixed ^ (mixed >>> 14)) >>> 0) / 4294967296;
  };
}

const normal = (draw: () => number) => Math.sqrt(-2 * Math.log(1 - draw())) * Math.cos(2 * Math.PI * draw());

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

/** The yardstick: exceljs's streaming read of every cell, and nothing else. Returns seconds. */
export async function bareRead(path: string): Promise<number> {
  const begun = performance.now();
  const reader = new ExcelJS.stream.xlsx.WorkbookReader(path, {
    worksheets: 'emit',
    sharedStrings: 'cache',
    styles: 'cache',
    hyperlinks: 'ignore',
    entries: 'emit',
  });
  let cells = 0;
  for await (const sheet of reader) for await (const row of sheet) row.eachCell(() => cells++);
  if (cells === 0) throw new Error('the yardstick read nothing');
  return (performance.now() - begun) / 1000;
}
