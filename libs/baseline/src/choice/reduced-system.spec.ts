import { determinant, inverse, Matrix } from 'ml-matrix';
import { prepareSeries } from '../prepared-series';
import { wavySeries } from '../testing/series';
import { ReducedSolver } from './reduced-solver';
import { BAND, coarsened, reducedSystem } from './reduced-system';

/** The cubic B-spline of unit spacing that begins at 0, and its second derivative, by de Boor's recursion and by differences of hats. */
function bSpline(x: number, degree = 3): number {
  if (degree === 0) return x >= 0 && x < 1 ? 1 : 0;
  return (x * bSpline(x, degree - 1) + (degree + 1 - x) * bSpline(x - 1, degree - 1)) / degree;
}
const bend = (x: number) => bSpline(x, 1) - 2 * bSpline(x - 1, 1) + bSpline(x - 2, 1);

function dense(band: Float64Array): Matrix {
  const size = band.length / BAND;
  const full = Matrix.zeros(size, size);
  for (let j = 0; j < size; j++) {
    for (let d = 0; d < BAND && j + d < size; d++) {
      full.set(j, j + d, band[BAND * j + d]);
      full.set(j + d, j, band[BAND * j + d]);
    }
  }
  return full;
}

const series = prepareSeries(wavySeries(300, 61, (i) => i, [0, 17, 299]));
const pulling = [...series.pull.keys()].filter((i) => series.pull[i] > 0);
const position = (i: number) => {
  const { t } = series.obs;
  return (t[i] - t[pulling[0]]) / (t[pulling[pulling.length - 1]] - t[pulling[0]]);
};
/** Rows of B at the pulling points; the last point belongs to the last interval. */
const basis = (intervals: number) =>
  new Matrix(
    pulling.map((i) =>
      Array.from({ length: intervals + 3 }, (_, j) =>
        bSpline(Math.min(position(i) * intervals, intervals - 1e-12) - (j - 3)),
      ),
    ),
  );

describe('the normal equations of the reduced basis', () => {
  it.each([4, 16, 64])('are B W B and B W r of B-splines by recursion (%p intervals)', (intervals) => {
    const system = reducedSystem(series, intervals);
    const b = basis(intervals);
    const w = Matrix.diag(pulling.map((i) => series.pull[i]));
    const gram = b.transpose().mmul(w).mmul(b);
    expect(Matrix.sub(dense(system.gram), gram).max()).toBeLessThan(1e-9);
    expect(Matrix.sub(dense(system.gram), gram).min()).toBeGreaterThan(-1e-9);
    const moment = b
      .transpose()
      .mmul(w)
      .mmul(Matrix.columnVector(pulling.map((i) => series.r[i])));
    system.moment.forEach((v, j) => expect(Math.abs(v - moment.get(j, 0))).toBeLessThan(1e-9));
  });
  it('penalise the integral of the squared second derivative, exactly', () => {
    const { penalty } = reducedSystem(series, 8);
    // Simpson's rule is exact for the products of two lines in each interval.
    const integral = (j: number, k: number) => {
      let sum = 0;
      for (let cell = 0; cell < 8; cell++) {
        for (const [x, share] of [
          [1e-12, 1],
          [0.5, 4],
          [1 - 1e-12, 1],
        ])
          sum += (share / 6) * bend(cell + x - (j - 3)) * bend(cell + x - (k - 3));
      }
      return sum * 8 ** 3;
    };
    for (let j = 0; j < 11; j++)
      for (let d = 0; d < BAND && j + d < 11; d++)
        expect(Math.abs(penalty[BAND * j + d] - integral(j, j + d))).toBeLessThan(1e-7);
  });
  it('on half as many intervals are those formed there', () => {
    const half = coarsened(reducedSystem(series, 32));
    const direct = reducedSystem(series, 16);
    half.gram.forEach((v, i) => expect(Math.abs(v - direct.gram[i])).toBeLessThan(1e-12));
    half.moment.forEach((v, i) => expect(Math.abs(v - direct.moment[i])).toBeLessThan(1e-12));
    expect(half.penalty).toEqual(direct.penalty);
    expect(half.logConstant).toBe(direct.logConstant);
  });
  it.each([1e-4, 1, 1e4])('are solved as dense algebra does (lambda %p)', (lambda) => {
    const system = reducedSystem(series, 16);
    const solver = new ReducedSolver(16);
    expect(solver.solve(system, lambda)).toBe(true);
    const gram = dense(system.gram);
    const a = Matrix.add(gram, Matrix.mul(dense(system.penalty), lambda));
    const c = inverse(a).mmul(Matrix.columnVector([...system.moment]));
    expect(solver.edf).toBeCloseTo(inverse(a).mmul(gram).trace(), 6);
    expect(solver.square).toBeCloseTo(c.transpose().mmul(gram).mmul(c).get(0, 0), 6);
    expect(solver.explained).toBeCloseTo(
      Matrix.rowVector([...system.moment])
        .mmul(c)
        .get(0, 0),
      6,
    );
    expect(solver.logDet).toBeCloseTo(Math.log(determinant(a)), 6);
  });
});
