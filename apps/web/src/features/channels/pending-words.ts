import type { PlanState } from '@app/contracts';

/** What a later revision waits for: "revision 3 waits to be approved". */
export function pendingWords(plan: { revision: number; state: PlanState }): string {
  return plan.state === 'proposed'
    ? `revision ${plan.revision} waits to be approved`
    : `revision ${plan.revision} is being drafted`;
}
