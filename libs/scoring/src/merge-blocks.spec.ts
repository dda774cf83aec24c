import fc from 'fast-check';

import { mergeBlocks, pointCountFor } from './merge-blocks';
import { ScoringError } from './scoring-error';

const HOUR = 3_600;
const PERIOD = 72 * HOUR;

/** Blocks of the readings themselves: sixteen equal spans, empty ones absent. */
function blocksOf(readings: { at: number; value: number }[], firstAt: number, lastAt: number) {
  const blocks = [];
  for (let index = 0; index < 16; index += 1) {
    const inside = readings.filter(
      ({ at }) => Math.min(15, Math.floor((16 * (at - firstAt)) / (lastAt - firstAt))) === index,
    );
    if (inside.length > 0) blocks.push({ index, ...summary(inside) });
  }
  return blocks;
}

function summary(readings: { at: number; value: number }[]) {
  const count = readings.length;
  const mean = readings.reduce((sum, { value }) => sum + value, 0) / count;
  const at = readings.reduce((sum, reading) => sum + reading.at, 0) / count;
  return { at, count, mean, sumSquares: readings.reduce((sum, { value }) => sum + (value - mean) ** 2, 0) };
}

describe('points of a lot', () => {
  it.each([
    [0, 1],
    [7.2, 1],
    [7.3, 2],
    [14.4, 2],
    [14.5, 4],
    [28.9, 8],
    [58, 16],
    [1000, 16],
  ])('are, for %d h with T = 72 h, %d', (hours, expected) => {
    expect(pointCountFor(hours * HOUR, PERIOD)).toBe(expected);
  });

  it('are the means, times and sums of squares of the readings in them', () => {
    const reading = fc.record({ at: fc.integer({ min: 0, max: 16_000 }), value: fc.integer({ min: -900, max: 900 }) });
    fc.assert(
      fc.property(fc.array(reading, { minLength: 1, maxLength: 40 }), fc.constantFrom(1, 2, 4, 8, 16), (some, m) => {
        const readings = [...some, { at: 0, value: 1 }, { at: 16_000, value: 2 }];
        const points = mergeBlocks(blocksOf(readings, 0, 16_000), 0, 16_000, 160_000 / m);
        const spans = Array.from({ length: m }, (_, k) =>
          readings.filter(({ at }) => Math.min(m - 1, Math.floor((m * at) / 16_000)) === k),
        ).filter((span) => span.length > 0);
        expect(points).toHaveLength(spans.length);
        points.forEach((point, k) => {
          const expected = summary(spans[k]);
          expect(point.count).toBe(expected.count);
          expect(point.at).toBeCloseTo(expected.at, 6);
          expect(point.mean).toBeCloseTo(expected.mean, 8);
          expect(Math.abs(point.sumSquares - expected.sumSquares)).toBeLessThan(1e-6);
        });
      }),
      { seed: 5, numRuns: 60 },
    );
  });

  it('are none without blocks', () => {
    expect(mergeBlocks([], 0, 10, PERIOD)).toEqual([]);
  });

  it('refuse impossible blocks, durations and periods', () => {
    const block = { index: 0, at: 0, count: 1, mean: 1, sumSquares: 0 };
    expect(() => mergeBlocks([block, block], 0, 10, PERIOD)).toThrow(ScoringError);
    expect(() => mergeBlocks([{ ...block, index: 16 }], 0, 10, PERIOD)).toThrow(ScoringError);
    expect(() => mergeBlocks([{ ...block, count: 0 }], 0, 10, PERIOD)).toThrow(ScoringError);
    expect(() => mergeBlocks([block], 10, 0, PERIOD)).toThrow(ScoringError);
    expect(() => mergeBlocks([block], 0, NaN, PERIOD)).toThrow(ScoringError);
    expect(() => mergeBlocks([block], 0, 10, 0)).toThrow(ScoringError);
  });
});
