import { individualsChart } from './individuals-chart';

// NIST/SEMATECH e-Handbook of Statistical Methods, 6.3.2.2: flow rate, ten successive batches, with the figures printed there.
const FLOW_RATE = [49.6, 47.6, 49.9, 51.3, 47.8, 51.2, 52.6, 52.4, 53.6, 52.1];
const PRINTED = { centre: 50.81, meanMovingRange: 1.8778, upper: 55.8041, lower: 45.8159, movingRangeUpper: 6.1347 };
/** Half of the last printed digit, and what rounding the mean moving range to four decimals moves the limits by. */
const TOLERANCE = 5e-4;

describe('individuals chart', () => {
  it('gives the figures printed in the e-Handbook for the flow rate example', () => {
    const chart = individualsChart(FLOW_RATE);
    if (chart.status !== 'computed') throw new Error(chart.reason);
    for (const [name, printed] of Object.entries(PRINTED)) {
      const computed = chart[name as keyof typeof PRINTED];
      expect(Math.abs(computed - printed)).toBeLessThan(TOLERANCE);
    }
    expect(FLOW_RATE.every((x) => x > chart.lower && x < chart.upper)).toBe(true);
  });

  it('moves with the values and stretches with their unit', () => {
    const moved = individualsChart(FLOW_RATE.map((x) => 1000 * x - 7));
    const chart = individualsChart(FLOW_RATE);
    if (chart.status !== 'computed' || moved.status !== 'computed') throw new Error('not computed');
    expect(moved.centre).toBeCloseTo(1000 * chart.centre - 7, 6);
    expect(moved.halfWidth).toBeCloseTo(1000 * chart.halfWidth, 6);
  });

  it('refuses values that are not finite, too few, or constant', () => {
    expect(individualsChart([1, NaN, 2])).toEqual({ status: 'insufficient', reason: 'non_finite' });
    expect(individualsChart([1, Infinity])).toEqual({ status: 'insufficient', reason: 'non_finite' });
    expect(individualsChart([1])).toEqual({ status: 'insufficient', reason: 'too_few' });
    expect(individualsChart([])).toEqual({ status: 'insufficient', reason: 'too_few' });
    expect(individualsChart([3, 3, 3])).toEqual({ status: 'insufficient', reason: 'constant' });
  });
});
