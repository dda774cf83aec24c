import { lotMeanOf, nominalOf } from './lot-values';
import type { LotJudgement, LotOnChannel, PlanParameters } from './types';

type Yardstick = LotJudgement['constant'];

const UNJUDGED: Yardstick = { state: 'not_scored', low: null, high: null, score: null };
/** The half width is three standard deviations (ISO 7870-2). */
const MULTIPLE = 3;

/**
 * The lot mean against the individuals chart of the reference period, without removing any movement: what is done without
 * Ebbline. Its score is the deviation from the centre line in the chart's own standard deviations.
 */
export function constantYardstick(lot: LotOnChannel, plan: PlanParameters | null): Yardstick {
  const mean = lotMeanOf(lot);
  if (plan === null || mean === null) return UNJUDGED;
  const { centre, halfWidth } = plan.constant;
  const nominal = nominalOf(lot, plan.fallbackNominal);
  if (!(halfWidth > 0) || !Number.isFinite(centre + nominal)) return UNJUDGED;
  const score = (MULTIPLE * (mean - nominal - centre)) / halfWidth;
  const isWithin = Math.abs(score) <= MULTIPLE;
  const low = nominal + centre - halfWidth;
  const high = nominal + centre + halfWidth;
  if (isWithin && lot.censoredLow + lot.censoredHigh > 0) return { state: 'not_scored', low, high, score: null };
  return { state: isWithin ? 'within_control_limits' : 'outside_control_limits', low, high, score };
}
