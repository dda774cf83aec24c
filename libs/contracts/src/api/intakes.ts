import type { IntakeState } from '../states';
import type { Question, SheetGrid, WorkbookAnswers } from '../intake-answers';
import type { Instant, Named } from './common';

export interface IntakeProblem {
  sheet: string;
  row: number | null;
  column: string | null;
  code: string;
  detail: string;
  severity: 'blocking' | 'row_not_used' | 'cell_not_used' | 'notice';
}

export interface IntakeColumn {
  sheet: string;
  column: string;
  header: string;
  unit: string | null;
  role: string;
  channel: Named | null;
}

export interface IntakeReadingPreview {
  sheet: string;
  row: number;
  at: Instant;
  /** By the plant's calendar; null where it has none then. */
  shift: string | null;
  lot: string;
  product: string | null;
  quantity: number | null;
  serial: string | null;
  position: string | null;
  channelName: string;
  unit: string;
  value: number | null;
  censoring: 'below' | 'above' | null;
}

/** A reading that is stored with another value than the workbook says. */
export interface DifferingReading {
  sheet: string;
  row: number;
  column: string;
  lot: string;
  channelName: string;
  unit: string;
  at: Instant;
  stored: number | null;
  storedCensoring: 'below' | 'above' | null;
  incoming: number | null;
  incomingCensoring: 'below' | 'above' | null;
}

/** What confirming would do, by what was stored when the workbook was read. */
export interface IntakeComparison {
  at: Instant;
  /** Rows with a reading that is new; else with one that differs; else with one that is there; together with `rowsNotUsed` all. */
  rowsNew: number;
  rowsDiffering: number;
  rowsAlreadyThere: number;
  rowsNotUsed: number;
  readingsNew: number;
  /** With the same value. */
  readingsAlreadyThere: number;
  /** All of them; `differing` lists the first 500. */
  readingsDiffering: number;
  differing: DifferingReading[];
  /** Readings that earlier intakes brought for the same lots and channels within its span of time, and which it does not have. */
  readingsNotInFile: number;
  /** Earlier intakes that brought readings for the same lots, newest first. */
  overlaps: { intakeId: number; fileName: string; receivedAt: Instant; receivedBy: string; lots: string[] }[];
  /** Lots with a reading that is new or differs, and that are decided already or have a settled verdict. */
  lotsDecided: string[];
  lotsSettled: string[];
}

/** POST intakes/:id/reading: reads the workbook again by these answers, which replace those before. */
export interface ReadAgainRequest {
  answers: WorkbookAnswers;
}

/** POST intakes/:id/confirm. */
export interface ConfirmIntakeRequest {
  /** Where a stored reading has another value: it stands, or the workbook's supersedes it (default: keep). */
  differing?: 'keep' | 'supersede';
}

/** POST intakes/:id/withdraw. */
export interface WithdrawIntakeRequest {
  reason: string;
}

/** GET intakes/:id/settled: settled verdicts that would be another one with the readings that came late. */
export interface SettledChange {
  lotId: number;
  lotNumber: string;
  channel: Named;
  /** Sentences, as verdicts are said elsewhere. */
  now: string;
  would: string;
}

/** A layout that was confirmed on a line, GET lines/:id/layouts. */
export interface LayoutView {
  id: number;
  sheetName: string;
  rememberedAt: Instant;
  rememberedBy: string;
  /** What was answered beyond what is recognised, in words; none: it is read as recognised. */
  answers: string[];
}

/** GET intakes/:id. */
export interface IntakeView {
  id: number;
  state: IntakeState;
  line: Named;
  plantId: number;
  fileName: string;
  byteCount: number;
  sha256: string;
  receivedAt: Instant;
  receivedBy: string;
  confirmedAt: Instant | null;
  confirmedBy: string | null;
  scoredAt: Instant | null;
  /** The same bytes came before. */
  sameFileAs: { id: number; receivedAt: Instant; receivedBy: string } | null;
  /** Why it was refused, or what went wrong; a sentence. */
  failure: string | null;
  layout: 'long' | 'wide' | null;
  columns: IntakeColumn[];
  firstRows: IntakeReadingPreview[];
  lots: { number: string; product: string | null; readings: number; firstAt: Instant; lastAt: Instant }[];
  rowsRead: number;
  rowsUsed: number;
  rowsAlreadyThere: number;
  rowsNotUsed: number;
  readingsStored: number;
  readingsAlreadyThere: number;
  problems: IntakeProblem[];
  problemCounts: { code: string; severity: IntakeProblem['severity']; count: number }[];
  /** Only a person can answer these; until then it cannot be confirmed. */
  questions: Question[];
  /** Each sheet's first rows as they stand in the file, and what is in force for it. */
  grids: SheetGrid[];
  /** Of a text file: how it was read. */
  text: { encoding: string; separator: string; decimalSign: string | null } | null;
  /** What was answered so far. */
  answers: WorkbookAnswers;
  /** Held against what is stored, as of when it was read; null before that, and for workbooks read by an earlier version. */
  comparison: IntakeComparison | null;
  rowsSuperseding: number;
  withdrawal: { at: Instant; by: string; reason: string } | null;
  /** May be withdrawn now. */
  isWithdrawable: boolean;
  /** May be confirmed now: read, and nothing blocks. */
  isConfirmable: boolean;
  /** After scoring: what came of it. */
  outcome: IntakeOutcome | null;
}

export interface IntakeOutcome {
  lotsScored: number;
  lotsHeld: { holdId: number; lotNumber: string; sentence: string }[];
  /** Its lots that have no score now, by channel and reason; most first. */
  notScored: { channel: Named; reason: string; sentence: string; lots: number }[];
  /** Lots outside their control limits that are not held, since they were made before their channel's first plan was approved. */
  beforeFirstPlan: { id: number; number: string }[];
}

/** One row of GET lines/:id/intakes. */
export interface IntakeListItem {
  id: number;
  state: IntakeState;
  fileName: string;
  receivedAt: Instant;
  receivedBy: string;
  rowsRead: number;
  rowsUsed: number;
  rowsNotUsed: number;
}
