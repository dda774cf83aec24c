import type { LotOnChannel, VarianceComponents } from '../types';
import { madeLot, SPACING, START_AT } from './made-lots';

/** How a made channel varies. */
export interface Simulated {
  lotCount: number;
  pointsPerLot: number;
  readingsPerPoint: number;
  components: VarianceComponents;
  /** Drift at a time, s since the start. */
  driftAt: (seconds: number) => number;
  normal: () => number;
}

/** Lots one spacing apart whose points fill most of the spacing, with lot, point and reading effects of the given variances. */
export function simulatedLots(made: Simulated): LotOnChannel[] {
  const { lotCount, pointsPerLot: m, readingsPerPoint: n, components, driftAt, normal } = made;
  return Array.from({ length: lotCount }, (_, j) => {
    const lotEffect = Math.sqrt(components.betweenLots) * normal();
    const points = Array.from({ length: m }, (_unused, p) => {
      const since = j * SPACING + ((p + 0.5) / m) * 0.9 * SPACING;
      const pointEffect = Math.sqrt(components.betweenPoints) * normal();
      const readings = Array.from({ length: n }, () => Math.sqrt(components.betweenReadings) * normal());
      const error = readings.reduce((sum, x) => sum + x, 0) / n;
      const sumSquares = readings.reduce((sum, x) => sum + (x - error) ** 2, 0);
      return { at: START_AT + since, count: n, mean: driftAt(since) + lotEffect + pointEffect + error, sumSquares };
    });
    const firstAt = START_AT + j * SPACING;
    return madeLot(j, points, { firstAt, lastAt: firstAt + 0.9 * SPACING });
  });
}

/**
 * A draw from the smoothing spline's own prior: an integrated Wiener process of noise 1/λ (σ² = 1), on a grid of a tenth of a
 * lot spacing and straight between, with a chance level and slope.
 */
export function priorDrift(lambda: number, lotCount: number, normal: () => number): (seconds: number) => number {
  const step = SPACING / 10;
  const values = new Float64Array(10 * lotCount + 11);
  let slope = (3 * normal()) / (SPACING * 20);
  values[0] = 5 * normal();
  for (let k = 1; k < values.length; k += 1) {
    // Exact transition of (g, g') over one step: covariance (1/λ) [[d³/3, d²/2], [d²/2, d]].
    const change = Math.sqrt(step / lambda) * normal();
    const bend = Math.sqrt(step ** 3 / (12 * lambda)) * normal();
    values[k] = values[k - 1] + step * slope + (step / 2) * change + bend;
    slope += change;
  }
  return (seconds) => {
    const k = Math.floor(seconds / step);
    return values[k] + (seconds / step - k) * (values[k + 1] - values[k]);
  };
}
