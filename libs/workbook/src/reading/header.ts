import { columnLetters } from '../container/cell-names';
import type { Cell, SheetRow } from '../container/sheet-rows';
import type { ColumnRole, RecognisedColumn } from '../types';
import type { ChannelNames } from './channel-names';
import { fingerprintOf } from './fingerprint';
import { headerText, recogniseText, type HeaderColumn } from './header-cell';
import { joinTexts } from './join-rows';
import { settleColumns } from './settle-columns';
import { takeUnits } from './units-row';

export interface HeaderLine {
  row: number;
  /** By column number. */
  texts: (string | null)[];
  cells: { column: number; cell: Cell }[];
}

export interface Header {
  /** The row of the names that count: the lower one of two. */
  row: number;
  /** From its first row to its last, units included, for finding it repeated. */
  lines: HeaderLine[];
  columns: HeaderColumn[];
  fingerprint: string;
}

/** What the header's columns are for, and whether that is enough to read rows by it. */
export interface HeaderWeight {
  score: number;
  hasTime: boolean;
  hasLot: boolean;
  hasValues: boolean;
}

function lineOf(row: SheetRow): HeaderLine {
  const texts = Array.from(row.cells, headerText);
  const cells = texts.flatMap((text, column) => (text === null ? [] : [{ column, cell: row.cells[column]! }]));
  return { row: row.number, texts, cells };
}

const recognise = ({ texts }: HeaderLine, channels: ChannelNames): HeaderColumn[] =>
  settleColumns(texts.flatMap((text, column) => (text === null ? [] : [recogniseText(text, column, channels)])));

/** How much columns look like a header's: a score of 0 for those that cannot be. */
export function weigh(columns: readonly HeaderColumn[]): HeaderWeight {
  const has = (...roles: ColumnRole[]): number => (columns.some((column) => roles.includes(column.role)) ? 1 : 0);
  const [time, lot, value] = [has('time', 'date', 'time_of_day'), has('lot'), has('value', 'channel_values')];
  const flags = { hasTime: time > 0, hasLot: lot > 0, hasValues: value > 0 };
  if (time + lot === 0 || time + lot + value + has('channel', 'product') < 2) return { score: 0, ...flags };
  const others = 2 * has('channel') + has('product') + has('serial', 'position', 'quantity');
  return { score: 4 * time + 3 * lot + 4 * value + others + Math.min(countValues(columns) / 1_000, 0.9), ...flags };
}

/** Columns of values that can be told apart. */
const countValues = (columns: readonly HeaderColumn[]): number =>
  new Set(
    columns.flatMap(({ role, channelId, position, column }): (string | number)[] =>
      role === 'channel_values' ? [`${channelId} ${position}`] : role === 'value' ? [column] : [],
    ),
  ).size;

/**
 * What one row means as a header, together with the row above it where that gives the names and this one their parts,
 * and with a row of units below.
 */
export function headerAt(rows: readonly SheetRow[], index: number, channels: ChannelNames): Header {
  const row = rows[index];
  const line = lineOf(row);
  let columns = recognise(line, channels);
  let lines = [line];
  const above = rows[index - 1];
  if (above?.number === row.number - 1) {
    const upper = lineOf(above);
    const joined = joinTexts(upper.texts, line.texts, channels);
    const both = joined && settleColumns(joined);
    if (both && weigh(both).score > Math.max(weigh(columns).score, weigh(recognise(upper, channels)).score)) {
      columns = both;
      lines = [upper, line];
    }
  }
  const below = rows[index + 1];
  if (below?.number === row.number + 1 && takeUnits(columns, below)) lines.push(lineOf(below));
  return { row: row.number, lines, columns, fingerprint: fingerprintOf(lines.map(({ texts }) => texts)) };
}

/** Finds the header among a sheet's first rows: the first that is whole, else the one that looks most like one. */
export function findHeader(rows: readonly SheetRow[], channels: ChannelNames): Header | null {
  let best: Header | null = null;
  let bestScore = 0;
  let isWhole = false;
  for (let index = 0; index < rows.length; index += 1) {
    const header = headerAt(rows, index, channels);
    const { score, hasTime, hasLot, hasValues } = weigh(header.columns);
    if (isWhole && header.lines[0].row > best!.row) break;
    if (score > bestScore) [best, bestScore] = [header, score];
    isWhole ||= score > 0 && hasTime && hasLot && hasValues;
  }
  return best;
}

/** Whether a row says again what a line of the header says; cells beside it may say more. */
export const isRepeatOf = ({ lines }: Header, row: SheetRow): boolean =>
  lines.some(
    ({ cells }) =>
      cells.length > 0 &&
      cells.every(({ column, cell }) => {
        const other = row.cells[column];
        return other?.kind === cell.kind && other.text === cell.text && Object.is(other.number, cell.number);
      }),
  );

export const toRecognised = (sheet: string, column: HeaderColumn): RecognisedColumn => ({
  sheet,
  column: columnLetters(column.column),
  header: column.header,
  unit: column.unit,
  role: column.role,
  channelId: column.channelId,
});
