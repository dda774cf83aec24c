import { quantile } from '@app/control';

import type { LotOnChannel } from './types';

const DAY_SECONDS = 86_400;
/** Below this many lot spacings a lot hardly differs from drift and the proposal warns (see DEVELOPERS.md, Scoring). */
export const LOT_SPACINGS_WARNED = 22;
/** Below this many the baseline would swallow single lots: refused. */
export const LOT_SPACINGS_REFUSED = 8;

/**
 * Median time between the starts of successive lots, s.
 *
 * @param lots in time order of `firstAt`
 * @returns null with fewer than two lots, or when all start together
 */
export function medianLotSpacing(lots: readonly Pick<LotOnChannel, 'firstAt'>[]): number | null {
  const gaps: number[] = [];
  for (let j = 1; j < lots.length; j += 1) gaps.push(lots[j].firstAt - lots[j - 1].firstAt);
  if (gaps.length === 0 || !gaps.every(Number.isFinite)) return null;
  const median = quantile(gaps, 0.5);
  return median > 0 ? median : null;
}

/**
 * Default shortest drift period T: the longer of 3 days and 22 median lot spacings, s. Nothing faster than T counts as drift.
 *
 * @param lots lots of one segment in time order of `firstAt`
 * @returns 3 days when no spacing can be told
 * @example defaultShortestPeriod([]) // 259200
 */
export function defaultShortestPeriod(lots: readonly Pick<LotOnChannel, 'firstAt'>[]): number {
  return Math.max(3 * DAY_SECONDS, LOT_SPACINGS_WARNED * (medianLotSpacing(lots) ?? 0));
}
