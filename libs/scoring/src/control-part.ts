import { lotMeanOf, nominalOf, whyUnusable } from './lot-values';
import type { ControlPart } from './lot-signals';
import type { SegmentFits } from './segment-fits';
import { LEAST_LOTS, LOTS_PER_EDF, standardised } from './two-pass-fit';
import type { LotOnChannel, NotScoredReason, PlanParameters } from './types';

const BLANK = {
  controlState: 'not_scored',
  score: null,
  residual: null,
  residualSd: null,
  baseline: null,
  controlLow: null,
  controlHigh: null,
  movement: null,
} as const;

/** A lot without a score. */
export function notScored(
  reason: NotScoredReason,
  isProvisional: boolean,
  notScoredFacts: ControlPart['notScoredFacts'] = {},
): ControlPart {
  return { ...BLANK, notScoredReason: reason, isProvisional, notScoredFacts };
}

/**
 * The control verdict of one lot. Once data reach T_eff / 2 past it, the fit uses the lots that ended by then and nothing
 * later, so that the verdict does not depend on what is uploaded afterwards nor on when it is computed; until then it uses all
 * there is. It settles when the later lots that pull also carry the weight κ T_eff / 4, or when the segment is closed.
 */
export function controlPart(
  lot: LotOnChannel,
  index: number,
  fits: SegmentFits,
  plan: PlanParameters,
  isClosed: boolean,
): ControlPart {
  const unusable = whyUnusable(lot);
  if (unusable !== null) return notScored(unusable, false);
  const { timeline } = fits;
  const cutAt = timeline.cutOf(lot);
  const isReached = timeline.newestEndAt >= cutAt;
  const endAt = Math.min(cutAt, timeline.newestEndAt);
  const result = fits.at(timeline.setUpTo(endAt));
  if (result.status === 'ill-posed') return notScored('ill_posed', !isClosed, { cause: result.detail });
  const isCarried = timeline.weightAfter(lot.lastAt) >= (result.kappa * timeline.reachSeconds) / 2;
  const isProvisional = !isClosed && !(isReached && isCarried);
  if (result.status === 'constant') return notScored('constant_data', isProvisional, { lotCount: result.lotCount });
  if (result.status === 'too-few-lots')
    return notScored('learning', isProvisional, { lotCount: result.lotCount, lotsNeeded: LEAST_LOTS });
  const edf = result.fit.edf;
  if (result.isLearning)
    return notScored('learning', isProvisional, {
      lotCount: result.lotCount,
      edf,
      lotsNeeded: Math.max(LEAST_LOTS, Math.ceil(LOTS_PER_EDF * edf)),
    });
  const raw = fits.score(result, index);
  const mean = lotMeanOf(lot);
  if (raw === null || mean === null) return notScored('ill_posed', isProvisional, { cause: 'deleting the lot' });

  const nominal = nominalOf(lot, plan.fallbackNominal);
  const baseline = mean - raw.residual;
  const startLevel = fits.startLevel(endAt);
  const movement = startLevel === null ? null : baseline - nominal - startLevel;
  const figures = { residual: raw.residual, residualSd: raw.sd * plan.scale, baseline, movement };
  const without = (reason: NotScoredReason, facts: ControlPart['notScoredFacts']): ControlPart => ({
    ...notScored(reason, isProvisional, facts),
    ...figures,
  });
  if (plan.allowanceCap !== null && movement !== null && !(Math.abs(movement) <= plan.allowanceCap))
    return without('beyond_allowance', { movement, cap: plan.allowanceCap });
  const score = standardised(raw, plan);
  const isWithin = Math.abs(score) <= plan.limit;
  if (isWithin && lot.censoredLow + lot.censoredHigh > 0)
    return without('censored', { censoredLow: lot.censoredLow, censoredHigh: lot.censoredHigh, count: lot.count });
  return {
    ...figures,
    controlState: isWithin ? 'within_control_limits' : 'outside_control_limits',
    isProvisional,
    notScoredReason: null,
    notScoredFacts: {},
    score,
    controlLow: baseline + (plan.centre - plan.limit * plan.scale) * raw.sd,
    controlHigh: baseline + (plan.centre + plan.limit * plan.scale) * raw.sd,
  };
}
