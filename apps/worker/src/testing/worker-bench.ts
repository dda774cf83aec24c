import { createHash } from 'node:crypto';
import { Logger } from '@nestjs/common';
import { type Database, insertIntake, insertOwedJob } from '@app/data';
import type { JobName, OwedJobSubject } from '@app/contracts';
import type { Config, Dispatcher, ThreadPools } from '@app/platform';
import { openPlantDatabase, type PlantDatabase } from '../../../../libs/data/src/testing/plant-database';
import { SettableClock } from '../../../../test/support/clock';
import { ReadIntakeHandler } from '../intake/read-intake.handler';
import readIntake from '../intake/read-intake.thread';
import { RejudgeWithdrawnHandler } from '../intake/rejudge-withdrawn.handler';
import { CompareSettledHandler } from '../judging/compare-settled.handler';
import { HeldLotsMailService } from '../judging/held-lots-mail.service';
import { judgeFrom, type JudgeChannelTask } from '../judging/judge-channel.thread';
import { JudgingService } from '../judging/judging.service';
import { RejudgeSettledHandler } from '../judging/rejudge-settled.handler';
import { ScoreChannelsHandler } from '../judging/score-channels.handler';
import { ScoreIntakeHandler } from '../judging/score-intake.handler';
import type { OwedJobHandler } from '../owed/owed-job-handler';
import { RunningWork } from '../owed/running-work';
import { WorkProcessor } from '../owed/work.processor';
import { ProposePlanHandler } from '../plans/propose-plan.handler';
import proposePlan from '../plans/propose-plan.thread';
import { SummaryMailService } from '../summary/summary-mail.service';
import { WeeklySummaryHandler } from '../summary/weekly-summary.handler';

type Threads = Record<string, (task: never) => Promise<unknown>>;

/** Handlers and processor as in the program, on a database of their own; what threads do is done here, and can be made to fail. */
export class WorkerBench {
  readonly clock = new SettableClock(new Date('2026-03-02T12:00:00Z'));
  readonly running = new RunningWork();
  readonly mailIds: number[] = [];
  readonly handlers: OwedJobHandler[];
  readonly processor: WorkProcessor;
  readonly threads: Threads;

  private constructor(readonly place: PlantDatabase) {
    const config = { databaseUrl: place.url, publicUrl: 'http://127.0.0.1:3000' } as Config;
    this.threads = {
      'read-intake.thread': readIntake,
      'judge-channel.thread': (task: JudgeChannelTask) => judgeFrom(this.db, task),
      'propose-plan.thread': proposePlan,
    };
    const pools = { run: (name: string, task: never) => this.threads[name](task) } as unknown as ThreadPools;
    const dispatcher = {
      // What is owed is worked off by hand here.
      owedJobs: () => Promise.resolve(),
      mails: (ids: number[]) => Promise.resolve(void this.mailIds.push(...ids)),
    } as unknown as Dispatcher;
    const judging = new JudgingService(this.db, config, this.clock, pools);
    const mails = new HeldLotsMailService(config);
    this.handlers = [
      new ReadIntakeHandler(this.db, config, this.clock, pools, dispatcher),
      new ScoreIntakeHandler(this.db, this.clock, judging, mails, dispatcher),
      new ScoreChannelsHandler(this.clock, judging, mails, dispatcher),
      new RejudgeWithdrawnHandler(this.db, config, this.clock, judging, mails, dispatcher),
      new CompareSettledHandler(this.db, this.clock, judging),
      new RejudgeSettledHandler(this.db, this.clock, judging, mails, dispatcher),
      new ProposePlanHandler(this.db, config, this.clock, pools),
      new WeeklySummaryHandler(this.db, this.clock, new SummaryMailService(config), dispatcher),
    ];
    this.processor = new WorkProcessor(this.handlers, this.db, this.clock, this.running);
  }

  /** What fails on purpose is not logged. */
  static async open(): Promise<WorkerBench> {
    Logger.overrideLogger(false);
    return new WorkerBench(await openPlantDatabase());
  }

  get db(): Database {
    return this.place.db;
  }

  async reset(): Promise<void> {
    this.mailIds.length = 0;
    await this.place.reset();
  }

  owe<N extends JobName>(name: N, subject: OwedJobSubject[N]): Promise<number> {
    return this.db.transaction((tx) =>
      insertOwedJob(tx, { plantId: this.place.plant.id, name, subject, at: this.clock.now() }),
    );
  }

  /** A received workbook. */
  receive(bytes: Buffer): Promise<number> {
    const { plant } = this.place;
    return this.db.transaction((tx) =>
      insertIntake(tx, {
        plantId: plant.id,
        lineId: plant.lines[0].id,
        fileName: 'shift.xlsx',
        bytes,
        sha256: createHash('sha256').update(bytes).digest(),
        receivedBy: plant.people.engineer.id,
        receivedAt: this.clock.now(),
      }),
    );
  }

  /** A read and confirmed workbook, owed its scoring; answers intake and owed job. */
  async confirmed(bytes: Buffer): Promise<{ intakeId: number; owedJobId: number }> {
    const intakeId = await this.receive(bytes);
    await this.processor.runOwed(await this.owe('read-intake', { intakeId }));
    await this.db('intakes')
      .where({ id: intakeId })
      .update({ state: 'queued', confirmed_by: this.place.plant.people.engineer.id, confirmed_at: this.clock.now() });
    return { intakeId, owedJobId: await this.owe('score-intake', { intakeId }) };
  }

  /** Owes the same job again, as if its end had not been recorded. */
  async oweAgain(owedJobId: number): Promise<void> {
    await this.db('owed_jobs').where({ id: owedJobId }).update({ state: 'owed', ended_at: null });
  }

  /** Every row of what a job may write, to be compared. */
  async everything(): Promise<Record<string, unknown[]>> {
    const tables =
      'intakes intake_problems staged_readings lots lot_channels readings plan_revisions verdicts verdict_signals';
    const all: Record<string, unknown[]> = {};
    for (const table of `${tables} holds hold_causes outbox outbox_attachments summaries audit_entries`.split(' '))
      all[table] = await this.db(table).orderByRaw('1, 2, 3, 4');
    return all;
  }

  close(): Promise<void> {
    return this.place.close();
  }
}
