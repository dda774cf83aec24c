import { formatNumber } from './format';
import type { ControlState, SpecificationState } from './states';
import { notScoredSentence } from './wording';

export interface SaidVerdict {
  controlState: ControlState;
  notScoredReason: string | null;
  score: number | null;
  specificationState: SpecificationState;
}

const SPECIFICATION_PHRASES: Record<SpecificationState, string> = {
  inside_specification: 'inside specification',
  inside_within_guard_band: 'inside specification, within the guard band',
  outside_specification: 'outside specification',
  no_specification: 'without a specification',
};

/** Both halves of a verdict in one phrase: "within control limits, 1.2 σ above its baseline; inside specification". */
export function verdictPhrase({ controlState, notScoredReason, score, specificationState }: SaidVerdict): string {
  const control =
    score === null
      ? `not scored: ${notScoredSentence(notScoredReason ?? '')}`
      : `${controlState === 'within_control_limits' ? 'within' : 'outside'} control limits, ${formatNumber(Math.abs(score), 1)}\u202fσ ${score < 0 ? 'below' : 'above'} its baseline`;
  return `${control}; ${SPECIFICATION_PHRASES[specificationState]}`;
}
