import type { INestApplicationContext } from '@nestjs/common';
import type { IntakeView } from '@app/contracts';
import { createDatabase, type Database, findIntake, findPlan, listOwedJobIds, type Person } from '@app/data';
import type { SeededPlant } from '../../../database/seeds/plant-seed';
import { BreaksService } from '../../../apps/api/src/breaks/breaks.service';
import { DecisionsService } from '../../../apps/api/src/decisions/decisions.service';
import { IntakesService } from '../../../apps/api/src/intakes/intakes.service';
import { PlansService } from '../../../apps/api/src/plans/plans.service';
import { DueSummariesService } from '../../../apps/worker/src/summary/due-summaries.service';
import type { PlayClock } from './play-clock';

const POLL_MS = 8;
const PATIENCE_MS = 120_000;

/** What the play needs of the running program: the services that the routes call, and the database to wait on. */
export class Stage {
  readonly intakes: IntakesService;
  readonly plans: PlansService;
  readonly breaks: BreaksService;
  readonly decisions: DecisionsService;
  readonly dueSummaries: DueSummariesService;
  readonly database: Database;

  constructor(
    app: INestApplicationContext,
    databaseUrl: string,
    readonly clock: PlayClock,
    readonly plant: SeededPlant,
    private readonly people: Map<string, Person>,
  ) {
    this.intakes = app.get(IntakesService, { strict: false });
    this.plans = app.get(PlansService, { strict: false });
    this.breaks = app.get(BreaksService, { strict: false });
    this.decisions = app.get(DecisionsService, { strict: false });
    this.dueSummaries = app.get(DueSummariesService, { strict: false });
    this.database = createDatabase(databaseUrl, { min: 0, max: 3 });
  }

  person(email: string): Person {
    const person = this.people.get(email);
    if (!person) throw new Error(`nobody has the address ${email}`);
    return person;
  }

  channelId(line: string, channel: string): number {
    const id = this.plant.channelIds.get(`${line}/${channel}`);
    if (id === undefined) throw new Error(`${line} has no channel ${channel}`);
    return id;
  }

  /** Uploads a workbook, confirms what was recognised, and waits until it is scored. */
  async takeIn(who: Person, line: string, name: string, bytes: Buffer): Promise<IntakeView> {
    const received = await this.intakes.receive(who, this.plant.lineIds.get(line) as number, { name, bytes });
    if (!received.isConfirmable)
      throw new Error(
        `${name} cannot be confirmed: ${received.failure ?? received.problems[0]?.detail ?? received.state}`,
      );
    await this.intakes.confirm(who, received.id);
    await this.until(`${name} is scored`, async () => {
      const intake = await findIntake(this.database, received.id);
      if (intake?.state === 'refused') throw new Error(`${name} was refused: ${intake.failure}`);
      return intake?.state === 'scored';
    });
    return this.intakes.get(who, received.id);
  }

  async approvePlan(proposer: Person, approver: Person, channelId: number, reason: string): Promise<void> {
    const draft = await this.plans.propose(proposer, channelId, { reason, isRobust: false });
    await this.until(`plan ${draft.id} is proposed`, async () => {
      const plan = await findPlan(this.database, draft.id);
      if (plan?.failure) throw new Error(`no plan for ${plan.channelName} on ${plan.lineName}: ${plan.failure}`);
      return plan?.state === 'proposed';
    });
    await this.plans.approve(approver, draft.id);
  }

  /** Until nothing is owed any more. */
  async settle(): Promise<void> {
    await this.until('nothing is owed', async () => (await listOwedJobIds(this.database)).length === 0);
  }

  private async until(what: string, isSo: () => Promise<boolean>): Promise<void> {
    const end = performance.now() + PATIENCE_MS;
    while (!(await isSo())) {
      if (performance.now() > end) throw new Error(`waited ${PATIENCE_MS / 1000} s and not yet: ${what}`);
      await new Promise((resolve) => setTimeout(resolve, POLL_MS));
    }
  }

  async close(): Promise<void> {
    await this.database.destroy();
  }
}
