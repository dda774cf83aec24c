import type { HoldReminder } from '../reminder-wording';
import type { Disposition, HoldState, SignalName } from '../states';
import type { Instant, Named, VerdictView } from './common';
import type { HistoryEntry } from './lots';

export interface HoldCauseView {
  channel: Named;
  signal: SignalName;
  sentence: string;
}

export interface DecisionView {
  disposition: Disposition;
  reason: string;
  note: string | null;
  by: string;
  at: Instant;
  /** What the signature means: "released", "scrapped". */
  meaning: string;
}

/** One row of GET holds. */
export interface HoldListItem {
  id: number;
  state: HoldState;
  lot: { id: number; number: string };
  line: Named;
  product: string;
  openedAt: Instant;
  isLate: boolean;
  /** Who was told that the hold grows old, and when. */
  reminders: HoldReminder[];
  causes: HoldCauseView[];
  isSetAside: boolean;
  decision: DecisionView | null;
}

/** GET holds/:id. */
export interface HoldView extends HoldListItem {
  plantId: number;
  quantity: number | null;
  quantityUnit: string | null;
  lotStartsAt: Instant;
  lotEndsAt: Instant;
  /** The reason as one sentence. */
  reason: string;
  verdicts: VerdictView[];
  /** Gauge or process: what can be said, in a sentence. */
  attribution: string;
  similar: { holdId: number; lotNumber: string; sentence: string; disposition: Disposition; decidedAt: Instant }[];
  setAside: { by: string; at: Instant; place: string | null } | null;
  evidenceVersion: number;
  /** What this person may decide now; empty with the reason why. */
  mayDecide: { dispositions: Disposition[]; why: string | null };
  maySetAside: boolean;
  history: HistoryEntry[];
}

/** POST holds/:id/decision. */
export interface DecisionRequest {
  disposition: 'release' | 'scrap';
  reason: string;
  note?: string;
  password: string;
  evidenceVersion: number;
}

export const DESK_GROUPS = ['decide', 'fix', 'approve', 'check', 'set_aside'] as const;
export type DeskGroup = (typeof DESK_GROUPS)[number];

export interface DeskItem {
  group: DeskGroup;
  /** Null for what belongs to the plant as a whole. */
  lineId: number | null;
  lineName: string | null;
  sentence: string;
  since: Instant;
  action: { label: string; path: string };
}

/** GET desk?plantId=: what waits for this person, oldest first in each group. */
export interface DeskView {
  items: DeskItem[];
}
