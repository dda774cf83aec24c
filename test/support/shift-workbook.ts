import ExcelJS from 'exceljs';

export interface WorkbookLot {
  number: string;
  startsAt: string;
  /** One reading every ten minutes. */
  values: number[];
  channel?: string;
  product?: string;
}

/** A workbook in long layout, with the plant's wall-clock time as Excel dates. `zoneOffsetHours` is that of the plant on those days. */
export async function longWorkbook(lots: WorkbookLot[], zoneOffsetHours = 0): Promise<Buffer> {
  const workbook = new ExcelJS.Workbook();
  const sheet = workbook.addWorksheet('Readings');
  sheet.addRow(['Time', 'Lot', 'Product', 'Channel', 'Value']);
  for (const lot of lots)
    for (const [index, value] of lot.values.entries()) {
      const at = new Date(new Date(lot.startsAt).getTime() + index * 600_000 + zoneOffsetHours * 3_600_000);
      sheet.addRow([at, lot.number, lot.product ?? 'SEP-16', lot.channel ?? 'Coat weight', value]).getCell(1).numFmt =
        'yyyy-mm-dd hh:mm';
    }
  return Buffer.from(await workbook.xlsx.writeBuffer());
}

/** `count` values about `centre` that repeat in no pattern a baseline could follow. */
export function scatter(centre: number, count: number, size: number, seed: number): number[] {
  let state = seed >>> 0;
  return Array.from({ length: count }, () => {
    state = (Math.imul(state, 1664525) + 1013904223) >>> 0;
    return Math.round((centre + (state / 2 ** 32 - 0.5) * size) * 100) / 100;
  });
}
