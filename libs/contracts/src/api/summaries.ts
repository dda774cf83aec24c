import type { Disposition, HoldState, IntakeState } from '../states';
import type { Instant, Named } from './common';

/** A local date at the plant: "2026-03-02". */
export type LocalDate = string;

/** So many lots, and what they come to: quantities by their unit, and their value where products state one. */
export interface Measure {
  lots: number;
  quantities: { unit: string; amount: number }[];
  /** Lots that state no quantity: they are in no sum. */
  lotsWithoutQuantity: number;
  /** Null when the plant states no currency, or no lot here has a value. */
  value: { amount: number; currency: string; lotsWithout: number } | null;
}

export const NOTHING: Measure = { lots: 0, quantities: [], lotsWithoutQuantity: 0, value: null };

/** What became of the parts of lots that were decided in the week; a lot with two dispositions counts in both. */
export interface DecidedMeasure extends Measure {
  disposition: Disposition;
}

/** Open holds whose age at the week's end lies in [fromHours, toHours). */
export interface AgeMeasure extends Measure {
  fromHours: number;
  /** Null: any older. */
  toHours: number | null;
}

/** One week of a line, or of all lines. A lot is of the week in which it ended. */
export interface WeekFigures {
  measured: Measure;
  /** Of these, with a score on at least one channel. */
  scored: Measure;
  /** Of the measured, without a score on at least one of their channels. */
  notFullyScored: number;
  /** Holds opened in the week. */
  held: Measure;
  /** By decisions signed in the week, whenever the lot was held. */
  decided: DecidedMeasure[];
  /** Open at the week's end: the quantity at risk. */
  stillOpen: Measure;
  stillOpenByAge: AgeMeasure[];
}

export interface SummaryLine {
  line: Named;
  week: WeekFigures;
  /** Null when the plant has no reading so far back. */
  lastWeek: WeekFigures | null;
}

/** A hold that was open at the week's end, oldest first. */
export interface SummaryOpenHold {
  holdId: number;
  lot: { id: number; number: string };
  line: Named;
  product: string;
  quantity: number | null;
  quantityUnit: string | null;
  /** In the plant's currency; null when not stated. */
  value: number | null;
  openedAt: Instant;
  /** At the week's end, h. */
  ageHours: number;
  sentence: string;
  isSetAside: boolean;
  /** What was decided between the week's end and the making of the summary. */
  decidedSince: Disposition | null;
}

/** A lot of the week on which the plan and limits on unadjusted lot means differ. */
export interface ChangedLot {
  lot: { id: number; number: string };
  line: Named;
  product: string;
  quantity: number | null;
  quantityUnit: string | null;
  endsAt: Instant;
  /** Channels on which they differ. */
  channels: string[];
  /** Its newest hold for any cause, as of the making of the summary. */
  hold: { id: number; state: HoldState; dispositions: Disposition[] } | null;
}

export interface ChangedLots {
  count: number;
  /** The newest, at most MOST_LISTED. */
  lots: ChangedLot[];
  /** Of all of them, by what became of them; `held` still waits, `moved_on` was never held. */
  fates: { fate: Disposition | 'held' | 'moved_on'; lots: number }[];
  lastWeekCount: number | null;
}

/** How far a channel's slow movement has gone, by the newest fit of the week, against the plan's allowance. */
export interface SummaryGauge {
  channel: Named;
  line: Named;
  gaugeAssetNumber: string | null;
  unit: string;
  resolution: number;
  /** In the unit, without sign. */
  movement: number;
  /** Beyond it lots are not scored; null when the plan states none. */
  cap: number | null;
  /** movement / cap. */
  share: number | null;
  lastWeekShare: number | null;
  /** The share grew by at least GETTING_WORSE_BY since last week. */
  isGettingWorse: boolean;
}

/** Lots of the week without a score on a channel, by reason. */
export interface SummaryNotScored {
  line: Named;
  channel: Named;
  reason: string;
  sentence: string;
  lots: number;
  lastWeekLots: number;
}

export interface SummaryIntake {
  id: number;
  line: Named;
  fileName: string;
  state: Extract<IntakeState, 'needs_attention' | 'refused'>;
  receivedAt: Instant;
  receivedBy: string;
  /** What is wrong with it, a sentence. */
  sentence: string;
}

/** Whom to ask what. */
export interface SummaryQuestion {
  /** "the quality manager, Adaeze Thornbury", or the role alone. */
  whom: string;
  /** "Why is lot 24117 of Coater 2 still undecided after 2 d 4 h?" */
  question: string;
  /** Page with the evidence, such as /holds/12; null when there is none. */
  path: string | null;
}

/** No list of a summary is longer; its count is of all. */
export const MOST_LISTED = 50;
export const GETTING_WORSE_BY = 0.1;

/** What is frozen of a week. */
export interface SummaryContent {
  plant: { id: number; name: string; timeZone: string; currency: string | null };
  /** [from, to): Monday 00:00 to Monday 00:00 at the plant. */
  week: { startsOn: LocalDate; from: Instant; to: Instant };
  /** Ages from which quality managers and directors are reminded, h. */
  reminderHours: { manager: number; director: number };
  /** The one thing the director must know; a sentence. */
  headline: string;
  whatToAsk: SummaryQuestion[];
  total: { week: WeekFigures; lastWeek: WeekFigures | null };
  lines: SummaryLine[];
  openHolds: { count: number; holds: SummaryOpenHold[] };
  /** What removing the slow movement changed. */
  changedByBaseline: {
    /** Limits on unadjusted lot means would have held them, the plans did not. */
    onlyUnadjusted: ChangedLots;
    /** The plans found them outside their control limits, unadjusted limits would not have. */
    onlyPlan: ChangedLots;
  };
  /** Largest share of the allowance first. */
  gauges: SummaryGauge[];
  notScored: SummaryNotScored[];
  intakes: { count: number; intakes: SummaryIntake[] };
}

/** GET summaries/:id. */
export interface SummaryView extends SummaryContent {
  id: number;
  version: number;
  madeAt: Instant;
  /** Every version of the week, newest first. */
  versions: { id: number; version: number; madeAt: Instant }[];
  maySend: boolean;
}

/** One week of GET plants/:id/summaries, newest first, by its newest version. */
export interface SummaryListItem {
  id: number;
  weekStartsOn: LocalDate;
  version: number;
  madeAt: Instant;
  headline: string;
}

/** A version that a worker has not made. */
export interface SummaryUnderWay {
  jobId: number;
  weekStartsOn: LocalDate;
  state: 'being_made' | 'failed';
  /** When it was asked for, or given up. */
  since: Instant;
  /** Why it failed and whether it is tried again by itself; null while it is being made. */
  sentence: string | null;
}

/** GET plants/:id/summaries. */
export interface SummaryListView {
  items: SummaryListItem[];
  /** The last complete week, which may have no summary yet. */
  lastWeekStartsOn: LocalDate;
  /** What is being made, or could not be made since the week's newest version; newest week first, one a week. */
  underWay: SummaryUnderWay[];
  maySend: boolean;
}

/** POST plants/:id/summaries: a new version of a complete week, made by a worker; mailed when `send` is true. */
export interface SummaryRequest {
  weekStartsOn: LocalDate;
  send?: boolean;
}

/** Its answer, 202: read the list until the week has this version, or the job stands in `underWay` as failed. */
export interface SummaryRequested {
  jobId: number;
  weekStartsOn: LocalDate;
  version: number;
}
