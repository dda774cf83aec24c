import type { PlanView, Role } from '@app/contracts';
import type { PlanRow } from '@app/data';

/** A revision as this person sees it. */
export function planView(plan: PlanRow, person: { id: number; roles: Role[] }): PlanView {
  const whyNot = reasonNotToApprove(plan, person);
  const { parameters, report } = plan;
  return {
    id: plan.id,
    channelId: plan.channelId,
    channelName: plan.channelName,
    lineId: plan.lineId,
    lineName: plan.lineName,
    plantId: plan.plantId,
    unit: plan.unit,
    resolution: plan.resolution,
    revision: plan.revision,
    state: plan.state,
    proposedBy: plan.proposedByName,
    proposedAt: plan.proposedAt?.toISOString() ?? null,
    approvedBy: plan.approvedByName,
    approvedAt: plan.approvedAt?.toISOString() ?? null,
    failure: plan.failure,
    reason: plan.reason,
    parameters: parameters && {
      method: parameters.method,
      shortestPeriodSeconds: parameters.shortestPeriodSeconds,
      effectivePeriodSeconds: parameters.effectivePeriodSeconds,
      windowSeconds: parameters.windowSeconds,
      isRobust: parameters.isRobust ?? false,
      betweenLotsSd: Math.sqrt(parameters.components.betweenLots),
      betweenPointsSd: Math.sqrt(parameters.components.betweenPoints),
      betweenReadingsSd: Math.sqrt(parameters.components.betweenReadings),
      scale: parameters.scale,
      centre: parameters.centre,
      limit: parameters.limit,
      referenceLotCount: parameters.referenceLotCount,
      allowanceNotice: parameters.allowanceNotice,
      allowanceCap: parameters.allowanceCap,
    },
    cautions: (report?.cautions ?? []).map((caution) => caution.detail),
    leftOutLots: report?.leftOutLots ?? [],
    mayApprove: whyNot === null,
    whyNot,
  };
}

/** Null when the person may approve the revision now. */
export function reasonNotToApprove(plan: PlanRow, person: { id: number; roles: Role[] }): string | null {
  if (plan.state === 'in_force') return 'This revision is in force.';
  if (plan.state === 'retired') return 'This revision is retired.';
  if (plan.state === 'draft') return 'This revision is still being worked out.';
  if (!person.roles.includes('quality_manager')) return 'A quality manager approves plans.';
  if (plan.proposedBy === person.id) return 'You proposed this plan: somebody else approves it.';
  return null;
}
