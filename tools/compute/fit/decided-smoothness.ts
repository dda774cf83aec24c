import type { BaselineSpec } from '@app/baseline';
import type { CriterionAnswer, SmoothnessRule } from '../answer/answer';

/** What fixes the baseline, before it is fitted. */
export interface DecidedSmoothness {
  spec: BaselineSpec;
  rule: SmoothnessRule;
  /** As it is answered: lambda, knots, degree, or the degrees of freedom asked for; null for a constant and for the straight line's lambda. */
  value: number | null;
  isAtFloor: boolean;
  criterion: CriterionAnswer;
  warnings: string[];
}

export const NOTHING_CHOSEN: DecidedSmoothness['criterion'] = { name: null, value: null, curve: [] };
