import { Inject, Injectable } from '@nestjs/common';
import type { IntakeView, SettledChange } from '@app/contracts';
import {
  type Database,
  type IntakeRow,
  listSettledThatWouldChange,
  lockIntake,
  type Person,
  requestRejudgeSettled,
  withdrawIntake,
} from '@app/data';
import { CLOCK, type Clock, DATABASE, Dispatcher } from '@app/platform';
import { IntakesService } from './intakes.service';

/** What happens to an intake after it was scored: it is taken back, or its late readings change verdicts that were settled. */
@Injectable()
export class WithdrawalsService {
  constructor(
    @Inject(DATABASE) private readonly database: Database,
    @Inject(CLOCK) private readonly clock: Clock,
    private readonly intakes: IntakesService,
    private readonly dispatcher: Dispatcher,
  ) {}

  async withdraw(person: Person, id: number, reason: string): Promise<IntakeView> {
    await this.intakes.require(person, id, 'upload_intake');
    const owedJobIds = await this.database.transaction(async (tx) => {
      const intake = (await lockIntake(tx, id)) as IntakeRow;
      return withdrawIntake(tx, { intake, person, reason, at: this.clock.now() });
    });
    await this.dispatcher.owedJobs(owedJobIds);
    return this.intakes.get(person, id);
  }

  /** Settled verdicts that would be another one with what this intake brought late. */
  async settled(person: Person, id: number): Promise<SettledChange[]> {
    await this.intakes.require(person, id, 'read');
    return listSettledThatWouldChange(this.database, id);
  }

  /** Has them judged again; both verdicts are kept. Where none would change, there is nothing to do. */
  async rejudgeSettled(person: Person, id: number): Promise<SettledChange[]> {
    await this.intakes.require(person, id, 'upload_intake');
    const owedJobId = await this.database.transaction(async (tx) => {
      const intake = (await lockIntake(tx, id)) as IntakeRow;
      return requestRejudgeSettled(tx, { intake, person, at: this.clock.now() });
    });
    if (owedJobId !== null) await this.dispatcher.owedJobs([owedJobId]);
    return listSettledThatWouldChange(this.database, id);
  }
}
