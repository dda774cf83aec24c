import { fitSmoothingSpline, lambdaForPeriod } from '@app/baseline';

import { allScores } from './lot-score';
import { choosePoints, segmentPoints } from './segment-points';
import { DAY, madeLot, SPACING, START_AT } from './testing/made-lots';
import { naiveScore } from './testing/naive-score';
import { normals } from './testing/seeded-random';

const COMPONENTS = { betweenLots: 0.5, betweenPoints: 0.25, betweenReadings: 2 };
const SEED = 20260105;

/** Fourteen lots of 1, 2 and 4 points, two of them interleaved, one far out and not pulling, with a pause in between. */
function lotsOfAllKinds() {
  const normal = normals(SEED);
  return Array.from({ length: 14 }, (_, j) => {
    const m = [1, 2, 4][j % 3];
    const start = START_AT + j * SPACING + (j > 8 ? DAY : 0);
    const points = Array.from({ length: m }, (_unused, p) => ({
      at: start + p * (j === 4 ? 3_000 : 1_500),
      count: 5 + ((3 * j + p) % 7),
      mean: 40 + 0.3 * j + normal() + (j === 6 ? 9 : 0),
      sumSquares: 6,
    }));
    return madeLot(j, points, { pulls: j !== 6 });
  });
}

describe('score of a lot against the others', () => {
  const lots = lotsOfAllKinds();
  const points = segmentPoints(lots, COMPONENTS, 40);
  const pulls = Uint8Array.from(lots, (lot) => (lot.pulls ? 1 : 0));
  const chosen = choosePoints(points, lots.length, () => true, pulls);
  const lambda = lambdaForPeriod(8e-5, 2 * DAY);
  const fit = fitSmoothingSpline(chosen.observations, lambda);

  it('agrees with dense kriging without the lot', () => {
    const scores = allScores(fit, chosen);
    expect(scores).toHaveLength(lots.length);
    scores.forEach((score, place) => {
      const naive = naiveScore(points, (other) => pulls[other] === 1, lambda, chosen.lots[place]);
      expect(Math.abs(score.residual - naive.residual)).toBeLessThan(1e-7);
      expect(Math.abs(score.sd - naive.sd)).toBeLessThan(1e-7);
      expect(Math.abs(score.z - naive.z)).toBeLessThan(1e-7);
    });
  });

  it('agrees with a refit without the lot', () => {
    const lot = 7;
    const without = choosePoints(points, lots.length, (other) => other !== lot, pulls);
    const refit = fitSmoothingSpline(without.observations, lambda);
    const [deleted] = fit.deletedLots(Int32Array.of(chosen.place[lot]));
    deleted.indices.forEach((i, p) => {
      const { t, y } = chosen.observations;
      expect(deleted.residual[p]).toBeCloseTo(y[i] - refit.at(t[i]).value, 9);
    });
  });

  it('does not care in which unit or about which origin the values are', () => {
    const scaled = segmentPoints(
      lots.map((lot) => ({
        ...lot,
        points: lot.points.map((point) => ({ ...point, mean: 1000 * point.mean + 5e5 })),
      })),
      { betweenLots: 0.5e6, betweenPoints: 0.25e6, betweenReadings: 2e6 },
      0,
    );
    const other = choosePoints(scaled, lots.length, () => true, pulls);
    const scores = allScores(fitSmoothingSpline(other.observations, lambda / 1e6), other);
    allScores(fit, chosen).forEach((score, j) => expect(scores[j].z).toBeCloseTo(score.z, 8));
  });
});
