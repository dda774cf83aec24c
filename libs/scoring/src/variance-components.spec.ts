import { madeLot, SPACING, START_AT } from './testing/made-lots';
import { normals } from './testing/seeded-random';
import { simulatedLots } from './testing/simulated-lots';
import { varianceComponents } from './variance-components';

const COMPONENTS = { betweenLots: 1.5, betweenPoints: 0.8, betweenReadings: 3 };
/** 24 lot spacings. */
const PERIOD = 24 * SPACING;
/** Range of 5 lot-mean standard deviations over four periods. */
const driftAt = (seconds: number) => 4 * Math.sin((2 * Math.PI * seconds) / (4 * PERIOD));

describe('variance components', () => {
  it.each([2, 4, 8])('come out as they were put in, beside a drift, with lots of %d points', (pointsPerLot) => {
    const normal = normals(40 + pointsPerLot);
    const shape = { lotCount: 1500, pointsPerLot, readingsPerPoint: 4, components: COMPONENTS, normal };
    const { components } = varianceComponents(simulatedLots({ ...shape, driftAt }), PERIOD, 0);
    // Standard errors for 1,500 lots: about 0.1 (lots), 0.04 or less (points), 0.04 or less (readings).
    expect(Math.abs(components.betweenLots - 1.5)).toBeLessThan(0.3);
    expect(Math.abs(components.betweenPoints - 0.8)).toBeLessThan(0.16);
    expect(Math.abs(components.betweenReadings - 3)).toBeLessThan(0.16);
  });

  it('leave the variance between points in that between lots where every lot is one point', () => {
    const shape = { lotCount: 1500, pointsPerLot: 1, readingsPerPoint: 4, components: COMPONENTS, normal: normals(50) };
    const { components } = varianceComponents(simulatedLots({ ...shape, driftAt }), PERIOD, 0);
    expect(components.betweenPoints).toBe(0);
    expect(Math.abs(components.betweenLots - 2.3)).toBeLessThan(0.35);
  });

  it('are 0, and said to be, where the readings explain more than there is between lots', () => {
    const lots = Array.from({ length: 40 }, (_, j) =>
      madeLot(j, [
        { at: START_AT + j * SPACING, count: 4, mean: 0.01 * (j % 3), sumSquares: 30 },
        { at: START_AT + (j + 0.5) * SPACING, count: 4, mean: 0.01 * (j % 2), sumSquares: 30 },
      ]),
    );
    const estimate = varianceComponents(lots, PERIOD, 0);
    expect(estimate).toEqual({
      components: { betweenLots: 0, betweenPoints: 0, betweenReadings: 10 },
      betweenLotsWasNegative: true,
      betweenPointsWasNegative: true,
    });
  });
});
