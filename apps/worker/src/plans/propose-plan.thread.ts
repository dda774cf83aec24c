import { createDatabase, findPlan, getAllowanceShares, getProposalInputs } from '@app/data';
import { defaultShortestPeriod, type PlanParameters, type PlanReport, proposePlan } from '@app/scoring';

export interface ProposePlanTask {
  databaseUrl: string;
  planId: number;
}

export type ProposePlanOutcome =
  | { status: 'proposed'; parameters: PlanParameters; report: PlanReport & { leftOutLots: string[] } }
  | { status: 'insufficient'; sentence: string };

const WINDOW_SECONDS = 30 * 86_400;

/** Works out a channel's default plan from the lots of its newest segment. */
export default async function propose(task: ProposePlanTask): Promise<ProposePlanOutcome> {
  const db = createDatabase(task.databaseUrl, { min: 0, max: 1 });
  try {
    const plan = await findPlan(db, task.planId);
    if (!plan) throw new Error(`no plan ${task.planId}`);
    const rough = await getProposalInputs(db, plan.channelId, {
      windowSeconds: WINDOW_SECONDS,
      shortestPeriodSeconds: 3 * 86_400,
    });
    if (rough.lots.length === 0)
      return {
        status: 'insufficient',
        sentence: 'The channel has no readings yet. Upload the first shifts, then propose a plan.',
      };
    const shortestPeriodSeconds = defaultShortestPeriod(rough.lots);
    const inputs = await getProposalInputs(db, plan.channelId, {
      windowSeconds: WINDOW_SECONDS,
      shortestPeriodSeconds,
    });
    const proposal = proposePlan({
      lots: inputs.lots,
      shortestPeriodSeconds,
      windowSeconds: WINDOW_SECONDS,
      tolerance: inputs.tolerance,
      allowance: await getAllowanceShares(db, plan.channelId),
      isRobust: plan.isRobust,
    });
    if (proposal.status === 'insufficient') return { status: 'insufficient', sentence: proposal.detail };
    const leftOutLots = proposal.report.leftOutLotIds.map((id) => inputs.lotNumbers.get(id) ?? String(id));
    return { status: 'proposed', parameters: proposal.plan, report: { ...proposal.report, leftOutLots } };
  } finally {
    await db.destroy();
  }
}
