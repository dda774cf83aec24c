import { fitSmoothingSpline, lambdaForPeriod, pointDensity } from '@app/baseline';

import { lagOneCorrelation, neighbourCorrelations } from './lag-correlation';
import { allScores } from './lot-score';
import { choosePoints, segmentPoints } from './segment-points';
import { DAY } from './testing/made-lots';
import { normals } from './testing/seeded-random';
import { priorDrift, simulatedLots } from './testing/simulated-lots';

const LOTS = 30;
const RUNS = 1500;
const PERIOD = DAY;

describe('correlation of neighbouring scores by the fit', () => {
  it.each([1, 3])('is what simulation gives, inside and at the ends, with lots of %d points', (pointsPerLot) => {
    const normal = normals(600 + pointsPerLot);
    const components = { betweenLots: 0.5, betweenPoints: 0.5, betweenReadings: 0 };
    const shape = { lotCount: LOTS, pointsPerLot, readingsPerPoint: 1, components, normal };
    const pulls = new Uint8Array(LOTS).fill(1);
    const choose = (lots: ReturnType<typeof simulatedLots>) =>
      choosePoints(segmentPoints(lots, components, 0), LOTS, () => true, pulls);
    const blank = choose(simulatedLots({ ...shape, driftAt: () => 0 }));
    const { t, weight } = blank.observations;
    const lambda = lambdaForPeriod(pointDensity(t, weight, PERIOD), PERIOD);
    const products = new Float64Array(LOTS - 1);
    for (let run = 0; run < RUNS; run += 1) {
      const chosen = choose(simulatedLots({ ...shape, driftAt: priorDrift(lambda, LOTS, normal) }));
      const scores = allScores(fitSmoothingSpline(chosen.observations, lambda), chosen);
      for (let j = 0; j + 1 < LOTS; j += 1) products[j] += (scores[j].z * scores[j + 1].z) / RUNS;
    }
    const expected = neighbourCorrelations(blank.observations, blank.count, lambda);
    expect(expected).toHaveLength(LOTS - 1);
    // Standard error of each about 0.026.
    expected.forEach((r, j) => expect(Math.abs(products[j] - r)).toBeLessThan(0.08));
    const mean = (values: Float64Array) => values.reduce((sum, x) => sum + x, 0) / values.length;
    expect(Math.abs(mean(products) - mean(expected))).toBeLessThan(0.015);
    expect(Math.min(...expected)).toBeLessThan(-0.05);
  });

  it('of a series that alternates is near −1, of a slow one near 1', () => {
    expect(lagOneCorrelation([1, -1, 1, -1, 1, -1])).toBeCloseTo(-5 / 6, 12);
    expect(lagOneCorrelation([0, 1, 2, 3])).toBeCloseTo(0.25, 12);
  });
});
