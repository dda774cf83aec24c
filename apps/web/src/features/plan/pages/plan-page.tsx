import type { PlanView } from '@app/contracts';
import { useParams } from 'react-router-dom';
import { urls } from '../../../app/urls';
import { useShowsLine } from '../../../shared/line-context/line-context';
import { useSession } from '../../../shared/session/session';
import { ActionLink } from '../../../shared/ui/action';
import { Loaded } from '../../../shared/ui/loaded';
import { PageHeading } from '../../../shared/ui/page-heading';
import { Sheet } from '../../../shared/ui/sheet';
import { Skeleton } from '../../../shared/ui/skeleton';
import { isBeingWorkedOut, useChannel, usePlans } from '../api/use-plans';
import { EarlierPlans } from '../components/earlier-plans';
import { PendingPlan } from '../components/pending-plan';
import { PlanInForce } from '../components/plan-in-force';
import { sortPlans } from '../components/plan-words';
import { ProposeForm } from '../components/propose-form';
import '../components/plan.css';

/** How should this channel be judged? */
export function PlanPage() {
  const channelId = Number(useParams().channelId);
  const channel = useChannel(channelId);
  const plans = usePlans(channelId);
  useShowsLine(channel.data?.lineId, channel.data?.plantId);
  const title = channel.data === undefined ? 'Plan' : `Plan of ${channel.data.name}, ${channel.data.lineName}`;
  return (
    <>
      <PageHeading
        title={title}
        lead="How this channel is judged: each revision is proposed by one person and approved by another."
        tools={
          <ActionLink kind="quiet" to={urls.channel(channelId)}>
            Channel record
          </ActionLink>
        }
      />
      <Loaded
        query={plans}
        failure="The plan’s revisions could not be loaded."
        skeleton={
          <Sheet>
            <Skeleton lines={10} label="Loading the plan" />
          </Sheet>
        }
      >
        {(items) => <Plans channelId={channelId} plans={items} />}
      </Loaded>
    </>
  );
}

function Plans({ channelId, plans }: { channelId: number; plans: PlanView[] }) {
  const { can } = useSession();
  const { inForce, pending, others } = sortPlans(plans);
  const isWorking = plans.some(isBeingWorkedOut);
  const isCompared = pending?.parameters != null;
  return (
    <>
      {pending !== null && <PendingPlan key={pending.id} plan={pending} inForce={inForce} />}
      <PlanInForce plan={inForce} hasNumbersAbove={isCompared} />
      {can('propose_plan') && !isWorking && (
        <Sheet
          title="Propose the default plan"
          margin={
            <p>A baseline from production readings alone cannot see a process that moves as slowly as the gauge.</p>
          }
        >
          <ProposeForm channelId={channelId} />
        </Sheet>
      )}
      <EarlierPlans plans={others} />
    </>
  );
}
