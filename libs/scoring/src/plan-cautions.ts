import { LOT_SPACINGS_WARNED } from './default-period';
import type { PlanCaution, PlanReport } from './plan-proposal';
import type { ReferenceScores } from './reference-scores';
import type { PlanParameters } from './types';

/** Below this many reference lots a caution is given. */
export const REFERENCE_LOTS_CAUTIONED = 25;
/** Difference of the lag-1 correlation from its expectation that is worth a caution. */
export const LAG_ONE_TOLERANCE = 0.2;

const DAY_SECONDS = 86_400;
const days = (seconds: number) => `${(seconds / DAY_SECONDS).toFixed(1)} days`;
const percent = (share: number) => `${(100 * share).toFixed(share < 0.1 ? 2 : 0)} %`;

/** What the person who approves should know, a sentence each. */
export function planCautions(
  plan: PlanParameters,
  scores: ReferenceScores,
  report: Omit<PlanReport, 'cautions'>,
): PlanCaution[] {
  const { shortestPeriodSeconds: period, windowSeconds } = plan;
  const spacings = period / report.medianLotSpacingSeconds;
  const { lag1Correlation, lag1Expected, referenceLots, leftOutLotIds, falseHoldShare } = report;
  const found: [isSo: boolean, code: PlanCaution['code'], detail: string][] = [
    [
      referenceLots < REFERENCE_LOTS_CAUTIONED,
      'few_reference_lots',
      `With ${referenceLots} reference lots the limit of ${plan.limit} standard deviations holds ${percent(falseHoldShare)} of good lots at each look; ${REFERENCE_LOTS_CAUTIONED} or more reference lots are better.`,
    ],
    [
      spacings < LOT_SPACINGS_WARNED,
      'short_period',
      `The shortest drift period of ${days(period)} is ${spacings.toFixed(0)} lot spacings; below ${LOT_SPACINGS_WARNED} the baseline begins to follow single lots.`,
    ],
    [
      period > windowSeconds,
      'period_exceeds_window',
      `The shortest drift period of ${days(period)} exceeds the window of ${days(windowSeconds)}: the baseline is a straight line.`,
    ],
    [
      scores.choice.isAtFloor && period <= windowSeconds,
      'smoothness_at_floor',
      `Cross-validation would follow faster movement than the shortest drift period of ${days(period)} allows.`,
    ],
    [
      scores.isCappedByWindow || (scores.choice.isAtBound && period <= windowSeconds),
      'smoothness_at_bound',
      'Cross-validation finds no slow movement: the baseline is as smooth as the window allows.',
    ],
    [
      scores.estimate.betweenLotsWasNegative,
      'between_lots_negative',
      'The variance between lots came out negative and is taken as 0.',
    ],
    [
      scores.estimate.betweenPointsWasNegative,
      'between_points_negative',
      'The variance between points within a lot came out negative and is taken as 0.',
    ],
    [
      lag1Correlation !== null && lag1Expected !== null && Math.abs(lag1Correlation - lag1Expected) > LAG_ONE_TOLERANCE,
      'correlated_scores',
      correlationSentence(lag1Correlation ?? 0, lag1Expected ?? 0),
    ],
    [
      leftOutLotIds.length > 0,
      'lots_left_out',
      `${leftOutLotIds.length} of ${leftOutLotIds.length + referenceLots} reference lots lie more than 4 robust standard deviations out and are left out.`,
    ],
  ];
  return found.filter(([isSo]) => isSo).map(([, code, detail]) => ({ code, detail }));
}

function correlationSentence(measured: number, expected: number): string {
  const figures = `Neighbouring scores have a correlation of ${measured.toFixed(2)} where the fit alone gives ${expected.toFixed(2)}: `;
  return measured > expected
    ? `${figures}neighbouring lots resemble each other, so false holds come in runs.`
    : `${figures}neighbouring lots alternate, so that the baseline judges them more widely than it should.`;
}
