import type { Candidate } from './criteria';
import { minimiseInside } from './minimise';

/** A criterion at a penalty. An inadmissible penalty has the value +Infinity. */
export type Evaluate = (lambda: number) => Candidate;

export interface LambdaSearch {
  /** The grid that was looked at, in increasing lambda, without inadmissible penalties. */
  curve: Candidate[];
  /** Every local minimum of the curve, refined, in increasing lambda. */
  minima: Candidate[];
}

/** Points of the grid in log lambda before Brent's method refines each minimum. */
const GRID_POINTS = 25;
/** Precision of log lambda: 0.01 % of lambda moves no fitted value by more than 3e-5 of the part that is smoothed away. */
export const LOG_TOLERANCE = 1e-4;

/**
 * Looks at 25 penalties evenly spaced in log lambda and refines each local minimum among them by Brent's method between its neighbours, since the criteria
 * can have several. A minimum at an end of the range is that end, exactly.
 * @param low, high range of lambda, 0 < low < high < Infinity
 * @param evaluatorFrom gives the criterion for penalties from `lambda` up to two steps of the grid above
 */
export function searchLambda(low: number, high: number, evaluatorFrom: (lambda: number) => Evaluate): LambdaSearch {
  const last = GRID_POINTS - 1;
  const grid = Array.from({ length: GRID_POINTS }, (_, i) =>
    i === 0 ? low : i === last ? high : low * (high / low) ** (i / last),
  );
  const tried = grid.map((lambda) => evaluatorFrom(lambda)(lambda));
  const minima: Candidate[] = [];
  for (let i = 0; i <= last; i++) {
    if (!isLocalMinimum(tried, i)) continue;
    const from = grid[Math.max(0, i - 1)];
    const evaluate = evaluatorFrom(from);
    const start = evaluate === evaluatorFrom(grid[i]) ? tried[i] : evaluate(grid[i]);
    const found = refine(from, grid[Math.min(last, i + 1)], start, evaluate);
    const minimum = isNear(found.smoothness, low) ? tried[0] : isNear(found.smoothness, high) ? tried[last] : found;
    if (minima.length === 0 || !isNear(minimum.smoothness, minima[minima.length - 1].smoothness)) minima.push(minimum);
  }
  return { curve: tried.filter((c) => Number.isFinite(c.value)), minima };
}

/** Whether two penalties are the same to the precision of the search. */
export function isNear(a: number, b: number): boolean {
  return Math.abs(Math.log(a / b)) <= 4 * LOG_TOLERANCE;
}

/** Of a plateau only the smoothest is a minimum. */
function isLocalMinimum(tried: Candidate[], i: number): boolean {
  const { value } = tried[i];
  return (
    Number.isFinite(value) &&
    (i === 0 || value <= tried[i - 1].value) &&
    (i === tried.length - 1 || value < tried[i + 1].value)
  );
}

function refine(from: number, to: number, start: Candidate, evaluate: Evaluate): Candidate {
  let best = start;
  const wrapped = (x: number) => {
    const tried = evaluate(Math.exp(x));
    if (tried.value < best.value) best = tried;
    return tried.value;
  };
  minimiseInside(wrapped, Math.log(from), Math.log(to), LOG_TOLERANCE);
  return best;
}

/** The best of several candidates; of equal ones the last, which is the smoothest when they are in order of lambda. */
export function bestOf(candidates: readonly Candidate[]): Candidate | undefined {
  let best: Candidate | undefined;
  for (const c of candidates) if (best === undefined || c.value <= best.value) best = c;
  return best;
}
