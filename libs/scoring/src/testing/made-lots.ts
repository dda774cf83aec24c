import type { LotOnChannel, LotPoint, PlanParameters } from '../types';

/** 2026-01-05 00:00 UTC, s: stamps as large as real ones. */
export const START_AT = 1_767_571_200;
export const DAY = 86_400;
/** Four lots in a shift of eight hours. */
export const SPACING = 7_200;

/** A lot around its points; everything else as for an ordinary lot without a specification. */
export function madeLot(lotId: number, points: LotPoint[], more: Partial<LotOnChannel> = {}): LotOnChannel {
  const means = points.map((point) => point.mean);
  const firstAt = points.length > 0 ? points[0].at - 1_000 : START_AT + lotId * SPACING;
  return {
    lotId,
    firstAt,
    lastAt: points.length > 0 ? points[points.length - 1].at + 1_000 : firstAt + 2_000,
    count: points.reduce((sum, point) => sum + point.count, 0),
    censoredLow: 0,
    censoredHigh: 0,
    minimum: points.length > 0 ? Math.min(...means) : null,
    maximum: points.length > 0 ? Math.max(...means) : null,
    countBelow: 0,
    countAbove: 0,
    points,
    specification: null,
    pulls: true,
    ...more,
  };
}

/** One lot of one point, `index` lot spacings after the start. */
export function onePointLot(index: number, mean: number, more: Partial<LotOnChannel> = {}): LotOnChannel {
  return madeLot(index, [{ at: START_AT + index * SPACING, count: 10, mean, sumSquares: 9 }], more);
}

/** A plan for lots of one point whose mean varies by SD 1. */
export function madePlan(more: Partial<PlanParameters> = {}): PlanParameters {
  return {
    method: 'smoothing_spline',
    shortestPeriodSeconds: 3 * DAY,
    effectivePeriodSeconds: 3 * DAY,
    windowSeconds: 30 * DAY,
    components: { betweenLots: 0.9, betweenPoints: 0, betweenReadings: 1 },
    centre: 0,
    scale: 1,
    limit: 3,
    referenceLotCount: 100,
    fallbackNominal: 0,
    allowanceNotice: null,
    allowanceCap: null,
    constant: { centre: 0, halfWidth: 3 },
    signals: {
      lot_mean: 'holds',
      outside_specification: 'holds',
      not_scored: 'holds',
      censored_readings: 'notice',
      baseline_moved: 'notice',
    },
    ...more,
  };
}
