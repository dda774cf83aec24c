import { workbookOf } from '../../../../test/reliability/support/history';
import { WorkerBench } from '../testing/worker-bench';

describe('reading a workbook', () => {
  let bench: WorkerBench;
  beforeAll(async () => {
    bench = await WorkerBench.open();
  });
  afterAll(() => bench.close());
  beforeEach(() => bench.reset());
  afterEach(() => jest.restoreAllMocks());

  const received = async (bytes = workbookOf(bench.place.plant)) => {
    const intakeId = await bench.receive(bytes);
    return { intakeId, owedJobId: await bench.owe('read-intake', { intakeId }) };
  };
  const audited = () => bench.db('audit_entries').orderBy('id').pluck('action');

  it('stages its readings, counts its rows, and says what it could not use', async () => {
    const { owedJobId } = await received();
    expect(await bench.processor.runOwed(owedJobId)).toEqual({ done: true });
    expect(await bench.db('intakes')).toMatchObject([{ state: 'needs_attention', rows_read: 97, rows_not_used: 1 }]);
    expect(await bench.db('staged_readings')).toHaveLength(96);
    expect((await bench.db('intake_problems')).length).toBeGreaterThan(0);
    expect(await bench.db('owed_jobs')).toMatchObject([{ state: 'done', attempts: 1 }]);
    expect(await audited()).toEqual(['read']);
  });

  it('changes nothing when it is run again', async () => {
    const { owedJobId } = await received();
    await bench.processor.runOwed(owedJobId);
    const before = await bench.everything();
    expect(await bench.processor.runOwed(owedJobId)).toEqual({ done: false, reason: 'no longer owed' });
    await bench.oweAgain(owedJobId);
    expect(await bench.processor.runOwed(owedJobId)).toEqual({ done: false, reason: 'the intake was read already' });
    expect(await bench.everything()).toEqual(before);
    expect(await bench.db('owed_jobs')).toMatchObject([{ state: 'done' }]);
  });

  it('is done once by two workers at once', async () => {
    const { owedJobId } = await received();
    await Promise.all([bench.processor.runOwed(owedJobId), bench.processor.runOwed(owedJobId)]);
    expect(await bench.db('staged_readings')).toHaveLength(96);
    expect(await audited()).toEqual(['read']);
  });

  it('refuses what is no workbook with a sentence, once, and keeps the bytes', async () => {
    const picture = Buffer.from('89504e470d0a1a0a0000000d49484452', 'hex');
    const { owedJobId } = await received(picture);
    expect(await bench.processor.runOwed(owedJobId)).toEqual({ done: true });
    const [intake] = await bench.db('intakes');
    expect(intake).toMatchObject({ state: 'refused', failure: expect.stringMatching(/\.$/) });
    await bench.oweAgain(owedJobId);
    await bench.processor.runOwed(owedJobId);
    expect(await audited()).toEqual(['refuse']);
    expect(await bench.db('intake_bytes')).toMatchObject([{ bytes: picture }]);
  });

  it.each([
    ['takes too much memory', { code: 'ERR_WORKER_OUT_OF_MEMORY' }, 'Split it by shift'],
    ['takes too long', { name: 'AbortError' }, 'longer than five minutes'],
  ])('refuses a workbook that %s, at its first attempt', async (_what, error, sentence) => {
    const { owedJobId } = await received();
    const reader = bench.threads['read-intake.thread'];
    bench.threads['read-intake.thread'] = () => Promise.reject(Object.assign(new Error('ended'), error));
    const outcome = await bench.processor.runOwed(owedJobId);
    bench.threads['read-intake.thread'] = reader;
    expect(outcome).toMatchObject({ done: false, reason: expect.stringContaining(sentence) });
    expect(await bench.db('intakes')).toMatchObject([{ state: 'refused', failure: expect.stringContaining(sentence) }]);
    expect(await bench.db('owed_jobs')).toMatchObject([{ state: 'failed' }]);
  });

  it('reads one workbook at a time, and the next one after one that failed', async () => {
    const jobs = [await received(), await received()];
    const reader = bench.threads['read-intake.thread'];
    let running = 0;
    bench.threads['read-intake.thread'] = async (task: never) => {
      expect((running += 1)).toBe(1);
      await new Promise((resolve) => setTimeout(resolve, 20));
      running -= 1;
      if ((task as { intakeId: number }).intakeId === jobs[0].intakeId) throw new Error('thread ended');
      return reader(task);
    };
    const answers = await Promise.allSettled(jobs.map(({ owedJobId }) => bench.processor.runOwed(owedJobId)));
    bench.threads['read-intake.thread'] = reader;
    expect(answers.map(({ status }) => status)).toEqual(['rejected', 'fulfilled']);
    expect(await bench.db('intakes').orderBy('id').pluck('state')).toEqual(['received', 'needs_attention']);
    expect(await bench.db('owed_jobs').orderBy('id')).toMatchObject([
      { state: 'owed', attempts: 1, last_error: 'Error: thread ended' },
      { state: 'done' },
    ]);
  });
});
