/** d₂ for ranges of two, as printed in the NIST/SEMATECH e-Handbook 6.3.2.2 (1.12838 unrounded). */
export const D2_OF_TWO = 1.128;
/** D₄ for ranges of two, as printed there (3.26653 unrounded). */
export const D4_OF_TWO = 3.267;
/** Half width of the control limits in standard deviations (ISO 7870-2). */
const MULTIPLE = 3;

export type IndividualsChart =
  | {
      status: 'computed';
      count: number;
      centre: number;
      meanMovingRange: number;
      /** Three standard deviations, 3 · mean moving range / 1.128. */
      halfWidth: number;
      lower: number;
      upper: number;
      movingRangeUpper: number;
    }
  | { status: 'insufficient'; reason: 'too_few' | 'non_finite' | 'constant' };

/**
 * Individuals chart: centre x̄, control limits x̄ ± 3 · MR̄ / 1.128 with MR the absolute differences of successive values, and
 * the upper control limit 3.267 · MR̄ of the moving range (ISO 7870-2; NIST/SEMATECH e-Handbook 6.3.2.2).
 *
 * @param values in time order, in the characteristic's unit; two or more finite numbers that are not all equal
 * @returns computed, or insufficient with the reason: constant values would give limits that every other value breaks
 * @example individualsChart([1, 2, 1]) // centre 1.3333, meanMovingRange 1
 */
export function individualsChart(values: ArrayLike<number>): IndividualsChart {
  const n = values.length;
  for (let i = 0; i < n; i += 1)
    if (!Number.isFinite(values[i])) return { status: 'insufficient', reason: 'non_finite' };
  if (!(n >= 2)) return { status: 'insufficient', reason: 'too_few' };
  let sum = values[0];
  let ranges = 0;
  for (let i = 1; i < n; i += 1) {
    sum += values[i];
    ranges += Math.abs(values[i] - values[i - 1]);
  }
  if (!(ranges > 0)) return { status: 'insufficient', reason: 'constant' };
  const centre = sum / n;
  const meanMovingRange = ranges / (n - 1);
  const halfWidth = (MULTIPLE * meanMovingRange) / D2_OF_TWO;
  return {
    status: 'computed',
    count: n,
    centre,
    meanMovingRange,
    halfWidth,
    lower: centre - halfWidth,
    upper: centre + halfWidth,
    movingRangeUpper: D4_OF_TWO * meanMovingRange,
  };
}
