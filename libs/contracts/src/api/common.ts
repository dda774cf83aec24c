import type { ControlState, Disposition, HoldState, SignalName, SpecificationState } from '../states';

export interface Page<T> {
  items: T[];
  total: number;
  page: number;
  pageSize: number;
}

/** An instant as ISO 8601 text in UTC. */
export type Instant = string;

export interface Named {
  id: number;
  name: string;
}

export interface Characteristic {
  name: string;
  unit: string;
  /** Smallest step shown, in the unit: 0.01 shows two decimals. */
  resolution: number;
}

/** What the mark of a lot is drawn from, the same in charts, tape, tables and mails. */
export interface LotMark {
  controlState: ControlState;
  isProvisional: boolean;
  specificationState: SpecificationState;
  hasNotice: boolean;
  holdState: HoldState | null;
  disposition: Disposition | null;
  isExcluded: boolean;
}

export interface SignalView {
  signal: SignalName;
  action: 'holds' | 'notice' | 'off';
  sentence: string;
}

/** A lot's current verdict on one channel, with everything that a hand calculation needs. */
export interface VerdictView {
  id: number;
  channel: { id: number; name: string; characteristic: Characteristic; gaugeAssetNumber: string };
  controlState: ControlState;
  isProvisional: boolean;
  /** Set exactly when not scored. */
  notScoredSentence: string | null;
  score: number | null;
  limit: number | null;
  residual: number | null;
  residualSd: number | null;
  readingCount: number;
  lotMean: number | null;
  baseline: number | null;
  controlLow: number | null;
  controlHigh: number | null;
  specificationState: SpecificationState;
  nominal: number | null;
  lowerSpecification: number | null;
  upperSpecification: number | null;
  /** What limits on the unadjusted lot means would have said. */
  constant: { state: ControlState; low: number | null; high: number | null; score: number | null };
  signals: SignalView[];
  planRevision: number | null;
  methodVersion: string;
  judgedAt: Instant;
}
