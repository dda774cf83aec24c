import type { BreakKind, PlanState } from '../states';
import type { Characteristic, Instant, LotMark, Named } from './common';

/** GET plants. */
export interface PlantView extends Named {
  timeZone: string;
}

/** GET plants/:id/lines. */
export interface LineView extends Named {
  plantId: number;
  heldCount: number;
}

/** GET lines/:id/channels, channels/:id. */
export interface ChannelView extends Named {
  lineId: number;
  lineName: string;
  plantId: number;
  characteristic: Characteristic;
  gauge: { id: number; assetNumber: string; kind: string; position: string } | null;
  planInForce: { id: number; revision: number; since: Instant } | null;
  /** A later revision that is a draft or proposed, if any. */
  planPending: { id: number; revision: number; state: PlanState } | null;
  /** Since when new workbooks no longer bring readings to it; its record stays. */
  retiredSince: Instant | null;
}

export interface StripLot {
  id: number;
  number: string;
  startsAt: Instant;
  endsAt: Instant;
  mark: LotMark;
}

/** GET lines/:id/strip: the line's last fourteen shifts with readings. */
export interface StripView {
  line: Named;
  plant: PlantView;
  shifts: { name: string; startsAt: Instant; endsAt: Instant; lots: StripLot[] }[];
  otherLines: LineView[];
}

export interface BreakView {
  id: number;
  at: Instant;
  kind: BreakKind;
  reason: string;
  by: string;
}

/** One lot in a channel's record. Times are epoch milliseconds, values as measured. */
export interface RecordLot {
  id: number;
  number: string;
  product: string;
  startsAt: number;
  endsAt: number;
  at: number;
  mean: number | null;
  nominal: number;
  lowerSpecification: number | null;
  upperSpecification: number | null;
  baseline: number | null;
  controlLow: number | null;
  controlHigh: number | null;
  score: number | null;
  mark: LotMark;
}

/** GET channels/:id/record?from=&to=&width=: bounded however many readings there are. Deviations are from the product's nominal value. */
export interface RecordView {
  channel: ChannelView;
  from: number;
  to: number;
  /** Least and greatest deviation of the readings in each column of pixels that has any; times are epoch ms. */
  readings: { at: number[]; low: number[]; high: number[] };
  /** The fitted slow movement with its 95 % band, as deviation; a null value parts segments. */
  baseline: { at: number[]; value: (number | null)[]; low: (number | null)[]; high: (number | null)[] };
  lots: RecordLot[];
  /** Lots in the span when there are more than are answered: those that stand out stay, the rest are thinned evenly. */
  lotCount?: number;
  /** Limit on the scores, of the plan in force. */
  limit: number | null;
  breaks: BreakView[];
  /** First and last reading of the channel, to bound pan and zoom. */
  extent: { from: number; to: number } | null;
}
