import { Matrix, inverse } from 'ml-matrix';

import type { SegmentPoints } from '../segment-points';

/**
 * Leave-lot-out score with dense matrices and none of the code under test: the spline as a Gaussian process with a diffuse line,
 * Cov(g(s), g(t)) = (1/λ) (min² (3 max − min) / 6), times counted from the first point (Wahba 1978, JRSS B 40, 364). The other
 * lots' points give the posterior mean and covariance at the lot's points by generalised least squares (kriging with a line).
 */
export function naiveScore(points: SegmentPoints, inFit: (lot: number) => boolean, lambda: number, lot: number) {
  const all = Array.from(points.t, (_, i) => i);
  const own = all.filter((i) => points.lot[i] === lot);
  const others = all.filter((i) => points.lot[i] !== lot && inFit(points.lot[i]));
  const scale = points.t[points.t.length - 1] - points.t[0];
  const time = (i: number) => (points.t[i] - points.t[0]) / scale;
  const kernel = (rows: number[], columns: number[]) =>
    new Matrix(
      rows.map((i) =>
        columns.map((j) => {
          const [low, high] = [Math.min(time(i), time(j)), Math.max(time(i), time(j))];
          return ((scale ** 3 / lambda) * (low * low * (3 * high - low))) / 6;
        }),
      ),
    );
  const line = (rows: number[]) => new Matrix(rows.map((i) => [1, time(i)]));
  const noise = (rows: number[]) => Matrix.diag(rows.map((i) => 1 / points.weight[i]));
  const y = (rows: number[]) => Matrix.columnVector(rows.map((i) => points.y[i]));

  const precision = inverse(kernel(others, others).add(noise(others)));
  const design = line(others);
  const lineCov = inverse(design.transpose().mmul(precision).mmul(design));
  const beta = lineCov.mmul(design.transpose()).mmul(precision).mmul(y(others));
  const cross = kernel(own, others).mmul(precision);
  const mean = line(own)
    .mmul(beta)
    .add(cross.mmul(y(others).sub(design.mmul(beta))));
  const drift = line(own).sub(cross.mmul(design));
  const covariance = kernel(own, own)
    .sub(cross.mmul(kernel(others, own)))
    .add(drift.mmul(lineCov).mmul(drift.transpose()))
    .add(noise(own));
  const total = own.reduce((sum, i) => sum + points.count[i], 0);
  const a = Matrix.columnVector(own.map((i) => points.count[i] / total));
  const residual = a.transpose().mmul(y(own).sub(mean)).get(0, 0);
  const sd = Math.sqrt(a.transpose().mmul(covariance).mmul(a).get(0, 0));
  return { residual, sd, z: residual / sd };
}
