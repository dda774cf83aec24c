import type { PlanView } from '@app/contracts';
import { EmptyNote } from '../../../shared/ui/empty-note';
import { Sheet } from '../../../shared/ui/sheet';
import { When } from '../../../shared/ui/when';
import { ParameterTable } from './parameter-table';
import { LeftOut } from './pending-plan';

/** The revision that judges now. Its numbers stand beside the waiting one's when there is one, and then not here again. */
export function PlanInForce({ plan, hasNumbersAbove }: { plan: PlanView | null; hasNumbersAbove: boolean }) {
  if (plan === null) {
    return (
      <Sheet title="In force">
        <EmptyNote>
          No plan is in force: lots of this channel are not scored until one is proposed and approved.
        </EmptyNote>
      </Sheet>
    );
  }
  return (
    <Sheet title={`Revision ${plan.revision}, in force`} isFlush>
      <div className="plan-words">
        <p>
          {plan.proposedBy !== null && `Proposed by ${plan.proposedBy}`}
          {plan.approvedBy !== null && plan.approvedAt !== null && (
            <>
              , approved by {plan.approvedBy} on <When at={plan.approvedAt} form="short" />
            </>
          )}
          : {plan.reason}
        </p>
        <LeftOut lots={plan.leftOutLots} />
      </div>
      {!hasNumbersAbove && <ParameterTable plans={[plan]} />}
    </Sheet>
  );
}
