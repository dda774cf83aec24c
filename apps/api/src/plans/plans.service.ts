import { Inject, Injectable } from '@nestjs/common';
import { DomainError, JOBS, type Page, type PlanView, type Role } from '@app/contracts';
import {
  type Database,
  findChannelPlace,
  findPlan,
  insertAuditEntry,
  insertOwedJob,
  insertPlanDraft,
  listPlans,
  type Person,
  type PlanRow,
  updateInputsChanged,
  updatePlanApproved,
  withConflicts,
} from '@app/data';
import { CLOCK, type Clock, DATABASE, Dispatcher } from '@app/platform';
import { AccessService } from '../access/access.service';
import { planView, reasonNotToApprove } from './plan-view';

/** A channel's plan: revisions, a default one proposed from its readings, approval by a second person. */
@Injectable()
export class PlansService {
  constructor(
    @Inject(DATABASE) private readonly database: Database,
    @Inject(CLOCK) private readonly clock: Clock,
    private readonly access: AccessService,
    private readonly dispatcher: Dispatcher,
  ) {}

  async list(person: Person, channelId: number): Promise<Page<PlanView>> {
    const found = await findChannelPlace(this.database, channelId);
    const { roles } = await this.access.requireThing(person.id, found, 'read');
    const plans = await listPlans(this.database, channelId);
    const items = plans.map((plan) => planView(plan, { id: person.id, roles }));
    return { items, total: items.length, page: 1, pageSize: items.length };
  }

  async get(person: Person, id: number): Promise<PlanView> {
    const { thing: plan, roles } = await this.access.requireThing(person.id, await findPlan(this.database, id), 'read');
    return planView(plan, { id: person.id, roles });
  }

  /** Writes a draft and owes its working out; the worker proposes it in this person's name. */
  async propose(
    person: Person,
    channelId: number,
    { reason, isRobust }: { reason: string; isRobust: boolean },
  ): Promise<PlanView> {
    const found = await findChannelPlace(this.database, channelId);
    const { thing: channel, roles } = await this.access.requireThing(person.id, found, 'propose_plan');
    const at = this.clock.now();
    const pending = {
      code: 'plan-pending',
      detail: `A revision for ${channel.name} is pending already. Approve it, or wait until it is worked out.`,
    };
    const conflicts = { plan_revisions_one_pending: pending, plan_revisions_revision_key: pending };
    const { planId, owedJobId } = await withConflicts(conflicts, () =>
      this.database.transaction(async (tx) => {
        const planId = await insertPlanDraft(tx, {
          plantId: channel.plantId,
          channelId,
          reason,
          isRobust,
          draftedBy: person.id,
          draftedAt: at,
        });
        await insertAuditEntry(tx, {
          plantId: channel.plantId,
          at,
          actor: person,
          action: 'draft',
          thingKind: 'plan',
          thingId: planId,
          sentence: `${person.name} asked for a default plan${isRobust ? ', with outlying lots reweighted,' : ''} for ${channel.name} on ${channel.lineName}: ${reason}`,
          after: { state: 'draft', isRobust },
        });
        const owedJobId = await insertOwedJob(tx, {
          plantId: channel.plantId,
          name: JOBS.proposePlan,
          subject: { planId },
          at,
        });
        return { planId, owedJobId };
      }),
    );
    await this.dispatcher.owedJobs([owedJobId]);
    return planView((await findPlan(this.database, planId)) as PlanRow, { id: person.id, roles });
  }

  /** Throws unless this person may approve the revision now; asked before the password. */
  async requireApprovable(person: Person, id: number): Promise<void> {
    const { thing: plan, roles } = await this.access.requireThing(
      person.id,
      await findPlan(this.database, id),
      'approve_plan',
    );
    refuse(plan, { id: person.id, roles });
  }

  async approve(person: Person, id: number): Promise<PlanView> {
    const { roles } = await this.access.requireThing(person.id, await findPlan(this.database, id), 'approve_plan');
    const at = this.clock.now();
    const owedJobId = await this.database.transaction(async (tx) => {
      await tx.raw('select 1 from plan_revisions where id = ? for update', [id]);
      const plan = (await findPlan(tx, id)) as PlanRow;
      refuse(plan, { id: person.id, roles });
      await updatePlanApproved(tx, plan, person.id, at);
      await updateInputsChanged(tx, [plan.channelId]);
      await insertAuditEntry(tx, {
        plantId: plan.plantId,
        at,
        actor: person,
        action: 'approve',
        thingKind: 'plan',
        thingId: id,
        sentence: `${person.name} approved revision ${plan.revision} of the plan for ${plan.channelName} on ${plan.lineName}.`,
        before: { state: 'proposed' },
        after: { state: 'in_force' },
      });
      const subject = {
        channelIds: [plan.channelId],
        reason: `approval of the plan for ${plan.channelName}`,
        rejudgeFrom: null,
      };
      return insertOwedJob(tx, { plantId: plan.plantId, name: JOBS.scoreChannels, subject, at });
    });
    await this.dispatcher.owedJobs([owedJobId]);
    return planView((await findPlan(this.database, id)) as PlanRow, { id: person.id, roles });
  }
}

function refuse(plan: PlanRow, person: { id: number; roles: Role[] }): void {
  const why = reasonNotToApprove(plan, person);
  if (why === null) return;
  if (plan.proposedBy === person.id && plan.state === 'proposed')
    throw new DomainError('forbidden', 'own-proposal', why);
  throw new DomainError('conflict', 'not-approvable', why);
}
