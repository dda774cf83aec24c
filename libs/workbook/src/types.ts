import type { ColumnRole, Question, RememberedLayout, SheetGrid } from './answers';

export type { ColumnRole } from './answers';

/** What the reader knows about the line whose workbook it reads. */
export interface LineContext {
  /** IANA name of the plant's zone, e.g. "Europe/Berlin". */
  timeZone: string;
  /** Epoch milliseconds; stamps more than ten minutes ahead of it are questioned. */
  now: number;
  channels: ChannelContext[];
  products: { code: string; name: string }[];
  /** Absent: nothing is remembered. */
  remembered?: RememberedLayout[];
  /** Numbers of the line's lots of late, against which spellings are compared; absent: none. */
  lots?: string[];
}

export interface ChannelContext {
  id: number;
  /** Unique on the line, e.g. "Coat weight". */
  name: string;
  /** Gauge asset number, code, position: whatever else a workbook may call it. */
  aliases: string[];
  unit: string;
  /** Nominal value and specification limits in force, by product code; absent where there are none. */
  specifications?: { product: string; nominal: number | null; lower: number | null; upper: number | null }[];
}

/** One value of one channel at one instant; a value or a censoring, never both. */
export interface ParsedReading {
  sheet: string;
  row: number;
  /** Letter of the value's cell. */
  column: string;
  lot: string;
  /** Code of the product, null when the workbook does not say. */
  product: string | null;
  quantity: number | null;
  quantityUnit: string | null;
  channelId: number;
  /** Epoch milliseconds. */
  at: number;
  value: number | null;
  censoring: 'below' | 'above' | null;
  serial: string | null;
  position: string | null;
}

export type Severity = 'blocking' | 'row_not_used' | 'cell_not_used' | 'notice';

export interface Problem {
  sheet: string;
  row: number | null;
  column: string | null;
  /** Stable, kebab-case. */
  code: string;
  /** A sentence: what, where, what to do. */
  detail: string;
  severity: Severity;
}

export interface ProblemCount {
  code: string;
  severity: Severity;
  count: number;
  firstSheet: string;
  firstRow: number | null;
}

export interface RecognisedColumn {
  sheet: string;
  column: string;
  header: string;
  unit: string | null;
  role: ColumnRole;
  channelId: number | null;
}

export interface LotSummary {
  number: string;
  product: string | null;
  readings: number;
  firstAt: number;
  lastAt: number;
}

export interface WorkbookReport {
  layout: 'long' | 'wide' | null;
  sheets: { name: string; headerRow: number | null; rows: number }[];
  columns: RecognisedColumn[];
  dateSystem: 1900 | 1904;
  /** Non-empty rows below the header, over all sheets that have one. */
  rowsRead: number;
  /** Rows of which no cell gives a reading. */
  rowsNotUsed: number;
  readingsParsed: number;
  lots: LotSummary[];
  channels: { channelId: number; readings: number }[];
  /** At most twelve readings, as read. */
  firstRows: ParsedReading[];
  /** At most 1,000, and at most 100 notices of one code; `problemCounts` counts all. */
  problems: Problem[];
  problemCounts: ProblemCount[];
  isBlocked: boolean;
  questions: Question[];
  grids: SheetGrid[];
  /** Of a text file: how it was read. */
  text: { encoding: string; separator: string; decimalSign: string | null } | null;
}

export type OnReadings = (batch: ParsedReading[]) => Promise<void> | void;
