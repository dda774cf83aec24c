import { ScoringError } from './scoring-error';
import type { LotPoint } from './types';

/** Equal time blocks kept for each lot and channel. */
export const BLOCKS_PER_LOT = 16;

/** One of the sixteen equal time blocks of a lot; blocks without readings are absent. */
export interface Block extends LotPoint {
  /** 0 to 15, in time order. */
  index: number;
}

/**
 * Number of equal blocks that a lot is cut into, so that the baseline can move inside a long one: 1 when it lasts no longer
 * than a tenth of T, else the smallest of 2, 4, 8, 16 that is at least duration / (T / 10), and never more than 16.
 *
 * @param durationSeconds last reading minus first, s, at least 0
 * @param shortestPeriodSeconds T, s, above 0
 * @throws ScoringError bad-argument
 * @example pointCountFor(3 * 3600, 24 * 3600) // 2
 */
export function pointCountFor(durationSeconds: number, shortestPeriodSeconds: number): number {
  if (!(durationSeconds >= 0) || !(shortestPeriodSeconds > 0))
    throw new ScoringError('bad-argument', 'A duration of at least 0 s and a period above 0 s are needed.');
  const tenths = durationSeconds / (shortestPeriodSeconds / 10);
  if (tenths <= 1) return 1;
  return [2, 4, 8, 16].find((m) => m >= Math.ceil(tenths)) ?? BLOCKS_PER_LOT;
}

/**
 * The points of a lot: neighbouring blocks merged until as many are left as `pointCountFor` says. Means and times are weighted
 * by count; the sum of squares gains what lies between the merged means (Chan, Golub & LeVeque 1983, eq. 2.1).
 *
 * @param blocks blocks with readings, any order, each index once
 * @param firstAt first reading of the lot, s
 * @param lastAt last reading of the lot, s
 * @param shortestPeriodSeconds T, s
 * @returns points in time order; empty when there are no blocks
 * @throws ScoringError bad-argument
 * @example mergeBlocks([{ index: 0, at: 5, count: 2, mean: 1, sumSquares: 0 }], 0, 10, 86400).length // 1
 */
export function mergeBlocks(
  blocks: readonly Block[],
  firstAt: number,
  lastAt: number,
  shortestPeriodSeconds: number,
): LotPoint[] {
  const wanted = pointCountFor(lastAt - firstAt, shortestPeriodSeconds);
  const merged: (LotPoint | undefined)[] = new Array<LotPoint | undefined>(wanted).fill(undefined);
  const seen = new Set<number>();
  for (const block of [...blocks].sort((a, b) => a.index - b.index)) {
    if (!Number.isInteger(block.index) || block.index < 0 || block.index >= BLOCKS_PER_LOT || seen.has(block.index))
      throw new ScoringError('bad-argument', `Block index ${block.index} is not one of 0 to 15, each once.`);
    if (!(block.count >= 1)) throw new ScoringError('bad-argument', 'A block has at least one reading.');
    seen.add(block.index);
    const place = Math.floor((block.index * wanted) / BLOCKS_PER_LOT);
    merged[place] = join(merged[place], block);
  }
  return merged.filter((point) => point !== undefined).sort((a, b) => a.at - b.at);
}

function join(into: LotPoint | undefined, block: LotPoint): LotPoint {
  if (into === undefined) return { at: block.at, count: block.count, mean: block.mean, sumSquares: block.sumSquares };
  const count = into.count + block.count;
  const share = block.count / count;
  const apart = block.mean - into.mean;
  return {
    at: into.at + (block.at - into.at) * share,
    count,
    mean: into.mean + apart * share,
    sumSquares: into.sumSquares + block.sumSquares + apart * apart * into.count * share,
  };
}
