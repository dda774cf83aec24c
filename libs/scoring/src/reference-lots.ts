import { quantile } from '@app/control';

import { lotMeanOf, whyUnusable } from './lot-values';
import type { PlanInput } from './plan-proposal';
import { ScoringError } from './scoring-error';
import type { LotOnChannel } from './types';

/** The reference lots that can be used, and those asked for that cannot. */
export interface ReferenceLots {
  usable: LotOnChannel[];
  unusableLotIds: number[];
  hasNonFinite: boolean;
}

/**
 * The lots named, or all that end within the window before the newest; of these the ones that pull and have values.
 * @throws ScoringError bad-argument for a named lot that is not there, or lots out of order
 */
export function referenceLots({ lots, referenceLotIds }: PlanInput, windowSeconds: number): ReferenceLots {
  for (let j = 1; j < lots.length; j += 1)
    if (lots[j].firstAt < lots[j - 1].firstAt)
      throw new ScoringError('bad-argument', `Lot ${lots[j].lotId} starts before the lot that it follows.`);
  const newestAt = lots.reduce((newest, lot) => Math.max(newest, lot.lastAt), -Infinity);
  const named = new Set(referenceLotIds);
  const candidates = referenceLotIds
    ? lots.filter((lot) => named.has(lot.lotId))
    : lots.filter((lot) => !(lot.lastAt < newestAt - windowSeconds));
  if (referenceLotIds && candidates.length !== named.size)
    throw new ScoringError('bad-argument', 'A reference lot is not among the lots of the segment.');
  const isUsable = (lot: LotOnChannel) => lot.pulls && whyUnusable(lot) === null;
  return {
    usable: candidates.filter(isUsable),
    unusableLotIds: candidates.filter((lot) => !isUsable(lot)).map((lot) => lot.lotId),
    hasNonFinite: candidates.some((lot) => lot.pulls && whyUnusable(lot) === 'non_finite'),
  };
}

/** Nominal for lots without a specification: the median of their means, else of the nominals that there are. */
export function fallbackNominalOf(lots: readonly LotOnChannel[]): number {
  const means = lots.filter((lot) => lot.specification === null).map((lot) => lotMeanOf(lot) ?? NaN);
  if (means.length > 0) return quantile(means, 0.5);
  return quantile(
    lots.map((lot) => lot.specification?.nominal ?? NaN),
    0.5,
  );
}
