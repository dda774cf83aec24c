import { BaselineError, type BaselineFit } from '@app/baseline';

import type { ChosenPoints } from './segment-points';

/** A lot against the baseline fitted without it. */
export interface LotScore {
  /** r = aᵀ e₋ⱼ, lot mean minus that baseline, unit. */
  residual: number;
  /** √(aᵀ Cov a), unit. */
  sd: number;
  /** z = r / √Var r, before the reference period's centre and scale. */
  z: number;
}

/**
 * Scores of all chosen lots, with a the count weights of a lot's points: r = aᵀ e₋ⱼ, z = r / √(aᵀ Cov(e₋ⱼ) a).
 *
 * @returns by place among the chosen; null for a lot without which the others do not determine a baseline
 */
export function scoresOf(fit: BaselineFit, { count }: ChosenPoints): (LotScore | null)[] {
  const { residual, variance, undetermined } = fit.scoreLots(count);
  const scores = Array.from(residual, (r, place): LotScore | null => {
    const sd = Math.sqrt(variance[place]);
    return { residual: r, sd, z: r / sd };
  });
  for (const place of undetermined) scores[place] = null;
  return scores;
}

/**
 * As `scoresOf`, where every lot must have one.
 * @throws BaselineError insufficient-data when a lot has none
 */
export function allScores(fit: BaselineFit, chosen: ChosenPoints): LotScore[] {
  return scoresOf(fit, chosen).map((score, place) => {
    if (score === null)
      throw new BaselineError('insufficient-data', `Without lot ${place} the others do not determine a baseline.`);
    return score;
  });
}
