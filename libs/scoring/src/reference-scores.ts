import { chooseLambda, effectivePeriod, lambdaForPeriod, pointDensity } from '@app/baseline';
import type { BaselineFit, ChosenLambda, Observations } from '@app/baseline';
import { robustScale, sampleMoments } from '@app/control';

import { allScores } from './lot-score';
import { planBaseline } from './plan-baseline';
import { choosePoints, segmentPoints } from './segment-points';
import type { LotOnChannel } from './types';
import { varianceComponents, type ComponentsEstimate } from './variance-components';

/** Robust distance beyond which a lot is left out of the reference period. */
export const LEAVE_OUT_BEYOND = 4;
/** Most passes of leaving out. */
export const MOST_PASSES = 3;

/** The reference lots against the baselines without them, once those beyond 4 are left out. */
export interface ReferenceScores {
  estimate: ComponentsEstimate;
  kappa: number;
  lambda: number;
  effectivePeriodSeconds: number;
  choice: ChosenLambda;
  isCappedByWindow: boolean;
  fit: BaselineFit;
  observations: Observations;
  count: Float64Array;
  /** Per lot, in the order of the lots. */
  isLeftOut: boolean[];
  z: number[];
  /** Mean and standard deviation of the z that stay; scale 0 when they are constant. */
  centre: number;
  scale: number;
}

/**
 * Components, smoothness and scores of the reference lots, in at most three passes: those further than 4 robust standard
 * deviations (1.4826 · median absolute deviation) from the median leave, and all is estimated anew without them. λ is chosen by leaving out
 * single lots, not below the floor of T and not above that of the window: slower than that a month of lots cannot tell.
 *
 * @param lots usable lots in time order
 * @param isRobust whether the plan reweights outlying lots; the scores are then against that baseline
 * @throws BaselineError when nothing can be fitted
 */
export function referenceScores(
  lots: readonly LotOnChannel[],
  shortestPeriodSeconds: number,
  windowSeconds: number,
  fallbackNominal: number,
  isRobust: boolean,
): ReferenceScores | null {
  let isLeftOut: boolean[] = lots.map(() => false);
  for (let pass = 1; ; pass += 1) {
    const staying = lots.filter((_, j) => !isLeftOut[j]);
    const estimate = varianceComponents(staying, shortestPeriodSeconds, fallbackNominal);
    const { betweenLots, betweenPoints, betweenReadings } = estimate.components;
    if (!(betweenLots + betweenPoints + betweenReadings > 0)) return null;
    const pulls = Uint8Array.from(isLeftOut, (flag) => (flag ? 0 : 1));
    const chosen = choosePoints(
      segmentPoints(lots, estimate.components, fallbackNominal),
      lots.length,
      () => true,
      pulls,
    );
    const smoothness = chooseSmoothness(chosen.observations, shortestPeriodSeconds, windowSeconds);
    const { fit } = planBaseline(chosen, smoothness.lambda, { isRobust });
    const z = new Array<number>(lots.length);
    allScores(fit, chosen).forEach((score, place) => (z[chosen.lots[place]] = score.z));
    const { median, scale: spread } = robustScale(z.filter((_, j) => !isLeftOut[j]));
    const next = z.map((value) => !(Math.abs(value - median) <= LEAVE_OUT_BEYOND * spread));
    const isStable = next.every((flag, j) => flag === isLeftOut[j]);
    if (isStable || pass === MOST_PASSES || !(spread > 0) || next.every(Boolean)) {
      const moments = sampleMoments(z.filter((_, j) => !isLeftOut[j]));
      return {
        estimate,
        ...smoothness,
        fit,
        observations: chosen.observations,
        count: chosen.count,
        isLeftOut,
        z,
        centre: moments.mean,
        scale: spread > 0 ? moments.standardDeviation : 0,
      };
    }
    isLeftOut = next;
  }
}

function chooseSmoothness(observations: Observations, shortestPeriodSeconds: number, windowSeconds: number) {
  const kappa = pointDensity(observations.t, observations.weight, shortestPeriodSeconds);
  const floorLambda = lambdaForPeriod(kappa, shortestPeriodSeconds);
  const choice = chooseLambda(observations, { rule: 'lot-cv', floorLambda });
  if (shortestPeriodSeconds > windowSeconds)
    return { kappa, choice, lambda: Infinity, effectivePeriodSeconds: shortestPeriodSeconds, isCappedByWindow: false };
  const wanted = Math.max(effectivePeriod(choice.lambda, kappa), shortestPeriodSeconds);
  const effectivePeriodSeconds = Math.min(wanted, windowSeconds);
  return {
    kappa,
    choice,
    lambda: lambdaForPeriod(kappa, effectivePeriodSeconds),
    effectivePeriodSeconds,
    isCappedByWindow: wanted > windowSeconds,
  };
}
