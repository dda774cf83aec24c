import { arrange } from './arranged';
import type { Series } from './series';

const series = (rows: [number, number, number, string?][]): Series => {
  const names = [...new Set(rows.flatMap((row) => row[3] ?? []))];
  return {
    t: Float64Array.from(rows, (row) => row[0]),
    y: Float64Array.from(rows, (row) => row[1]),
    w: Float64Array.from(rows, (row) => row[2]),
    lot: names.length > 0 ? Int32Array.from(rows, (row) => names.indexOf(row[3]!)) : undefined,
    lotNames: names,
    timeKind: 'number',
    zonelessCount: 0,
  };
};

describe('a series in time order', () => {
  it('has a lot a row without a column lot, and an idle lot of its own for a row of weight 0', () => {
    const { obs, rowOf, homeLot, homeCount } = arrange(
      series([
        [30, 3, 2],
        [10, 1, 0],
        [20, 2, 1],
      ]),
    );
    expect(rowOf).toEqual(Int32Array.of(1, 2, 0));
    expect(obs.t).toEqual(Float64Array.of(10, 20, 30));
    expect(obs.weight).toEqual(Float64Array.of(1, 1, 2));
    expect(obs.lot).toEqual(Int32Array.of(2, 0, 1));
    expect(obs.pulls).toEqual(Float64Array.of(1, 1, 0));
    expect(homeLot).toEqual(Int32Array.of(-1, 0, 1));
    expect(homeCount).toBe(2);
  });

  it('names lots by the time of their first row and remembers where rows of weight 0 belong', () => {
    const { obs, lotNames, homeLot } = arrange(
      series([
        [30, 3, 1, 'C'],
        [10, 1, 1, 'B'],
        [20, 2, 0, 'B'],
        [40, 4, 0, 'A'],
        [20, 5, 1, 'C'],
      ]),
    );
    expect(lotNames).toEqual(['B', 'C', 'A']);
    expect(homeLot).toEqual(Int32Array.of(0, 0, 1, 1, 2));
    expect(obs.lot).toEqual(Int32Array.of(0, 3, 1, 1, 4));
    expect(obs.pulls).toEqual(Float64Array.of(1, 1, 1, 0, 0));
  });

  it('leaves rows of one time in the order of the file', () => {
    expect(
      arrange(
        series([
          [2, 0, 1],
          [1, 0, 1],
          [2, 1, 1],
          [1, 1, 1],
        ]),
      ).rowOf,
    ).toEqual(Int32Array.of(1, 3, 0, 2));
  });

  it('is refused without a row that weighs', () => {
    expect(() => arrange(series([]))).toThrow('there are no rows below the header');
    expect(() =>
      arrange(
        series([
          [1, 2, 0],
          [2, 2, 0],
        ]),
      ),
    ).toThrow('every row has weight 0');
  });
});
