import { DEFAULT_SIGNALS } from './default-signals';
import type { SpecificationVerdict } from './specification-verdict';
import type { LotJudgement, LotOnChannel, NotScoredReason, PlanParameters, Signal, SignalAction } from './types';

type Facts = Signal['facts'];

/** What the control part of a judgement came to, with the figures that the sentences need. */
export interface ControlPart extends Pick<
  LotJudgement,
  | 'controlState'
  | 'isProvisional'
  | 'notScoredReason'
  | 'score'
  | 'residual'
  | 'residualSd'
  | 'baseline'
  | 'controlLow'
  | 'controlHigh'
> {
  /** Baseline at the lot minus the baseline at the segment's start, unit; null when either is missing. */
  movement: number | null;
  /** More about why there is no score. */
  notScoredFacts: Facts;
}

/** Without a plan, and while a baseline is young, a missing score is nobody's fault and holds nothing. */
const NEVER_HOLD: readonly NotScoredReason[] = ['learning', 'no_plan_in_force', 'censored'];

/** The signals of one lot, those that are off left away. */
export function lotSignals(
  lot: LotOnChannel,
  lotMean: number | null,
  control: ControlPart,
  specification: SpecificationVerdict,
  plan: PlanParameters | null,
): Signal[] {
  const actions = plan?.signals ?? DEFAULT_SIGNALS;
  const signals: Signal[] = [];
  const add = (signal: Signal['signal'], facts: Facts | null, action: SignalAction = actions[signal]) => {
    if (facts !== null && actions[signal] !== 'off') signals.push({ signal, action, facts });
  };
  add('lot_mean', meanFacts(lotMean, control, plan));
  add('outside_specification', specificationFacts(lot, lotMean, specification));
  add('not_scored', notScoredFacts(control), mayHold(control) ? actions.not_scored : 'notice');
  add(
    'censored_readings',
    censoredFacts(lot, specification),
    specification.mayHide ? 'holds' : actions.censored_readings,
  );
  add('baseline_moved', movedFacts(control, plan));
  return signals;
}

const mayHold = ({ notScoredReason }: ControlPart) => notScoredReason !== null && !NEVER_HOLD.includes(notScoredReason);

function meanFacts(lotMean: number | null, control: ControlPart, plan: PlanParameters | null): Facts | null {
  if (control.controlState !== 'outside_control_limits' || plan === null) return null;
  const { score, residual, residualSd, baseline, controlLow, controlHigh, isProvisional } = control;
  return {
    score,
    limit: plan.limit,
    residual,
    residualSd,
    lotMean,
    baseline,
    controlLow,
    controlHigh,
    direction: (score ?? 0) < 0 ? 'below' : 'above',
    standing: isProvisional ? 'provisional' : 'settled',
  };
}

function specificationFacts(
  lot: LotOnChannel,
  lotMean: number | null,
  { state, direction }: SpecificationVerdict,
): Facts | null {
  if (state !== 'outside_specification' || lot.specification === null) return null;
  const { lower, upper } = lot.specification;
  const { countBelow, countAbove, count, minimum, maximum } = lot;
  return { direction, lotMean, lower, upper, countBelow, countAbove, count, minimum, maximum };
}

function notScoredFacts({ notScoredReason, notScoredFacts: more }: ControlPart): Facts | null {
  return notScoredReason === null ? null : { reason: notScoredReason, ...more };
}

function censoredFacts(lot: LotOnChannel, { mayHide }: SpecificationVerdict): Facts | null {
  const { censoredLow, censoredHigh, count, specification } = lot;
  if (censoredLow + censoredHigh === 0) return null;
  const { lower, upper } = specification ?? { lower: null, upper: null };
  return { censoredLow, censoredHigh, count, mayHide, lower, upper };
}

function movedFacts({ movement }: ControlPart, plan: PlanParameters | null): Facts | null {
  if (movement === null || plan === null || plan.allowanceNotice === null) return null;
  if (Math.abs(movement) <= plan.allowanceNotice) return null;
  return {
    movement,
    notice: plan.allowanceNotice,
    cap: plan.allowanceCap,
    direction: movement < 0 ? 'down' : 'up',
  };
}
