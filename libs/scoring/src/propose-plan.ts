import { BaselineError } from '@app/baseline';
import { falseShare, individualsChart } from '@app/control';

import { defaultShortestPeriod, LOT_SPACINGS_REFUSED, medianLotSpacing } from './default-period';
import { DEFAULT_SIGNALS } from './default-signals';
import { lagOneCorrelation, neighbourCorrelations } from './lag-correlation';
import { lotMeanOf, nominalOf } from './lot-values';
import { planCautions } from './plan-cautions';
import type { PlanInput, PlanInsufficientReason, PlanProposal, PlanReport } from './plan-proposal';
import { fallbackNominalOf, referenceLots } from './reference-lots';
import { referenceScores, type ReferenceScores } from './reference-scores';
import { ScoringError } from './scoring-error';
import { LOTS_PER_EDF } from './two-pass-fit';
import type { LotOnChannel, PlanParameters } from './types';

/** Fewest reference lots. */
export const REFERENCE_LOTS_NEEDED = 20;
const WINDOW_SECONDS = 30 * 86_400;
const LIMIT_MULTIPLE = 3;
/** Shares of the tolerance that the baseline may move: notice, and the cap (common practice). */
const DEFAULT_ALLOWANCE = { noticeShare: 0.1, capShare: 0.25 };

const insufficient = (reason: PlanInsufficientReason, detail: string): PlanProposal => ({
  status: 'insufficient',
  reason,
  detail,
});

/**
 * Proposes how a channel is judged, from its own reference lots: variance components (method of moments), shortest drift period T,
 * smoothness by leave-one-lot-out cross-validation frozen as T_eff = 2π (λ/κ)^¼, centre and scale of the scores, limit, allowance, and
 * the constant baseline's individuals chart for comparison. All is frozen by the plan's approval.
 *
 * @param input lots of one segment in time order; periods in s, tolerance in the unit
 * @returns the plan with a report for those who approve it, or why there is none
 * @throws ScoringError bad-argument for lots out of order, unknown reference lots, periods, multiples, tolerances or shares not above 0, or a
 *   cap below its notice
 * @example proposePlan({ lots, tolerance: 0.8 })
 */
export function proposePlan(input: PlanInput): PlanProposal {
  const windowSeconds = positive(input.windowSeconds ?? WINDOW_SECONDS, 'window');
  const limit = positive(input.limitMultiple ?? LIMIT_MULTIPLE, 'limit multiple');
  const tolerance = input.tolerance == null ? null : positive(input.tolerance, 'tolerance');
  const allowance = checkedAllowance(input.allowance ?? DEFAULT_ALLOWANCE);
  const { usable, unusableLotIds, hasNonFinite } = referenceLots(input, windowSeconds);
  if (hasNonFinite) return insufficient('non_finite', 'A reading of a reference lot is not a finite number.');
  if (usable.length < REFERENCE_LOTS_NEEDED)
    return insufficient(
      'too_few_lots',
      `${usable.length} lots can serve as reference; ${REFERENCE_LOTS_NEEDED} are needed.`,
    );
  const spacing = medianLotSpacing(usable);
  if (spacing === null) return insufficient('ill_posed', 'The reference lots do not follow each other in time.');
  const period = positive(input.shortestPeriodSeconds ?? defaultShortestPeriod(usable), 'shortest drift period');
  if (period < LOT_SPACINGS_REFUSED * spacing)
    return insufficient(
      'period_too_short',
      `The shortest drift period is ${(period / spacing).toFixed(1)} lot spacings; ${LOT_SPACINGS_REFUSED} are the least.`,
    );
  const fallbackNominal = input.fallbackNominal ?? fallbackNominalOf(usable);
  const deviations = usable.map((lot) => (lotMeanOf(lot) ?? NaN) - nominalOf(lot, fallbackNominal));
  const chart = individualsChart(deviations);
  if (chart.status !== 'computed') return insufficient('constant_data', 'The lot means do not vary.');

  const isRobust = input.isRobust ?? false;
  const scores = tried(() => referenceScores(usable, period, windowSeconds, fallbackNominal, isRobust));
  if (scores instanceof BaselineError) return insufficient('ill_posed', scores.message);
  if (scores === null || !(scores.scale > 0)) return insufficient('constant_data', 'The scores do not vary.');
  const staying = usable.filter((_, j) => !scores.isLeftOut[j]);
  const needed = Math.max(REFERENCE_LOTS_NEEDED, Math.ceil(LOTS_PER_EDF * scores.fit.edf));
  if (staying.length < needed)
    return insufficient('too_few_lots', `${staying.length} reference lots are left; ${needed} are needed.`);

  const plan: PlanParameters = {
    method: 'smoothing_spline',
    shortestPeriodSeconds: period,
    effectivePeriodSeconds: scores.effectivePeriodSeconds,
    windowSeconds,
    isRobust,
    components: scores.estimate.components,
    centre: scores.centre,
    scale: scores.scale,
    limit,
    referenceLotCount: staying.length,
    fallbackNominal,
    allowanceNotice: tolerance === null ? null : allowance.noticeShare * tolerance,
    allowanceCap: tolerance === null ? null : allowance.capShare * tolerance,
    constant: { centre: chart.centre, halfWidth: chart.halfWidth },
    signals: { ...DEFAULT_SIGNALS },
  };
  const report = {
    ...reportOf(usable, scores),
    unusableLotIds,
    medianLotSpacingSeconds: spacing,
    falseHoldShare: falseShare(limit, staying.length - 1),
  };
  return { status: 'proposed', plan, report: { ...report, cautions: planCautions(plan, scores, report) } };
}

function reportOf(lots: readonly LotOnChannel[], scores: ReferenceScores) {
  const { choice, kappa, lambda, fit, isLeftOut, z } = scores;
  const kept = z.filter((_, j) => !isLeftOut[j]);
  const expected = tried(() => expectedLagOne(scores));
  return {
    referenceLots: kept.length,
    leftOutLotIds: lots.filter((_, j) => isLeftOut[j]).map((lot) => lot.lotId),
    cvCurve: choice.curve.map((tried) => ({
      lambda: tried.lambda,
      effectivePeriodSeconds: 2 * Math.PI * (tried.lambda / kappa) ** 0.25,
      criterion: tried.value,
    })),
    isAtFloor: choice.isAtFloor,
    lag1Correlation: lagOneCorrelation(kept),
    lag1Expected: typeof expected === 'number' ? expected : null,
    kappa,
    lambda,
    edf: fit.edf,
  } satisfies Partial<PlanReport>;
}

/** Mean correlation of neighbours by the fit alone. */
function expectedLagOne({ observations, count, lambda }: ReferenceScores): number {
  const staying = observations.lot.map((lot) => observations.pulls[lot]);
  const pick = (values: Float64Array) => values.filter((_, i) => staying[i] === 1);
  const names = new Map<number, number>();
  const lot = observations.lot
    .filter((_, i) => staying[i] === 1)
    .map((name) => names.get(name) ?? (names.set(name, names.size), names.size - 1));
  const { t, y, weight } = observations;
  const pulls = new Uint8Array(names.size).fill(1);
  const kept = { t: pick(t), y: pick(y), weight: pick(weight), lot, pulls };
  const correlations = neighbourCorrelations(kept, pick(count), lambda);
  return correlations.reduce((sum, r) => sum + r, 0) / correlations.length;
}

function tried<T>(compute: () => T): T | BaselineError {
  try {
    return compute();
  } catch (error) {
    if (error instanceof BaselineError) return error;
    throw error;
  }
}

function checkedAllowance(allowance: { noticeShare: number; capShare: number }) {
  positive(allowance.noticeShare, 'share that is told');
  if (!(allowance.capShare >= allowance.noticeShare && allowance.capShare < Infinity))
    throw new ScoringError(
      'bad-argument',
      'The share beyond which lots are not scored is not below the one that is told.',
    );
  return allowance;
}

function positive(value: number, name: string): number {
  if (!(value > 0 && value < Infinity)) throw new ScoringError('bad-argument', `The ${name} is above 0.`);
  return value;
}
