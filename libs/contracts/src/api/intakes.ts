import type { IntakeState } from '../states';
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
  /** May be confirmed now: read, and nothing blocks. */
  isConfirmable: boolean;
  /** After scoring: what came of it. */
  outcome: { lotsScored: number; lotsHeld: { holdId: number; lotNumber: string; sentence: string }[] } | null;
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
