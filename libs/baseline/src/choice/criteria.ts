import type { LotScores } from '../baseline-fit';
import type { Observations } from '../observations';

/** One smoothness that was looked at. Values are always finite; a candidate without one is left out. */
export interface Candidate {
  /** lambda (weight * s^3), number of interior knots, or degree. */
  smoothness: number;
  /** Effective degrees of freedom of its fit. */
  edf: number;
  /** The criterion there; smaller is better. */
  value: number;
}

/** A criterion whose terms are one a lot, and the standard error of it. */
export interface LotCriterion {
  value: number;
  standardError: number;
}

/** Inflation of the 'gcv14' rule (Kim & Gu 2004, J. R. Statist. Soc. B 66:337). */
export const GCV_INFLATION = 1.4;

/**
 * Generalised cross-validation, N RSS / (N - gamma edf)^2 (Craven & Wahba 1979, Numer. Math. 31:377; gamma: Kim & Gu 2004).
 * @param pullCount N, points that pull @param rss weighted sum of squares left @param edf tr S @param inflation gamma, >= 1
 * @returns +Infinity once gamma edf >= N
 */
export function generalisedCrossValidation(pullCount: number, rss: number, edf: number, inflation: number): number {
  const rest = pullCount - inflation * edf;
  return rest > 0 ? (pullCount * rss) / (rest * rest) : Infinity;
}

/**
 * Mean of one term a lot and the standard error of that mean, sd / sqrt(J) (Breiman, Friedman, Olshen & Stone 1984, 3.4.3;
 * Hastie, Tibshirani & Friedman 2009, 7.10).
 * @param terms at least `count` numbers, >= 0 @param count J, lots that pull
 */
export function meanOfTerms(terms: Float64Array, count: number): LotCriterion {
  let sum = 0;
  let largest = 0;
  for (let j = 0; j < count; j++) {
    sum += terms[j];
    largest = Math.max(largest, terms[j]);
  }
  const value = sum / count;
  if (!(largest > 0 && count > 1)) return { value, standardError: 0 };
  let squares = 0;
  for (let j = 0; j < count; j++) squares += ((terms[j] - value) / largest) ** 2;
  return { value, standardError: largest * Math.sqrt(squares / (count - 1) / count) };
}

/**
 * Leave-one-lot-out cross-validation of any fit: (1/J) sum over the J pulling lots of W_j r_j^2, with r_j the weighted mean of the lot's residuals from
 * the baseline without it and W_j the sum of its weights in the fit. With weights of 1 and lots of one point it is the ordinary leave-one-out score.
 * @param scores of the fit, with the weights as counts (so that r_j is the weighted mean)
 * @returns undefined when a pulling lot cannot be left out: the fit has nothing to be judged by there
 */
export function leaveLotOutCriterion(obs: Observations, scores: LotScores): LotCriterion | undefined {
  const { weight, lot, pulls } = obs;
  for (const j of scores.undetermined) if (pulls[j] > 0) return undefined;
  const total = new Float64Array(pulls.length);
  for (let i = 0; i < lot.length; i++) total[lot[i]] += weight[i] * pulls[lot[i]];
  const terms = new Float64Array(pulls.length);
  let count = 0;
  for (let j = 0; j < pulls.length; j++) {
    if (total[j] > 0) terms[count++] = total[j] * scores.residual[j] * scores.residual[j];
  }
  return meanOfTerms(terms, count);
}
