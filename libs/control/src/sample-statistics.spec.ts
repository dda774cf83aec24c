import { ControlError } from './control-error';
import { movingRangeScale } from './moving-range-scale';
import { quantile } from './quantile';
import { robustScale } from './robust-scale';
import { sampleMoments } from './sample-moments';

describe('quantile', () => {
  it('interpolates between order statistics as R does by default', () => {
    // R 4.2: quantile(c(3, 1, 4, 1, 5, 9, 2, 6), c(0, .1, .25, .5, .9, 1))
    const values = [3, 1, 4, 1, 5, 9, 2, 6];
    const expected = [1, 1, 1.75, 3.5, 6.9, 9];
    [0, 0.1, 0.25, 0.5, 0.9, 1].forEach((p, i) => expect(quantile(values, p)).toBeCloseTo(expected[i], 12));
    expect(values).toEqual([3, 1, 4, 1, 5, 9, 2, 6]);
  });

  it('refuses no values, values that are not numbers, and shares outside 0 to 1', () => {
    expect(() => quantile([], 0.5)).toThrow(ControlError);
    expect(() => quantile([1, NaN], 0.5)).toThrow(ControlError);
    expect(() => quantile([1, 2], NaN)).toThrow(ControlError);
    expect(() => quantile([1, 2], 1.1)).toThrow(ControlError);
  });
});

describe('robust scale', () => {
  it('is the median and 1.4826 median absolute deviations, as by hand', () => {
    // Deviations from 3: 2, 1, 0, 1, 97; their median is 1.
    expect(robustScale([1, 2, 3, 4, 100])).toEqual({ median: 3, scale: 1.4826 });
  });

  it('is 0 for ties beyond one half and refuses NaN', () => {
    expect(robustScale([2, 2, 2, 7])).toEqual({ median: 2, scale: 0 });
    expect(() => robustScale([1, NaN, 2])).toThrow(ControlError);
  });
});

describe('sample moments', () => {
  it('keeps its digits far from zero', () => {
    // 2, 4, 4, 4, 5, 5, 7, 9: sum of squared deviations from 5 is 32.
    const moments = sampleMoments([2, 4, 4, 4, 5, 5, 7, 9].map((x) => x + 1e9));
    expect(moments.mean - 1e9).toBe(5);
    expect(moments.standardDeviation).toBeCloseTo(Math.sqrt(32 / 7), 12);
  });

  it('needs two finite values', () => {
    expect(() => sampleMoments([1])).toThrow(ControlError);
    expect(() => sampleMoments([1, Infinity])).toThrow(ControlError);
  });
});

describe('moving range scale', () => {
  it('takes the correlation of neighbours into account', () => {
    expect(movingRangeScale([0, 1.128, 0], [0, 0])).toBeCloseTo(1, 12);
    // Correlation -0.44 widens the moving range by 1.2.
    expect(movingRangeScale([0, 1.2 * 1.128], [-0.44])).toBeCloseTo(1, 12);
  });

  it('refuses sizes that do not match and correlations of 1', () => {
    expect(() => movingRangeScale([0, 1, 2], [0])).toThrow(ControlError);
    expect(() => movingRangeScale([0, 1], [1])).toThrow(ControlError);
    expect(() => movingRangeScale([0, 1], [NaN])).toThrow(ControlError);
  });
});
