import type { PlanState } from '@app/contracts';
import type { PlanParameters, PlanReport } from '@app/scoring';
import { findRow, type Queryable, rows, type Transaction } from './database';

export interface PlanRow {
  id: number;
  plantId: number;
  channelId: number;
  channelName: string;
  lineId: number;
  lineName: string;
  unit: string;
  resolution: number;
  revision: number;
  state: PlanState;
  reason: string;
  isRobust: boolean;
  parameters: PlanParameters | null;
  report: (PlanReport & { leftOutLots: string[] }) | null;
  failure: string | null;
  draftedBy: number;
  proposedBy: number | null;
  proposedByName: string | null;
  proposedAt: Date | null;
  approvedByName: string | null;
  approvedAt: Date | null;
}

const SELECT = `
  select p.id, p.plant_id as "plantId", p.channel_id as "channelId", c.name as "channelName", l.id as "lineId", l.name as "lineName",
    x.unit, x.resolution, p.revision, p.state, p.reason, p.is_robust as "isRobust", p.parameters, p.report, p.failure, p.drafted_by as "draftedBy",
    p.proposed_by as "proposedBy", b.name as "proposedByName", p.proposed_at as "proposedAt", a.name as "approvedByName", p.approved_at as "approvedAt"
  from plan_revisions p join channels c on c.id = p.channel_id join lines l on l.id = c.line_id join characteristics x on x.id = c.characteristic_id
  left join people b on b.id = p.proposed_by left join people a on a.id = p.approved_by`;

export async function findPlan(db: Queryable, id: number): Promise<PlanRow | undefined> {
  return findRow<PlanRow>(db, `${SELECT} where p.id = :id`, { id });
}

export async function listPlans(db: Queryable, channelId: number): Promise<PlanRow[]> {
  return rows<PlanRow>(db, `${SELECT} where p.channel_id = :channelId order by p.revision desc`, { channelId });
}

/** A new draft, still to be worked out. One may be pending at a time. */
export async function insertPlanDraft(
  tx: Transaction,
  draft: { plantId: number; channelId: number; reason: string; isRobust: boolean; draftedBy: number; draftedAt: Date },
): Promise<number> {
  const [row] = await rows<{ id: number }>(
    tx,
    `insert into plan_revisions (plant_id, channel_id, revision, state, reason, is_robust, drafted_by, drafted_at)
     select :plantId, :channelId, coalesce(max(revision), 0) + 1, 'draft', :reason, :isRobust, :draftedBy, :draftedAt
     from plan_revisions where channel_id = :channelId returning id`,
    draft,
  );
  return row.id;
}

export async function updatePlanProposed(
  tx: Transaction,
  id: number,
  proposal: { parameters: PlanParameters; report: PlanReport & { leftOutLots: string[] }; by: number; at: Date },
): Promise<void> {
  await tx('plan_revisions')
    .where({ id, state: 'draft' })
    .update({
      state: 'proposed',
      parameters: JSON.stringify(proposal.parameters),
      report: JSON.stringify(proposal.report),
      proposed_by: proposal.by,
      proposed_at: proposal.at,
    });
}

/** A draft that could not be worked out is retired with the sentence that says why. */
export async function updatePlanFailed(tx: Transaction, id: number, failure: string, at: Date): Promise<void> {
  await tx('plan_revisions').where({ id, state: 'draft' }).update({ state: 'retired', failure, retired_at: at });
}

/** Puts a proposed revision in force and retires the one before it. */
export async function updatePlanApproved(
  tx: Transaction,
  plan: { id: number; channelId: number },
  by: number,
  at: Date,
): Promise<void> {
  await tx('plan_revisions')
    .where({ channel_id: plan.channelId, state: 'in_force' })
    .update({ state: 'retired', retired_at: at });
  await tx('plan_revisions')
    .where({ id: plan.id, state: 'proposed' })
    .update({ state: 'in_force', approved_by: by, approved_at: at });
}
