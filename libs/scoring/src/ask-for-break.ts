import { isBeyond, type TwoPassFit } from './two-pass-fit';
import type { AskForBreak, LotOnChannel, PlanParameters } from './types';

/**
 * The run of lots up to the newest that do not pull or are outside their control limits, when its weight is above κ T / 2: the
 * process may then have changed for good, and people should say whether the baseline starts afresh.
 */
export function askForBreak(
  result: TwoPassFit,
  lots: readonly LotOnChannel[],
  plan: PlanParameters,
): AskForBreak | null {
  const { chosen, scores, kappa } = result;
  const { weight, lot } = chosen.observations;
  const isHeld = Uint8Array.from(chosen.lots, (index) => (lots[index].pulls ? 0 : 1));
  scores.forEach((score, place) => {
    if (score === null || isBeyond(score, plan)) isHeld[place] = 1;
  });
  const run = new Set<number>();
  let total = 0;
  for (let i = lot.length - 1; i >= 0 && isHeld[lot[i]] === 1; i -= 1) {
    run.add(lot[i]);
    total += weight[i];
  }
  const threshold = (kappa * plan.shortestPeriodSeconds) / 2;
  if (!(total > threshold)) return null;
  const members = [...run].map((place) => lots[chosen.lots[place]]);
  return {
    fromLotId: members[members.length - 1].lotId,
    toLotId: members[0].lotId,
    lotCount: members.length,
    weight: total,
    threshold,
  };
}
