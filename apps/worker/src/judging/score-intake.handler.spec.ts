import { BAD_LOT, insertHistory, insertPlans, workbookOf } from '../../../../test/reliability/support/history';
import { WorkerBench } from '../testing/worker-bench';

describe('scoring an intake', () => {
  let bench: WorkerBench;
  let judge: WorkerBench['threads'][string];
  beforeAll(async () => {
    bench = await WorkerBench.open();
    judge = bench.threads['judge-channel.thread'];
  });
  afterAll(() => bench.close());
  beforeEach(async () => {
    await bench.reset();
    bench.threads['judge-channel.thread'] = judge;
    await insertHistory(bench.db, bench.place.plant);
    await insertPlans(bench.db, bench.place.plant);
  });

  const confirmed = () => bench.confirmed(workbookOf(bench.place.plant));
  const intake = (id: number) => bench.db('intakes').where({ id }).first();

  it('stores, judges, holds the bad lot, and owes one mail to each of four people', async () => {
    const { intakeId, owedJobId } = await confirmed();
    expect(await bench.processor.runOwed(owedJobId)).toEqual({ done: true });
    expect(await intake(intakeId)).toMatchObject({
      state: 'scored',
      rows_used: 96,
      rows_not_used: 1,
      readings_stored: 96,
    });
    expect(await bench.db('staged_readings')).toEqual([]);
    expect(await bench.db('verdicts')).toHaveLength(68);
    expect(await bench.db('hold_causes')).toMatchObject([{ signal: 'lot_mean', intake_id: intakeId }]);
    const mails = await bench.db('outbox').orderBy('id');
    expect(mails.map(({ recipient }) => (recipient as string).split('@')[0]).sort()).toEqual([
      'engineer',
      'engineer2',
      'lead',
      'manager',
    ]);
    for (const part of [
      BAD_LOT,
      'Coater 2',
      'BG-204',
      'coat weight',
      'σ above its baseline',
      'http://127.0.0.1:3000/holds/',
      'no gauge checks',
    ])
      expect((mails[0].plain_text as string).toLowerCase()).toContain(part.toLowerCase());
    expect(bench.mailIds).toEqual(mails.map(({ id }) => id as number));
    expect(await bench.db('audit_entries').orderBy('id').pluck('action')).toEqual(['read', 'store', 'score', 'hold']);
  });

  it('changes nothing when it is run again, also when its end was not recorded', async () => {
    const { owedJobId } = await confirmed();
    await bench.processor.runOwed(owedJobId);
    const before = await bench.everything();
    expect(await bench.processor.runOwed(owedJobId)).toMatchObject({ done: false });
    await bench.oweAgain(owedJobId);
    expect(await bench.processor.runOwed(owedJobId)).toEqual({
      done: false,
      reason: 'the intake is not waiting to be scored',
    });
    expect(await bench.everything()).toEqual(before);
  });

  it('is done once by two workers at once', async () => {
    const { owedJobId } = await confirmed();
    const answers = await Promise.all([bench.processor.runOwed(owedJobId), bench.processor.runOwed(owedJobId)]);
    expect(answers.filter(({ done }) => done)).toHaveLength(1);
    expect(await bench.db('verdicts')).toHaveLength(68);
    expect(await bench.db('fits')).toHaveLength(2);
    expect(await bench.db('hold_causes')).toHaveLength(1);
    expect(await bench.db('outbox')).toHaveLength(4);
    expect(await bench.db('audit_entries').pluck('action')).toHaveLength(4);
    expect(await bench.db('owed_jobs').where({ id: owedJobId })).toMatchObject([{ state: 'done', last_error: null }]);
  });

  it('goes on where it was cut short: the readings are stored once, the verdicts come later', async () => {
    const { intakeId, owedJobId } = await confirmed();
    bench.threads['judge-channel.thread'] = () => Promise.reject(new Error('thread ended'));
    await expect(bench.processor.runOwed(owedJobId)).rejects.toThrow('thread ended');
    expect(await intake(intakeId)).toMatchObject({ state: 'working', readings_stored: 96 });
    expect(await bench.db('verdicts')).toEqual([]);
    bench.threads['judge-channel.thread'] = judge;
    expect(await bench.processor.runOwed(owedJobId)).toEqual({ done: true });
    expect(await bench.db('readings')).toHaveLength(34 * 24);
    expect(await bench.db('audit_entries').orderBy('id').pluck('action')).toEqual(['read', 'store', 'score', 'hold']);
  });

  it('judges again what changed while it judged, and gives the same', async () => {
    const { owedJobId } = await confirmed();
    let rounds = 0;
    bench.threads['judge-channel.thread'] = async (task: never) => {
      const judged = await judge(task);
      if ((rounds += 1) <= 2) await bench.db.raw('update channels set inputs_version = inputs_version + 1');
      return judged;
    };
    expect(await bench.processor.runOwed(owedJobId)).toEqual({ done: true });
    expect(rounds).toBeGreaterThan(2);
    expect(await bench.db('verdicts')).toHaveLength(68);
    expect(await bench.db('outbox')).toHaveLength(4);
  });

  it('scores a workbook whose readings are all there without any new verdict or mail', async () => {
    await bench.processor.runOwed((await confirmed()).owedJobId);
    const { intakeId, owedJobId } = await confirmed();
    expect(await bench.processor.runOwed(owedJobId)).toEqual({ done: true });
    expect(await intake(intakeId)).toMatchObject({
      state: 'scored',
      rows_used: 0,
      rows_already_there: 96,
      rows_not_used: 1,
    });
    expect(await bench.db('verdicts')).toHaveLength(68);
    expect(await bench.db('outbox')).toHaveLength(4);
  });

  it('is refused in sight of a person when it cannot be done, and its stored readings stay', async () => {
    const { intakeId, owedJobId } = await confirmed();
    bench.threads['judge-channel.thread'] = () => Promise.reject(new Error('broken for good'));
    await bench.db('owed_jobs').where({ id: owedJobId }).update({ attempts: 7 });
    expect(await bench.processor.runOwed(owedJobId)).toMatchObject({ done: false });
    expect(await intake(intakeId)).toMatchObject({
      state: 'refused',
      failure: expect.stringContaining('could not do this work'),
    });
    expect(await bench.db('owed_jobs').where({ id: owedJobId })).toMatchObject([
      { state: 'failed', last_error: 'Error: broken for good' },
    ]);
    expect((await bench.db('audit_entries').orderBy('id')).at(-1)).toMatchObject({
      action: 'refuse',
      before: { state: 'working' },
    });
    expect(await bench.db('readings')).toHaveLength(34 * 24);
  });

  it('writes nothing of its outcome when its transaction fails at the end', async () => {
    const { intakeId, owedJobId } = await confirmed();
    await bench.db.raw(
      `create function break_off() returns trigger language plpgsql as $$ begin raise exception 'no room'; end $$`,
    );
    await bench.db.raw('create trigger break_off before insert on outbox for each row execute function break_off()');
    await expect(bench.processor.runOwed(owedJobId)).rejects.toThrow('no room');
    for (const table of ['verdicts', 'fits', 'holds', 'outbox', 'baseline_points'])
      expect(await bench.db(table)).toEqual([]);
    expect(await intake(intakeId)).toMatchObject({ state: 'working' });
    await bench.db.raw('drop function break_off() cascade');
    expect(await bench.processor.runOwed(owedJobId)).toEqual({ done: true });
    expect(await bench.db('outbox')).toHaveLength(4);
  });
});
