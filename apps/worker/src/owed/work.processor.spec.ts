import { Logger } from '@nestjs/common';
import { DomainError, type JobName } from '@app/contracts';
import { insertAuditEntry } from '@app/data';
import { WorkerBench } from '../testing/worker-bench';
import { NoLongerOwedError, type OwedJobHandler } from './owed-job-handler';
import { RunningWork } from './running-work';
import { WorkProcessor } from './work.processor';

describe('working off owed jobs', () => {
  let bench: WorkerBench;
  let running: RunningWork;
  let processor: WorkProcessor;
  let run: jest.Mock;
  let owedJobId: number;
  beforeAll(async () => {
    bench = await WorkerBench.open();
  });
  afterAll(() => bench.close());
  beforeEach(async () => {
    await bench.reset();
    for (const level of ['warn', 'error'] as const)
      jest.spyOn(Logger.prototype, level).mockImplementation(() => undefined);
    run = jest.fn().mockResolvedValue({ done: true });
    const handler: OwedJobHandler = {
      jobName: 'score-intake',
      run,
      fail: (tx, job, sentence, at) =>
        insertAuditEntry(tx, {
          plantId: job.plantId,
          at,
          actor: null,
          action: 'fail',
          thingKind: 'intake',
          thingId: 1,
          sentence,
        }),
    };
    running = new RunningWork();
    const others = bench.handlers.filter(({ jobName }) => jobName !== 'score-intake');
    processor = new WorkProcessor([handler, ...others], bench.db, bench.clock, running);
    owedJobId = await bench.owe('score-intake', { intakeId: 1 });
  });
  afterEach(() => jest.restoreAllMocks());

  const row = () => bench.db('owed_jobs').first();
  const told = () => bench.db('audit_entries').pluck('sentence');

  it('hands the handler the job with its subject and the number of this attempt', async () => {
    await processor.runOwed(owedJobId);
    expect(run).toHaveBeenCalledWith({
      id: owedJobId,
      plantId: bench.place.plant.id,
      name: 'score-intake',
      subject: { intakeId: 1 },
      attempts: 1,
    });
  });

  it('tries again what fails, and says why it failed', async () => {
    run.mockRejectedValue(new Error('no connection'));
    for (const attempts of [1, 2]) {
      await expect(processor.runOwed(owedJobId)).rejects.toThrow('no connection');
      expect(await row()).toMatchObject({ state: 'owed', attempts, last_error: 'Error: no connection' });
    }
    expect(await told()).toEqual([]);
  });

  it('gives up at the eighth attempt and makes it visible, once', async () => {
    run.mockRejectedValue(new Error('no connection'));
    for (let attempt = 1; attempt < 8; attempt++) await expect(processor.runOwed(owedJobId)).rejects.toThrow();
    expect(await processor.runOwed(owedJobId)).toMatchObject({ done: false });
    expect(await processor.runOwed(owedJobId)).toEqual({ done: false, reason: 'no longer owed' });
    expect(run).toHaveBeenCalledTimes(8);
    expect(await row()).toMatchObject({ state: 'failed', last_error: 'Error: no connection' });
    expect(await told()).toEqual([expect.stringContaining('the administrator can see why in the log')]);
  });

  it('does not try again what was refused on purpose, and tells its sentence', async () => {
    run.mockRejectedValue(new DomainError('unprocessable', 'too-odd', 'This cannot be judged. Ask somebody.'));
    expect(await processor.runOwed(owedJobId)).toEqual({ done: false, reason: 'This cannot be judged. Ask somebody.' });
    expect(await told()).toEqual(['This cannot be judged. Ask somebody.']);
  });

  it('does not run a job again that has ended its process eight times', async () => {
    await bench.db('owed_jobs').update({ attempts: 8 });
    expect(await processor.runOwed(owedJobId)).toMatchObject({ done: false });
    expect(run).not.toHaveBeenCalled();
    expect(await row()).toMatchObject({ state: 'failed' });
    expect(await told()).toHaveLength(1);
  });

  it('takes it as done when another worker has ended the job', async () => {
    run.mockRejectedValue(new NoLongerOwedError(owedJobId));
    expect(await processor.runOwed(owedJobId)).toEqual({ done: false, reason: `job ${owedJobId} is no longer owed` });
    expect(await row()).toMatchObject({ last_error: null });
  });

  it('does not count an attempt that the stop of the program cut short', async () => {
    run.mockRejectedValue(new Error('the thread was ended'));
    running.beginToStop();
    await expect(processor.runOwed(owedJobId)).rejects.toThrow('the thread was ended');
    expect(await row()).toMatchObject({ state: 'owed', attempts: 0, last_error: null });
  });

  it('keeps the job owed when making its failure visible fails', async () => {
    run.mockRejectedValue(new DomainError('unprocessable', 'too-odd', 'x'.repeat(10)));
    await bench.db.raw(
      `create function break_off() returns trigger language plpgsql as $$ begin raise exception 'no room'; end $$`,
    );
    await bench.db.raw(
      'create trigger break_off before insert on audit_entries for each row execute function break_off()',
    );
    await expect(processor.runOwed(owedJobId)).rejects.toThrow('no room');
    await bench.db.raw('drop function break_off() cascade');
    expect(await row()).toMatchObject({ state: 'owed' });
    expect(await processor.runOwed(owedJobId)).toMatchObject({ done: false });
    expect(await row()).toMatchObject({ state: 'failed' });
  });

  it.each([
    ['without a handler', (handlers: OwedJobHandler[]) => handlers.slice(1), /^No handler for read-intake$/],
    ['with two handlers for it', (handlers: OwedJobHandler[]) => [...handlers, handlers[0]], /two handlers/],
  ])('does not start %s', (_what, change, message) => {
    expect(() => new WorkProcessor(change(bench.handlers), bench.db, bench.clock, running)).toThrow(message);
  });

  it('knows every job by name', () => {
    const names: JobName[] = [
      'read-intake',
      'score-intake',
      'score-channels',
      'rejudge-withdrawn',
      'compare-settled',
      'rejudge-settled',
      'propose-plan',
      'weekly-summary',
    ];
    expect(bench.handlers.map(({ jobName }) => jobName)).toEqual(names);
  });
});

describe('what runs', () => {
  it('is waited for, but no longer than told', async () => {
    const running = new RunningWork();
    let finish = () => {};
    void running.track(new Promise<void>((resolve) => (finish = resolve)));
    running.track(Promise.reject(new Error('failed'))).catch(() => undefined);
    const begun = performance.now();
    await running.settled(100);
    expect(performance.now() - begun).toBeGreaterThan(95);
    finish();
    await running.settled(60_000);
    expect(performance.now() - begun).toBeLessThan(10_000);
  });
});
