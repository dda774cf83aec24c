import type { Candidate } from './criteria';
import { LOG_TOLERANCE, type Evaluate } from './search-lambda';

/** The minimum from which one standard error is allowed. */
export interface WithinOneStandardError extends Candidate {
  /** Of the criterion at the minimum. */
  standardError: number;
}

/**
 * One-standard-error rule: the smoothest candidate whose criterion is at most the minimum plus one standard error (Breiman, Friedman, Olshen & Stone 1984,
 * 3.4.3; Hastie, Tibshirani & Friedman 2009, 7.10). Where there is something between two candidates (lambda) the crossing is found by bisection in its logarithm.
 * @param best the minimum @param standardError of the criterion there
 * @param smoother the candidates smoother than `best`, in order of increasing smoothing @param evaluate for penalties
 */
export function smoothestWithinOneStandardError(
  best: Candidate,
  standardError: number,
  smoother: readonly Candidate[],
  evaluate?: Evaluate,
): Candidate {
  const allowed = best.value + standardError;
  let inside = best;
  let outside: Candidate | undefined;
  for (const c of smoother) {
    if (c.value <= allowed) {
      inside = c;
      outside = undefined;
    } else {
      outside ??= c;
    }
  }
  if (outside === undefined || evaluate === undefined) return inside;
  let to = outside.smoothness;
  while (to / inside.smoothness - 1 > LOG_TOLERANCE) {
    const middle = evaluate(Math.sqrt(inside.smoothness * to));
    if (middle.value <= allowed) inside = middle;
    else to = middle.smoothness;
  }
  return inside;
}
