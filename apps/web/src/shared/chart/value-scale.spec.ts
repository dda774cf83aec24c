import { axisEnds, joinSpans, spanWithin } from './value-scale';

describe('joinSpans', () => {
  it('holds all spans and passes over missing and non-finite ones', () => {
    expect(joinSpans([{ low: 1, high: 2 }, null, { low: -3, high: 0 }, { low: NaN, high: 9 }])).toEqual({
      low: -3,
      high: 2,
    });
  });

  it('is null when nothing is there', () => {
    expect(joinSpans([])).toBeNull();
    expect(joinSpans([null, { low: NaN, high: NaN }])).toBeNull();
  });
});

describe('spanWithin', () => {
  it('looks only at instants in the range, ends included', () => {
    expect(spanWithin([0, 10, 20, 30], [99, 1, 4, -99], 10, 20)).toEqual({ low: 1, high: 4 });
  });

  it('passes over nulls and is null for none', () => {
    expect(spanWithin([0, 1, 2], [null, 5, null], 0, 2)).toEqual({ low: 5, high: 5 });
    expect(spanWithin([0, 1], [null, null], 0, 1)).toBeNull();
  });
});

describe('axisEnds', () => {
  it('adds the same margin on both sides', () => {
    const [low, high] = axisEnds({ low: 0, high: 10 }, 0);
    expect(low).toBeCloseTo(-1, 12);
    expect(high).toBeCloseTo(11, 12);
  });

  it('opens a flat line to the least height', () => {
    const [low, high] = axisEnds({ low: 5, high: 5 }, 2);
    expect(high - low).toBeCloseTo(2.4, 12);
    expect((low + high) / 2).toBeCloseTo(5, 12);
  });

  it('has ends even for a flat zero and for nothing', () => {
    const [low, high] = axisEnds({ low: 0, high: 0 }, 0);
    expect(low).toBeLessThan(high);
    expect(axisEnds(null, 0)).toEqual([-1, 1]);
  });
});
