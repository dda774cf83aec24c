import type { PlanInput, PlanProposal } from './plan-proposal';

export function proposePlan(_input: PlanInput): PlanProposal {
  return { status: 'insufficient', reason: 'too_few_lots', detail: '' };
}
