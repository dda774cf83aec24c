import { jStat } from 'jstat';

import { ControlError } from './control-error';

/** How the limit is stated, and how many looks it has to stand up to. */
export interface HoldLimitRequest {
  /** A multiple L of the standard deviation, or a budget B of false holds a week for the plant. */
  by: { multiple: number } | { falseHoldsPerWeek: number };
  lotsPerWeek: number;
  channels: number;
  /** Of the scale: m − 1 for m reference lots by standard deviation, 0.6 (m − 1) by moving range. */
  degreesOfFreedom: number;
}

export interface HoldLimit {
  /** L: a lot is outside when its score is beyond ±L. */
  limit: number;
  /** Share of good lots that one look holds. */
  falseHoldShare: number;
  /** Of the plant, over all looks. */
  falseHoldsPerWeek: number;
}

/** Each lot is looked at about twice before its verdict settles. */
export const LOOKS_PER_LOT = 2;

/**
 * The limit L on scores, by multiple or by budget, and the other way of saying it. With M = lots a week · channels · 2 looks,
 * L = t⁻¹(1 − B / (2M)) with Student's t, since the scale is estimated from the reference lots.
 *
 * @param request numbers above 0; a budget below M
 * @throws ControlError bad-argument
 * @example holdLimit({ by: { multiple: 3 }, lotsPerWeek: 84, channels: 3, degreesOfFreedom: 24 }).falseHoldShare // 0.0062
 */
export function holdLimit({ by, lotsPerWeek, channels, degreesOfFreedom }: HoldLimitRequest): HoldLimit {
  const looks = lotsPerWeek * channels * LOOKS_PER_LOT;
  if (!(looks > 0 && degreesOfFreedom > 0 && looks < Infinity))
    throw new ControlError('bad-argument', 'Lots a week, channels and degrees of freedom are above 0.');
  if ('multiple' in by) {
    if (!(by.multiple > 0 && by.multiple < Infinity)) throw new ControlError('bad-argument', 'A multiple is above 0.');
    const falseHoldShare = falseShare(by.multiple, degreesOfFreedom);
    return { limit: by.multiple, falseHoldShare, falseHoldsPerWeek: falseHoldShare * looks };
  }
  const budget = by.falseHoldsPerWeek;
  if (!(budget > 0 && budget < looks))
    throw new ControlError('bad-argument', 'A budget is above 0 and below the looks.');
  const falseHoldShare = budget / looks;
  return {
    limit: -jStat.studentt.inv(falseHoldShare / 2, degreesOfFreedom),
    falseHoldShare,
    falseHoldsPerWeek: budget,
  };
}

/**
 * Share of scores beyond ±L when the scale has ν degrees of freedom: 2 P(t > L).
 *
 * @param limit L above 0
 * @param degreesOfFreedom ν above 0
 */
export function falseShare(limit: number, degreesOfFreedom: number): number {
  return 2 * jStat.studentt.cdf(-limit, degreesOfFreedom);
}
