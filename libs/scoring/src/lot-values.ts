import type { LotOnChannel, LotPoint, VarianceComponents } from './types';

/** Why a lot cannot take part in a fit, or null when it can. */
export function whyUnusable(lot: LotOnChannel): 'no_values' | 'non_finite' | null {
  const numbers = [lot.firstAt, lot.lastAt, ...(lot.specification ? [lot.specification.nominal] : [])];
  for (const point of lot.points) numbers.push(point.at, point.count, point.mean, point.sumSquares);
  if (!numbers.every(Number.isFinite)) return 'non_finite';
  return lot.points.length === 0 ? 'no_values' : null;
}

/** What deviations of the lot are counted from. */
export function nominalOf(lot: LotOnChannel, fallbackNominal: number): number {
  return lot.specification?.nominal ?? fallbackNominal;
}

/** Count-weighted mean of the points; null without points or when it is not finite. */
export function lotMeanOf(lot: LotOnChannel): number | null {
  if (lot.points.length === 0) return null;
  const mean = countWeighted(lot.points, (point) => point.mean);
  return Number.isFinite(mean) ? mean : null;
}

/** Count-weighted mean time of the points, s. */
export function lotTimeOf(lot: LotOnChannel): number {
  return lot.firstAt + countWeighted(lot.points, (point) => point.at - lot.firstAt);
}

function countWeighted(points: readonly LotPoint[], of: (point: LotPoint) => number): number {
  let sum = 0;
  let count = 0;
  for (const point of points) {
    sum += point.count * of(point);
    count += point.count;
  }
  return sum / count;
}

/**
 * Weight of a point of a lot cut into m points: w = 1 / (m σ_L² + σ_P² + σ_W² / n). A lot never counts for more by being cut
 * or by having more readings. Weights are absolute: σ² = 1 in the fits.
 */
export function pointWeight(components: VarianceComponents, pointsInLot: number, count: number): number {
  const { betweenLots, betweenPoints, betweenReadings } = components;
  return 1 / (pointsInLot * betweenLots + betweenPoints + betweenReadings / count);
}
