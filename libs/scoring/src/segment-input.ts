import type { LotOnChannel, PlanParameters } from './types';

/** One segment of one channel, as it is known now. */
export interface SegmentInput {
  /** The revision in force; null when there is none. */
  plan: PlanParameters | null;
  /**
   * Lots of the segment in time order of `firstAt`: at least those that end within the window before the oldest lot to judge
   * settles, better all since the segment's start, since movement is counted from there.
   */
  lots: LotOnChannel[];
  /** Lots without a settled verdict. */
  lotIdsToJudge: number[];
  /** The break that the segment starts at, s. */
  segmentStartsAt: number;
  /** The break that closed it, s; null while it is open. */
  segmentEndsAt: number | null;
  /** `startLevel` of an earlier judgement, for when the segment's first lots are not handed in. */
  startLevel?: number | null;
}
