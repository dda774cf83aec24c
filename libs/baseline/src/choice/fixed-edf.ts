import { BaselineError } from '../baseline-error';

/** Relative precision of the degrees of freedom reached. */
const EDF_TOLERANCE = 1e-10;
/** Between the slopes of the inside and of the ends. */
const START_SLOPE = -0.5;
/** Largest step in log lambda. */
const LONGEST_STEP = 12;
/** Steps before the search gives up; it takes five to fifteen. */
const MAX_STEPS = 200;

/**
 * The penalty whose fit has given effective degrees of freedom. tr S falls from the number of distinct times m to 2 as lambda grows, and
 * log((edf - 2)/(m - edf)) is close to linear in log lambda (slope -1 near both ends, about -1/4 between): secant steps on it, kept inside the bracket found
 * so far.
 * @param edfAt tr S of a penalty, decreasing @param wanted inside (2, m) @param distinct m @param start a penalty to begin with @param slope of the logarithm there, by log lambda
 * @returns lambda and the degrees of freedom there, wanted to 1e-10 (relative) or the nearest double precision allows
 * @throws BaselineError 'bad-argument' outside (2, m); 'ill-posed' when no double reaches it
 */
export function penaltyForEdf(
  edfAt: (lambda: number) => number,
  wanted: number,
  distinct: number,
  start: number,
  slope = START_SLOPE,
): { lambda: number; edf: number } {
  checkEdf(wanted, distinct);
  const target = Math.log((wanted - 2) / (distinct - wanted));
  let low = -Infinity;
  let high = Infinity;
  let x = Math.log(start);
  let best = { lambda: start, edf: NaN, miss: Infinity };
  let before = { x: NaN, f: NaN };
  let steepness = slope;
  for (let k = 0; k < MAX_STEPS; k++) {
    const lambda = Math.exp(x);
    if (!(lambda > 0 && lambda < Infinity)) break;
    const edf = edfAt(lambda);
    const miss = Math.abs(edf - wanted);
    if (miss < best.miss) best = { lambda, edf, miss };
    if (miss <= EDF_TOLERANCE * Math.min(wanted, wanted - 2 + 1e-3)) return best;
    if (edf > wanted) low = Math.max(low, x);
    else high = Math.min(high, x);
    if (high - low <= 4e-16 * Math.max(1, Math.abs(x))) return best;
    const f = logEdfOdds(edf, distinct) - target;
    const secant = (f - before.f) / (x - before.x);
    if (secant < -0.05 && secant > -4) steepness = secant;
    before = { x, f };
    x = nextStep(x, f, steepness, low, high);
    if (Math.abs(x - before.x) <= 1e-14 * Math.max(1, Math.abs(x))) break;
  }
  if (best.miss <= 1e-6 * wanted) return best;
  throw new BaselineError('ill-posed', `No penalty within double precision gives ${wanted} degrees of freedom.`);
}

/** @throws BaselineError unless 2 < edf < distinct */
export function checkEdf(wanted: number, distinct: number): void {
  if (!(wanted > 2 && wanted < distinct))
    throw new BaselineError(
      Number.isNaN(wanted) ? 'non-finite' : 'bad-argument',
      `The degrees of freedom of a smoothing spline lie between 2 and the number of distinct times, here ${distinct}.`,
    );
}

/** log((edf - 2)/(distinct - edf)); rounding may put the degrees of freedom on or past their limits. */
export function logEdfOdds(edf: number, distinct: number): number {
  return Math.log(Math.max(1e-15, edf - 2) / Math.max(1e-15, distinct - edf));
}

function nextStep(x: number, f: number, slope: number, low: number, high: number): number {
  const step = Math.max(-LONGEST_STEP, Math.min(LONGEST_STEP, -f / slope));
  const next = x + step;
  if (next > low && next < high) return next;
  return Number.isFinite(low + high) ? 0.5 * (low + high) : next;
}
