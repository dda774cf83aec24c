import { mergeColumns } from './columns';

describe('mergeColumns', () => {
  const columns = { at: [0, 1, 2, 3, 4, 5], low: [5, 4, 3, 2, 1, 0], high: [6, 9, 4, 3, 8, 1] };

  it('keeps the extremes of each part', () => {
    expect(mergeColumns(columns, 0, 6, 2)).toEqual({ at: [1.5, 4.5], low: [3, 0], high: [9, 8] });
  });

  it('leaves out what lies outside the range', () => {
    expect(mergeColumns(columns, 2, 4, 1)).toEqual({ at: [3], low: [1], high: [8] });
  });

  it('answers nothing for an empty range or no columns', () => {
    const nothing = { at: [], low: [], high: [] };
    expect(mergeColumns(columns, 3, 3, 10)).toEqual(nothing);
    expect(mergeColumns(columns, 0, 6, NaN)).toEqual(nothing);
    expect(mergeColumns({ at: [], low: [], high: [] }, 0, 1, 5)).toEqual(nothing);
  });

  it('loses no extreme of a long series', () => {
    const at = Array.from({ length: 5000 }, (_, i) => i);
    const value = at.map((i) => Math.sin(i / 40) + (i === 3210 ? 7 : 0));
    const merged = mergeColumns({ at, low: value, high: value }, 0, 5000, 300);
    expect(merged.at.length).toBe(300);
    expect(Math.max(...merged.high)).toBe(Math.max(...value));
    expect(Math.min(...merged.low)).toBe(Math.min(...value));
  });
});
