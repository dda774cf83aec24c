import { fitSmoothingSpline, lambdaForPeriod, pointDensity } from '@app/baseline';

import { allScores } from './lot-score';
import { choosePoints, segmentPoints } from './segment-points';
import { DAY } from './testing/made-lots';
import { normals } from './testing/seeded-random';
import { priorDrift, simulatedLots } from './testing/simulated-lots';
import type { VarianceComponents } from './types';

const LOTS = 100;
const RUNS = 60;
/** 24 lot spacings. */
const PERIOD = 2 * DAY;
const READINGS = 2;

type DriftMaker = (lambda: number, normal: () => number) => (seconds: number) => number;

/** Standard deviation about zero of the scores of LOTS lots in RUNS runs: standard error about 1 %. */
function spread(pointsPerLot: number, lotEffectSd: number, drift: DriftMaker, seed: number): number {
  const normal = normals(seed);
  // A point's own standard deviation is 1: half of its variance between points, half between its readings.
  const components: VarianceComponents = {
    betweenLots: lotEffectSd ** 2,
    betweenPoints: 0.5,
    betweenReadings: 0.5 * READINGS,
  };
  let squares = 0;
  const shape = { lotCount: LOTS, pointsPerLot, readingsPerPoint: READINGS, components, normal };
  const blank = segmentPoints(simulatedLots({ ...shape, driftAt: () => 0, normal: () => 0 }), components, 0);
  const lambda = lambdaForPeriod(pointDensity(blank.t, blank.weight, PERIOD), PERIOD);
  for (let run = 0; run < RUNS; run += 1) {
    const lots = simulatedLots({ ...shape, driftAt: drift(lambda, normal) });
    const pulls = new Uint8Array(LOTS).fill(1);
    const chosen = choosePoints(segmentPoints(lots, components, 0), LOTS, () => true, pulls);
    for (const { z } of allScores(fitSmoothingSpline(chosen.observations, lambda), chosen)) squares += z * z;
  }
  return Math.sqrt(squares / (RUNS * LOTS));
}

const fromPrior: DriftMaker = (lambda, normal) => priorDrift(lambda, LOTS, normal);
/** A wave of four times the half-amplitude period with a range of 5 lot standard deviations, at a chance phase. */
const smooth: DriftMaker = (_lambda, normal) => {
  const phase = 10 * normal();
  return (seconds) => 2.5 * Math.sin((2 * Math.PI * seconds) / (4 * PERIOD) + phase);
};

const CASES = [1, 4, 8].flatMap((pointsPerLot) =>
  [0, 0.5, 1].map((lotEffectSd) => ({ pointsPerLot, lotEffectSd, seed: 1000 * pointsPerLot + 10 * lotEffectSd })),
);

describe('standard deviation of the score', () => {
  it.each(CASES)(
    'is 0.95 to 1.05 with drift from the prior: $pointsPerLot points, lot effect $lotEffectSd point SD',
    ({ pointsPerLot, lotEffectSd, seed }) => {
      const sd = spread(pointsPerLot, lotEffectSd, fromPrior, seed);
      expect(sd).toBeGreaterThan(0.95);
      expect(sd).toBeLessThan(1.05);
    },
  );

  it.each(CASES)(
    'is 0.85 to 1.05 with a smoother drift: $pointsPerLot points, lot effect $lotEffectSd point SD',
    ({ pointsPerLot, lotEffectSd, seed }) => {
      const sd = spread(pointsPerLot, lotEffectSd, smooth, seed + 1);
      expect(sd).toBeGreaterThan(0.85);
      expect(sd).toBeLessThan(1.05);
    },
  );

  it('would be far from 1 for long lots if the lot effect were left out of the weights', () => {
    const normal = normals(77);
    const components: VarianceComponents = { betweenLots: 1, betweenPoints: 0.5, betweenReadings: 2.5 };
    const wrong = { ...components, betweenLots: 0 };
    const lots = simulatedLots({
      lotCount: 400,
      pointsPerLot: 8,
      readingsPerPoint: 5,
      components,
      driftAt: () => 0,
      normal,
    });
    const pulls = new Uint8Array(400).fill(1);
    const chosen = choosePoints(segmentPoints(lots, wrong, 0), 400, () => true, pulls);
    const lambda = lambdaForPeriod(pointDensity(chosen.observations.t, chosen.observations.weight, PERIOD), PERIOD);
    const scores = allScores(fitSmoothingSpline(chosen.observations, lambda), chosen);
    expect(Math.sqrt(scores.reduce((sum, { z }) => sum + z * z, 0) / 400)).toBeGreaterThan(1.8);
  });
});
