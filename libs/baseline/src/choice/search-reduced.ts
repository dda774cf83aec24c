import type { PreparedSeries } from '../prepared-series';
import { BaselineError } from '../baseline-error';
import type { Candidate } from './criteria';
import type { PenaltyRule } from './exact-criterion';
import { logEdfOdds, penaltyForEdf } from './fixed-edf';
import { ReducedCriterion } from './reduced-criterion';
import { bestOf, isNear, searchLambda, type Evaluate, type LambdaSearch } from './search-lambda';

/** Intervals a degree of freedom, and what is tried when the exact fit shows that points are too uneven for that. */
const RATIOS = [32, 128];
/** Largest relative difference from the exact degrees of freedom at the choice. */
const EDF_AGREEMENT = 1e-3;

/** Up to so many points, penalties for which the basis is too coarse are looked at exactly; in longer series they are left alone. */
const MOST_EXACT_POINTS = 20000;

/**
 * The search of searchLambda by the reduced criterion, with one exact evaluation at the best minimum, which replaces it in the answer. Penalties for which no basis
 * is fine enough (more than 1,600 degrees of freedom, or a tenth of the points) are evaluated exactly in series of up to 20,000 points. In longer ones the
 * curve begins above them: a second minimum there, beyond a rise, is not found.
 * @param exact the criterion itself @param atBest the same, for the one evaluation at the best minimum
 * @returns undefined where the basis does not serve: the criterion still falls at the end of what it can resolve, the exact degrees of freedom differ by more
 *   than 0.1 %, or digits were lost
 */
export function searchReduced(
  series: PreparedSeries,
  rule: PenaltyRule,
  low: number,
  high: number,
  exact: Evaluate,
  atBest: Evaluate = exact,
): LambdaSearch | undefined {
  for (const ratio of RATIOS) {
    const reduced = new ReducedCriterion(series, low, ratio);
    const from = series.n > MOST_EXACT_POINTS ? Math.max(low, reduced.lowest) : low;
    if (!(from < high)) return undefined;
    let hasFailed = false;
    const evaluatorFrom = (least: number): Evaluate => {
      if (least < reduced.lowest * (1 - 1e-9)) return exact;
      const evaluate = reduced.evaluatorFrom(least, rule);
      return (lambda) => {
        const candidate = evaluate(lambda);
        if (Number.isNaN(candidate.value)) hasFailed = true;
        return candidate;
      };
    };
    const search = searchLambda(from, high, evaluatorFrom);
    const best = bestOf(search.minima);
    if (hasFailed || best === undefined) return undefined;
    if (from > low && search.minima.some((c) => isNear(c.smoothness, from))) return undefined;
    const there = atBest(best.smoothness);
    if (Math.abs(there.edf - best.edf) <= EDF_AGREEMENT * there.edf)
      return { curve: search.curve, minima: replaced(search.minima, best, there) };
  }
  return undefined;
}

function replaced(minima: readonly Candidate[], one: Candidate, by: Candidate): Candidate[] {
  return minima.map((c) => (c === one ? by : c));
}

/** Half the step in log lambda over which a slope is taken. */
const SLOPE_STEP = 0.05;

/**
 * A penalty close to that of given degrees of freedom, and the slope of their log odds there (see penaltyForEdf).
 * @param even the penalty they have on points even in time; that of uneven points is smaller
 * @returns undefined where the basis does not serve
 */
export function reducedStart(
  series: PreparedSeries,
  edf: number,
  distinct: number,
  even: number,
): { start: number; slope: number } | undefined {
  const reduced = new ReducedCriterion(series, even / 16, RATIOS[0]);
  if (even < reduced.lowest) return undefined;
  const edfAt = (lambda: number) => reduced.edfAt(lambda);
  try {
    const start = penaltyForEdf(edfAt, edf, distinct, even).lambda;
    const [less, more] = [-SLOPE_STEP, SLOPE_STEP].map((step) => logEdfOdds(edfAt(start * Math.exp(step)), distinct));
    return { start, slope: (more - less) / (2 * SLOPE_STEP) };
  } catch (error) {
    if (error instanceof BaselineError) return undefined;
    throw error;
  }
}
