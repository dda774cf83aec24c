import type { StepEstimates } from '../baseline-fit';
import { dot, solveTransposed } from './banded-least-squares';
import type { RegressionSystem } from './regression-system';

/** Below this share of the weight on the step's lighter side, x' A x is what rounding left. */
const NO_DIGITS = 1e-11;

/**
 * For each point the step that begins there: x'Ax = sum of w over the side - |R^-T (sum of w b over the side)|^2 and x'Ay = sum of w e, w = V W.
 * A 1 = 0, so that the side before the step serves as well as the one after it; the lighter is taken, which loses fewer digits.
 * @param residual value minus baseline at each point
 */
export function regressionSteps(system: RegressionSystem, residual: Float64Array): StepEstimates {
  const { series, fit, first, rows } = system;
  const { n, pull, weightScale } = series;
  const { width, dimension, r } = fit;
  const estimate = new Float64Array(n);
  const standardError = new Float64Array(n).fill(Infinity);
  const z = new Float64Array(dimension);
  const side = new Float64Array(dimension);
  let total = 0;
  for (let i = 0; i < n; i++) total += pull[i];
  const half = total / 2;

  const isBefore = new Uint8Array(n);
  for (const direction of [1, -1]) {
    side.fill(0);
    let weight = 0;
    let sum = 0;
    let start = dimension;
    for (let step = 0; step < n; step++) {
      const i = direction > 0 ? step : n - 1 - step;
      if (direction > 0) {
        if (weight > half) break;
        isBefore[i] = 1;
        write(i, weight, sum, start, -1);
      }
      const w = pull[i];
      weight += w;
      sum += w * residual[i];
      if (w > 0) {
        for (let d = 0; d < width; d++) side[first[i] + d] += w * rows[width * i + d];
        start = Math.min(start, first[i]);
      }
      if (direction < 0) {
        if (isBefore[i] === 1) break;
        write(i, weight, sum, start, 1);
      }
    }
  }
  return { estimate, standardError };

  function write(k: number, weight: number, sum: number, start: number, sign: number): void {
    z.set(side);
    solveTransposed(r, width, z, Math.min(start, dimension - 1));
    const information = weight - dot(z, z);
    if (!(information > NO_DIGITS * weight)) return;
    estimate[k] = (sign * sum) / information;
    standardError[k] = 1 / Math.sqrt(information * weightScale);
  }
}
