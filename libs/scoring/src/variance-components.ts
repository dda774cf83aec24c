import { fitSmoothingSpline, lambdaForPeriod, pointDensity } from '@app/baseline';
import { pooledVariance, pseudoResidualVariance, type VarianceEstimate } from '@app/control';

import { lotMeanOf, lotTimeOf, nominalOf } from './lot-values';
import { choosePoints, segmentPoints } from './segment-points';
import type { LotOnChannel, VarianceComponents } from './types';

export interface ComponentsEstimate {
  components: VarianceComponents;
  betweenLotsWasNegative: boolean;
  betweenPointsWasNegative: boolean;
}

/** Pilot weights are 1/m for a lot of m points: each lot counts once, and the scale cancels in λ = κ (T / 2π)⁴. */
const PILOT = { betweenLots: 1, betweenPoints: 0, betweenReadings: 0 };

/**
 * Variance components of readings in points in lots by the method of moments, kept apart from the slow movement:
 * - σ_W²: pooled within the points, Σ sums of squares / Σ (n − 1);
 * - σ_P²: with ρ the residuals from a pilot baseline (smoothing spline at T, each lot counting once), over lots of m ≥ 2 points,
 *   E Σ (ρ − ρ̄)² = (m − 1) σ_P² + (1 − 1/m) σ_W² Σ 1/n;
 * - σ_L²: of lot means against the line through their neighbours (see `pseudoResidualVariance`), with
 *   vⱼ = Σ a² (σ_P² + σ_W² / n) known, a the count weights.
 * Where every lot is one point, σ_P² cannot be told from σ_L², which then holds both: what a lot mean varies by is the same.
 * Negative estimates are 0 and said.
 *
 * @param lots usable lots in time order
 * @param shortestPeriodSeconds T, s
 * @throws BaselineError when the pilot cannot be fitted
 */
export function varianceComponents(
  lots: readonly LotOnChannel[],
  shortestPeriodSeconds: number,
  fallbackNominal: number,
): ComponentsEstimate {
  const within = pooledVariance(lots.flatMap((lot) => lot.points)).variance;
  const points = betweenPoints(lots, shortestPeriodSeconds, fallbackNominal, within);
  const known = lots.map((lot) => {
    const total = lot.points.reduce((sum, point) => sum + point.count, 0);
    return lot.points.reduce((sum, { count }) => sum + (count / total) ** 2 * (points.variance + within / count), 0);
  });
  const means = lots.map((lot) => (lotMeanOf(lot) ?? NaN) - nominalOf(lot, fallbackNominal));
  const between = pseudoResidualVariance(lots.map(lotTimeOf), means, known);
  return {
    components: { betweenLots: between.variance, betweenPoints: points.variance, betweenReadings: within },
    betweenLotsWasNegative: between.wasNegative,
    betweenPointsWasNegative: points.wasNegative,
  };
}

function betweenPoints(
  lots: readonly LotOnChannel[],
  shortestPeriodSeconds: number,
  fallbackNominal: number,
  within: number,
): VarianceEstimate {
  if (!lots.some((lot) => lot.points.length > 1)) return { variance: 0, wasNegative: false, terms: 0 };
  const all = new Uint8Array(lots.length).fill(1);
  const { observations, lots: order } = choosePoints(
    segmentPoints(lots, PILOT, fallbackNominal),
    lots.length,
    () => true,
    all,
  );
  const kappa = pointDensity(observations.t, observations.weight, shortestPeriodSeconds);
  const pilot = fitSmoothingSpline(observations, lambdaForPeriod(kappa, shortestPeriodSeconds));
  const rests: number[][] = lots.map(() => []);
  observations.lot.forEach((place, i) => rests[order[place]].push(observations.y[i] - pilot.fitted[i]));
  let squares = 0;
  let divisor = 0;
  lots.forEach((lot, j) => {
    const m = lot.points.length;
    const mean = rests[j].reduce((sum, rest) => sum + rest, 0) / m;
    const inverse = lot.points.reduce((sum, { count }) => sum + 1 / count, 0);
    squares += rests[j].reduce((sum, rest) => sum + (rest - mean) ** 2, 0) - (1 - 1 / m) * within * inverse;
    divisor += m - 1;
  });
  const estimate = squares / divisor;
  return { variance: Math.max(estimate, 0), wasNegative: estimate < 0, terms: divisor };
}
