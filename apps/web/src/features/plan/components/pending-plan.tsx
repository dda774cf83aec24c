import type { PlanView } from '@app/contracts';
import { Sheet } from '../../../shared/ui/sheet';
import { When } from '../../../shared/ui/when';
import { isBeingWorkedOut } from '../api/use-plans';
import { ApprovalForm } from './approval-form';
import { ParameterTable } from './parameter-table';

/** The revision that waits: being worked out, failed, or proposed with its cautions and its approval. */
export function PendingPlan({ plan, inForce }: { plan: PlanView; inForce: PlanView | null }) {
  if (isBeingWorkedOut(plan)) {
    return (
      <Sheet title={`Revision ${plan.revision} is being worked out`}>
        <div role="status" className="plan-working">
          <p>Smoothness, scale and control limits are being found from this channel’s own readings.</p>
          <progress aria-label="Working out the plan" />
        </div>
      </Sheet>
    );
  }
  if (plan.failure !== null) {
    return (
      <Sheet title={`Revision ${plan.revision} could not be worked out`}>
        <div className="problem" role="alert">
          <p>{plan.failure}</p>
          <p>The revision in force, if any, goes on judging. Propose again once more lots are known.</p>
        </div>
      </Sheet>
    );
  }
  return (
    <>
      <Sheet title={`Revision ${plan.revision}, ${plan.state === 'draft' ? 'draft' : 'proposed'}`} isFlush>
        <div className="plan-words">
          <Proposal plan={plan} />
          {plan.cautions.map((caution) => (
            <p key={caution} className="plan-caution">
              {caution}
            </p>
          ))}
          <LeftOut lots={plan.leftOutLots} />
        </div>
        <ParameterTable plans={inForce === null ? [plan] : [inForce, plan]} />
      </Sheet>
      {plan.state === 'proposed' && (
        <Sheet
          title={`Approve revision ${plan.revision}`}
          tone="sign"
          margin={<p>Nobody approves a plan which they proposed.</p>}
        >
          {plan.mayApprove ? (
            <ApprovalForm plan={plan} />
          ) : (
            <p>{plan.whyNot ?? 'Your roles at this plant do not approve plans.'}</p>
          )}
        </Sheet>
      )}
    </>
  );
}

function Proposal({ plan }: { plan: PlanView }) {
  return (
    <p>
      {plan.proposedBy === null ? 'Proposed' : `Proposed by ${plan.proposedBy}`}
      {plan.proposedAt !== null && (
        <>
          {' '}
          on <When at={plan.proposedAt} form="short" />
        </>
      )}
      : {plan.reason}
    </p>
  );
}

export function LeftOut({ lots }: { lots: readonly string[] }) {
  if (lots.length === 0) return null;
  const one = lots.length === 1;
  return (
    <p>
      {one ? 'Lot' : 'Lots'} {lots.join(', ')} {one ? 'was' : 'were'} left out of the reference period for lying beyond
      4 robust σ; {one ? 'it is' : 'they are'} still judged.
    </p>
  );
}
