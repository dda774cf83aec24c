import { formatNumber, type IntakeColumn, type IntakeReadingPreview } from '@app/contracts';

/** The first rows of one sheet as they were read, laid out on the sheet's own columns. */
export interface SheetGrid {
  sheet: string;
  columns: IntakeColumn[];
  rows: { row: number; cells: string[] }[];
}

interface GridFormat {
  /** Instant in the plant's zone, as much of it as the column holds. */
  time: (at: string, form: 'seconds' | 'day' | 'time') => string;
}

/** Puts the readings of a preview back at their cells: what stands there is what was understood, not what was written. */
export function sheetGrids(
  columns: readonly IntakeColumn[],
  readings: readonly IntakeReadingPreview[],
  format: GridFormat,
): SheetGrid[] {
  const sheets = [...new Set(columns.map((column) => column.sheet))];
  return sheets.map((sheet) => {
    const own = columns.filter((column) => column.sheet === sheet).sort(byLetter);
    const inSheet = readings.filter((reading) => reading.sheet === sheet);
    const rows = [...new Set(inSheet.map((reading) => reading.row))].sort((a, b) => a - b);
    return {
      sheet,
      columns: own,
      rows: rows.map((row) => {
        const ofRow = inSheet.filter((reading) => reading.row === row);
        return { row, cells: own.map((column) => cellText(column, ofRow, format)) };
      }),
    };
  });
}

/** A, B, …, Z, AA, AB: shorter letters first. */
const byLetter = (a: IntakeColumn, b: IntakeColumn) =>
  a.column.length - b.column.length || a.column.localeCompare(b.column);

function cellText(column: IntakeColumn, readings: readonly IntakeReadingPreview[], { time }: GridFormat): string {
  const first = readings[0];
  switch (column.role) {
    case 'time':
      return time(first.at, 'seconds');
    case 'date':
      return time(first.at, 'day');
    case 'time_of_day':
      return time(first.at, 'time');
    case 'lot':
      return first.lot;
    case 'product':
      return first.product ?? '';
    case 'quantity':
      return first.quantity === null ? '' : formatNumber(first.quantity, decimalsWritten(first.quantity));
    case 'serial':
      return first.serial ?? '';
    case 'position':
      return first.position ?? '';
    case 'channel':
      return first.channelName;
    case 'unit':
      return first.unit;
    case 'value':
      return valueText(first);
    case 'channel_values': {
      const own = readings.find((reading) => reading.channelName === column.channel?.name);
      return own === undefined ? '' : valueText(own);
    }
    default:
      return '';
  }
}

function valueText({ value, censoring }: IntakeReadingPreview): string {
  if (value !== null) return formatNumber(value, decimalsWritten(value));
  return censoring === 'below' ? 'off scale, low' : censoring === 'above' ? 'off scale, high' : '';
}

/** As many decimals as the number was written with, so that a misread separator shows; binary crumbs beyond 12 digits are none. */
function decimalsWritten(value: number): number {
  const written = String(Number(value.toPrecision(12)));
  return Math.min((written.split('.')[1] ?? '').length, 6);
}
