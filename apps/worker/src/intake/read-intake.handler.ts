import { Inject, Injectable } from '@nestjs/common';
import { DomainError, JOBS } from '@app/contracts';
import {
  type Database,
  insertAuditEntry,
  lockIntake,
  lockOwedJob,
  notifyProgress,
  type OwedJob,
  type Transaction,
  updateIntakeRefused,
  updateOwedJobEnded,
} from '@app/data';
import { CLOCK, type Clock, CONFIG, type Config, DATABASE, Dispatcher, ThreadPools } from '@app/platform';
import { type HandlerOutcome, NoLongerOwedError, type OwedJobHandler } from '../owed/owed-job-handler';
import type { ReadIntakeOutcome, ReadIntakeTask } from './read-intake.thread';

type Job = OwedJob & { subject: { intakeId: number } };

const MAX_READING_MS = 5 * 60_000;

/** Has a workbook read in a thread that can be stopped; a file that breaks the reader is refused with a sentence and kept. */
@Injectable()
export class ReadIntakeHandler implements OwedJobHandler<'read-intake'> {
  readonly jobName = JOBS.readIntake;
  private former: Promise<unknown> = Promise.resolve();

  constructor(
    @Inject(DATABASE) private readonly database: Database,
    @Inject(CONFIG) private readonly config: Config,
    @Inject(CLOCK) private readonly clock: Clock,
    private readonly threads: ThreadPools,
    private readonly dispatcher: Dispatcher,
  ) {}

  async run(job: Job): Promise<HandlerOutcome> {
    const task: ReadIntakeTask = {
      databaseUrl: this.config.databaseUrl,
      intakeId: job.subject.intakeId,
      owedJobId: job.id,
      now: this.clock.now().getTime(),
    };
    const outcome = await this.inTurn(() => this.read(task));
    if (outcome.status === 'read') {
      await this.dispatcher.owedJobs(outcome.owedJobIds);
      return { done: true };
    }
    const at = this.clock.now();
    await this.database.transaction(async (tx) => {
      if (!(await lockOwedJob(tx, job.id))) throw new NoLongerOwedError(job.id);
      if (outcome.status === 'refused') await this.fail(tx, job, outcome.sentence, at);
      await updateOwedJobEnded(tx, job.id, 'done', at);
    });
    return outcome.status === 'refused' ? { done: true } : { done: false, reason: 'the intake was read already' };
  }

  /** Refuses the workbook, which is kept. */
  async fail(tx: Transaction, job: Job, sentence: string, at: Date): Promise<void> {
    const { intakeId } = job.subject;
    const intake = await lockIntake(tx, intakeId);
    if (intake?.state !== 'received') return;
    await updateIntakeRefused(tx, intakeId, sentence);
    await insertAuditEntry(tx, {
      plantId: job.plantId,
      at,
      actor: null,
      action: 'refuse',
      thingKind: 'intake',
      thingId: intakeId,
      sentence: `Ebbline refused ${intake.fileName}: ${sentence}`,
      before: { state: intake.state },
      after: { state: 'refused' },
    });
    await notifyProgress(tx, {
      intakeId,
      stage: 'failed',
      rowsRead: 0,
      channelsScored: 0,
      channelsTotal: 0,
      sentence,
    });
  }

  /** One workbook at a time in this process; the time that one may take begins with its turn. */
  private inTurn<T>(read: () => Promise<T>): Promise<T> {
    const turn = this.former.then(read);
    this.former = turn.catch(() => undefined);
    return turn;
  }

  private async read(task: ReadIntakeTask): Promise<ReadIntakeOutcome> {
    try {
      return await this.threads.run<ReadIntakeOutcome>('read-intake.thread', task, AbortSignal.timeout(MAX_READING_MS));
    } catch (error) {
      const { code, name } = error as { code?: string; name?: string };
      if (code === 'ERR_WORKER_OUT_OF_MEMORY')
        throw new DomainError(
          'unprocessable',
          'reader-out-of-memory',
          'The workbook needs more memory than one file may take. Split it by shift and upload the parts.',
        );
      if (name === 'AbortError' || name === 'TimeoutError')
        throw new DomainError(
          'unprocessable',
          'reading-too-slow',
          'Reading the workbook took longer than five minutes and was stopped. Split it by shift and upload the parts.',
        );
      throw error;
    }
  }
}
