import type { Disposition, HoldState } from '../states';
import type { Instant, LotMark, Named, VerdictView } from './common';

/** One row of GET lots. */
export interface LotListItem {
  id: number;
  number: string;
  line: Named;
  product: string;
  quantity: number | null;
  quantityUnit: string | null;
  startsAt: Instant;
  endsAt: Instant;
  mark: LotMark;
  /** The channel on which the lot stands out most; null while nothing is scored. */
  farthest: { channelId: number; channelName: string; score: number } | null;
  hold: { id: number; state: HoldState; openedAt: Instant } | null;
  disposition: Disposition | null;
}

export interface HistoryEntry {
  at: Instant;
  by: string | null;
  sentence: string;
}

/** GET lots/:id. */
export interface LotView extends Omit<LotListItem, 'farthest'> {
  plantId: number;
  verdicts: VerdictView[];
  holds: { id: number; state: HoldState; openedAt: Instant }[];
  history: HistoryEntry[];
}
