import { Inject, Injectable } from '@nestjs/common';
import { JOBS } from '@app/contracts';
import {
  type Database,
  findPlan,
  findPerson,
  insertAuditEntry,
  lockOwedJob,
  type OwedJob,
  type PlanRow,
  type Transaction,
  updateOwedJobEnded,
  updatePlanFailed,
  updatePlanProposed,
} from '@app/data';
import { CLOCK, type Clock, CONFIG, type Config, DATABASE, ThreadPools } from '@app/platform';
import { type HandlerOutcome, NoLongerOwedError, type OwedJobHandler } from '../owed/owed-job-handler';
import type { ProposePlanOutcome, ProposePlanTask } from './propose-plan.thread';

type Job = OwedJob & { subject: { planId: number } };

/** Works out a drafted plan and proposes it in the name of the person who asked for it. */
@Injectable()
export class ProposePlanHandler implements OwedJobHandler<'propose-plan'> {
  readonly jobName = JOBS.proposePlan;

  constructor(
    @Inject(DATABASE) private readonly database: Database,
    @Inject(CONFIG) private readonly config: Config,
    @Inject(CLOCK) private readonly clock: Clock,
    private readonly threads: ThreadPools,
  ) {}

  async run(job: Job): Promise<HandlerOutcome> {
    const plan = await findPlan(this.database, job.subject.planId);
    if (plan?.state !== 'draft') {
      await updateOwedJobEnded(this.database, job.id, 'done', this.clock.now());
      return { done: false, reason: 'the plan is no draft' };
    }
    const task: ProposePlanTask = { databaseUrl: this.config.databaseUrl, planId: plan.id };
    const outcome = await this.threads.run<ProposePlanOutcome>('propose-plan.thread', task);
    const at = this.clock.now();
    await this.database.transaction(async (tx) => {
      if (!(await lockOwedJob(tx, job.id))) throw new NoLongerOwedError(job.id);
      if (outcome.status === 'proposed') await this.propose(tx, plan, outcome, at);
      else await this.giveUp(tx, plan, outcome.sentence, at);
      await updateOwedJobEnded(tx, job.id, 'done', at);
    });
    return { done: true };
  }

  async fail(tx: Transaction, job: Job, sentence: string, at: Date): Promise<void> {
    const plan = await findPlan(tx, job.subject.planId);
    if (plan?.state === 'draft') await this.giveUp(tx, plan, sentence, at);
  }

  private async propose(
    tx: Transaction,
    plan: PlanRow,
    outcome: Extract<ProposePlanOutcome, { status: 'proposed' }>,
    at: Date,
  ): Promise<void> {
    const person = await findPerson(tx, plan.draftedBy);
    if (!person) throw new Error(`no person ${plan.draftedBy}`);
    await updatePlanProposed(tx, plan.id, {
      parameters: outcome.parameters,
      report: outcome.report,
      by: person.id,
      at,
    });
    await insertAuditEntry(tx, {
      plantId: plan.plantId,
      at,
      actor: person,
      action: 'propose',
      thingKind: 'plan',
      thingId: plan.id,
      sentence: `${person.name} proposed revision ${plan.revision} of the plan for ${plan.channelName} on ${plan.lineName}: ${plan.reason}`,
      before: { state: 'draft' },
      after: { state: 'proposed', parameters: outcome.parameters },
    });
  }

  private async giveUp(tx: Transaction, plan: PlanRow, sentence: string, at: Date): Promise<void> {
    await updatePlanFailed(tx, plan.id, sentence, at);
    await insertAuditEntry(tx, {
      plantId: plan.plantId,
      at,
      actor: null,
      action: 'retire',
      thingKind: 'plan',
      thingId: plan.id,
      sentence: `Ebbline could not work out revision ${plan.revision} of the plan for ${plan.channelName} on ${plan.lineName}: ${sentence}`,
      before: { state: 'draft' },
      after: { state: 'retired' },
    });
  }
}
