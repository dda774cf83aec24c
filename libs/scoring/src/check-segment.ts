import type { SegmentInput } from './segment-input';
import { ScoringError } from './scoring-error';
import type { PlanParameters } from './types';

/**
 * Checks what the caller answers for.
 * @returns the place of a lot by its id
 * @throws ScoringError bad-argument
 */
export function checkSegment({
  lots,
  lotIdsToJudge,
  segmentStartsAt,
  segmentEndsAt,
}: SegmentInput): (id: number) => number {
  const places = new Map<number, number>();
  lots.forEach((lot, place) => {
    if (places.has(lot.lotId)) throw new ScoringError('bad-argument', `Lot ${lot.lotId} is there twice.`);
    if (place > 0 && lot.firstAt < lots[place - 1].firstAt)
      throw new ScoringError('bad-argument', `Lot ${lot.lotId} starts before the lot that it follows.`);
    if (lot.lastAt < segmentStartsAt || (segmentEndsAt !== null && lot.firstAt > segmentEndsAt))
      throw new ScoringError('bad-argument', `Lot ${lot.lotId} lies outside the segment.`);
    places.set(lot.lotId, place);
  });
  const placeOf = (id: number) => {
    const place = places.get(id);
    if (place === undefined) throw new ScoringError('bad-argument', `Lot ${id} is not among the lots of the segment.`);
    return place;
  };
  lotIdsToJudge.forEach(placeOf);
  return placeOf;
}

/** @throws ScoringError bad-argument when a number of the plan cannot be judged by */
export function checkPlan(plan: PlanParameters): void {
  const { betweenLots, betweenPoints, betweenReadings } = plan.components;
  const variances = [betweenLots, betweenPoints, betweenReadings];
  const positive = {
    shortestPeriodSeconds: plan.shortestPeriodSeconds,
    effectivePeriodSeconds: plan.effectivePeriodSeconds,
    windowSeconds: plan.windowSeconds,
    scale: plan.scale,
    limit: plan.limit,
    components: betweenLots + betweenPoints + betweenReadings,
  };
  for (const [name, value] of Object.entries(positive))
    if (!(value > 0 && value < Infinity)) throw new ScoringError('bad-argument', `The plan's ${name} is not above 0.`);
  if (!variances.every((variance) => variance >= 0))
    throw new ScoringError('bad-argument', 'A variance component of the plan is below 0.');
  if (!Number.isFinite(plan.centre) || !Number.isFinite(plan.fallbackNominal))
    throw new ScoringError('bad-argument', 'The centre or the fallback nominal of the plan is not a finite number.');
}
