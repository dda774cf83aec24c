/** What a column of a workbook is for. */
export type ColumnRole =
  | 'time'
  | 'date'
  | 'time_of_day'
  | 'lot'
  | 'product'
  | 'channel'
  | 'value'
  | 'unit'
  | 'serial'
  | 'position'
  | 'quantity'
  | 'remark'
  | 'channel_values'
  | 'ignored';

/** What a person says about values. */
export interface ValueAnswer {
  /** The unit in which the values stand; converted to the channel's when it is a unit of the same quantity. */
  unit?: string;
  /** The values are deviations from the nominal value of the row's product. */
  isDeviation?: boolean;
  /** Numbers that stand for a missing value among them, as written ("0"). */
  missing?: string[];
  /** Numbers that look as if they stood for a missing value and are readings. */
  readings?: string[];
}

/** What a person says about one column. */
export interface ColumnAnswer extends ValueAnswer {
  role: ColumnRole;
  /** In the role `channel_values`: whose values they are. */
  channelId?: number;
  /** In the role `value`, where rows name their channels: what holds for the values of one channel, by its id. */
  channels?: Record<string, ValueAnswer>;
}

/** How one layout is to be read: what is remembered for a header's fingerprint. What is absent is recognised. */
export interface LayoutAnswers {
  /** The row that is the header, or null for a sheet of which nothing is read. */
  headerRow?: number | null;
  /** By column letters. */
  columns?: Record<string, ColumnAnswer>;
  /** Of dates written as text: 03/04 is the third of April, or the fourth of March. */
  dateOrder?: 'day-month' | 'month-day';
  decimalSign?: '.' | ',';
  /** IANA name of the zone of the times; absent: the plant's. */
  timeZone?: string;
  /** Texts and numbers that stand for a missing value, as written ("9999", "--"). */
  missing?: string[];
  /** The dates are those of the day on which the shift began: times after midnight belong to the next day. */
  isShiftDate?: boolean;
}

/** How this one workbook is to be read, beyond what its layouts say. */
export interface WorkbookAnswers {
  /** By the sheet's name; goes before what is remembered for its fingerprint. */
  sheets?: Record<string, LayoutAnswers>;
  /** The day (YYYY-MM-DD, in the zone of the times) on which times without a date begin. */
  date?: string;
  /** Which pass of the repeated hour is meant where the order of rows does not say. */
  repeatedHour?: 'first' | 'second';
  /** Spellings of lot numbers and the number that is meant, as agreed to. */
  lots?: Record<string, string>;
  /** Of a text file: what separates its columns. */
  separator?: ',' | ';' | '\t' | '|';
  encoding?: 'utf-8' | 'utf-16le' | 'utf-16be' | 'windows-1252';
}

/** Something only a person can say. Until each is answered the workbook cannot be confirmed. */
export interface Question {
  /** Stable, kebab-case; the problem of this code and severity `blocking` stands in the list of problems too. */
  code: string;
  sheet: string;
  column: string | null;
  /** A sentence that asks, with an example from the workbook. */
  detail: string;
  /** How many rows it is about. */
  rows: number;
  choices: Choice[];
}

export interface Choice {
  /** What the button says: what will be read ("3 April 2026"). */
  label: string;
  /** Merged into the answers when it is taken, field by field, sheets and columns by their names. */
  answers: WorkbookAnswers;
}

/** A layout that was remembered on the line. */
export interface RememberedLayout {
  fingerprint: string;
  /** The sheet on which it was met; a sheet of this name with another fingerprint has changed its layout. */
  sheetName: string;
  answers: LayoutAnswers;
}

/** The first rows of a sheet as they stand in the file, for its grid. */
export interface SheetGrid {
  sheet: string;
  /** Folded header texts hashed (hex SHA-256), null where no header was found. */
  fingerprint: string | null;
  /** What was read is by a remembered answer. */
  isRemembered: boolean;
  /** Another layout was remembered under this sheet's name. */
  isChanged: boolean;
  headerRow: number | null;
  isHidden: boolean;
  /** At most 40 rows from the first filled one and 60 columns, as texts. */
  rows: { row: number; isHidden: boolean; cells: Record<string, string> }[];
  /** What is in force for the sheet after recognition and answers: what a person corrects. */
  inForce: LayoutAnswers;
}
