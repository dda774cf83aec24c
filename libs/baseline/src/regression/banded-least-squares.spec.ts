import { QrDecomposition, Matrix } from 'ml-matrix';
import { lcg } from '../testing/lcg';
import { worstDifference } from '../testing/reference';
import { BandedLeastSquares, solveTransposed } from './banded-least-squares';

/** Random rows of a banded system, by first column. */
function rows(n: number, dimension: number, width: number, seed: number) {
  const uniform = lcg(seed);
  return Array.from({ length: n }, (_, i) => ({
    first: Math.floor((i * (dimension - width + 1)) / n),
    values: Float64Array.from({ length: width }, () => uniform() - 0.3),
    scale: 0.5 + uniform(),
    y: uniform() * 10,
  }));
}

function dense(list: ReturnType<typeof rows>, dimension: number): { x: Matrix; y: Matrix } {
  const x = Matrix.zeros(list.length, dimension);
  list.forEach((row, i) => row.values.forEach((v, d) => x.set(i, row.first + d, row.scale * v)));
  return { x, y: Matrix.columnVector(list.map((row) => row.scale * row.y)) };
}

describe('least squares by rotations', () => {
  it.each([
    [1, 1],
    [3, 3],
    [7, 4],
    [12, 2],
  ])('agree with a dense QR: %p unknowns, rows of %p', (dimension, width) => {
    const list = rows(60, dimension, width, 3);
    const { x, y } = dense(list, dimension);
    const expected = new QrDecomposition(x).solve(y).to1DArray();
    const residual = Matrix.sub(y, x.mmul(Matrix.columnVector(expected))).norm();
    const inOrder = new BandedLeastSquares(dimension, width);
    for (const row of list) inOrder.add(row.first, row.values, 0, row.scale, row.y);
    const shuffled = new BandedLeastSquares(dimension, width);
    for (const k of list.keys()) {
      const row = list[(k * 37) % 60];
      shuffled.add(row.first, row.values, 0, row.scale, row.y);
    }
    for (const system of [inOrder, shuffled]) {
      expect(worstDifference(system.solve(), expected)).toBeLessThan(1e-11);
      expect(Math.abs(system.rss - residual ** 2)).toBeLessThan(1e-10);
      const z = new Float64Array(dimension);
      z[0] = 1;
      solveTransposed(system.r, width, z, 0);
      const first = x.transpose().mmul(x);
      const inverse = new QrDecomposition(first).solve(Matrix.eye(dimension));
      expect(z.reduce((sum, v) => sum + v * v, 0)).toBeCloseTo(inverse.get(0, 0), 9);
    }
  });

  it('keep the digits that normal equations lose: columns that differ by 1e-7', () => {
    const system = new BandedLeastSquares(2, 2);
    const small = 2 ** -27;
    // y = 3 a - 2 b exactly.
    for (const x of [0, 1, 2, 3]) system.add(0, Float64Array.of(1, 1 + small * x), 0, 1, 1 - 2 * small * x);
    const [a, b] = system.solve();
    expect(Math.abs(a - 3) + Math.abs(b + 2)).toBeLessThan(1e-7);
  });

  it('say when the rows do not determine an unknown', () => {
    const system = new BandedLeastSquares(3, 2);
    system.add(0, Float64Array.of(1, 2), 0, 1, 1);
    system.add(0, Float64Array.of(2, 1), 0, 1, 1);
    expect(system.undeterminedColumn()).toBe(2);
    expect(() => system.solve()).toThrow(expect.objectContaining({ code: 'ill-posed' }));
    system.add(1, Float64Array.of(0, 1), 0, 1, 1);
    expect(system.undeterminedColumn()).toBe(-1);
    system.clear();
    expect(system.undeterminedColumn()).toBe(0);
  });

  it.each([
    [0, 1],
    [2, 3],
    [2, 0],
    [1.5, 1],
  ])('refuse %p unknowns with rows of %p', (dimension, width) => {
    expect(() => new BandedLeastSquares(dimension, width)).toThrow(expect.objectContaining({ code: 'bad-argument' }));
  });
});
