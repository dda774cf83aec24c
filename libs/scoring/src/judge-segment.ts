import { askForBreak } from './ask-for-break';
import { checkPlan, checkSegment } from './check-segment';
import { constantYardstick } from './constant-yardstick';
import { controlPart, notScored } from './control-part';
import { lotMeanOf } from './lot-values';
import { lotSignals, type ControlPart } from './lot-signals';
import { segmentFits, type SegmentFits } from './segment-fits';
import type { SegmentInput } from './segment-input';
import { specificationVerdict } from './specification-verdict';
import type { LotJudgement, LotOnChannel, PlanParameters, SegmentJudgement } from './types';

const NOTHING: Pick<SegmentJudgement, 'fit' | 'curve'> = {
  fit: null,
  curve: { t: new Float64Array(0), value: new Float64Array(0), standardError: new Float64Array(0) },
};

/**
 * Judges lots of one segment against the baseline fitted without them. Pure and deterministic: the same input gives the same
 * bits, and a settled verdict is the same whatever is uploaded later (see `controlPart`).
 *
 * @param input times in s, values in the characteristic's unit
 * @returns judgements in the order of `lotIdsToJudge`; lots that cannot be scored say why and are never within
 * @throws ScoringError bad-argument for unknown or doubled lots, lots out of order, a plan with impossible numbers
 * @example judgeSegment({ plan, lots, lotIdsToJudge: [7], segmentStartsAt: 0, segmentEndsAt: null }).lots[0].controlState
 */
export function judgeSegment(input: SegmentInput): SegmentJudgement {
  const { plan, lots, lotIdsToJudge } = input;
  const placeOf = checkSegment(input);
  const isClosed = input.segmentEndsAt !== null;
  if (plan === null) {
    const judged = lotIdsToJudge.map((id) =>
      judgementOf(lots[placeOf(id)], notScored('no_plan_in_force', !isClosed), null),
    );
    return { ...NOTHING, lots: judged, startLevel: input.startLevel ?? null };
  }
  checkPlan(plan);
  const fits = segmentFits(lots, plan, input.startLevel ?? null);
  const judged = lotIdsToJudge.map((id) => {
    const place = placeOf(id);
    return judgementOf(lots[place], controlPart(lots[place], place, fits, plan, isClosed), plan);
  });
  return { ...present(fits, lots, plan), lots: judged };
}

function judgementOf(lot: LotOnChannel, control: ControlPart, plan: PlanParameters | null): LotJudgement {
  const lotMean = lotMeanOf(lot);
  const specification = specificationVerdict(lot);
  const { movement: _movement, notScoredFacts: _facts, ...verdict } = control;
  return {
    lotId: lot.lotId,
    ...verdict,
    lotMean,
    specificationState: specification.state,
    constant: constantYardstick(lot, plan),
    signals: lotSignals(lot, lotMean, control, specification, plan),
  };
}

/** The baseline as it stands at the newest lot. */
function present(fits: SegmentFits, lots: LotOnChannel[], plan: PlanParameters): Omit<SegmentJudgement, 'lots'> {
  const { newestEndAt } = fits.timeline;
  const result = fits.at(fits.timeline.setUpTo(newestEndAt));
  const level = fits.startLevel(newestEndAt);
  const startLevel = fits.isStartComplete ? level : null;
  if (result.status !== 'fitted') return { ...NOTHING, startLevel };
  const { fit, chosen, lambda, kappa, lotCount } = result;
  let movement = 0;
  if (level !== null) for (const value of fit.fitted) movement = Math.max(movement, Math.abs(value - level));
  const ask = askForBreak(result, lots, plan);
  return {
    fit: { lambda, kappa, edf: fit.edf, pointCount: chosen.observations.t.length, lotCount, movement },
    curve: { t: chosen.observations.t, value: fit.fitted, standardError: fit.standardError },
    startLevel,
    ...(ask !== null && { askForBreak: ask }),
  };
}
