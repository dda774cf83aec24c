import { BAD_LOT, insertHistory, insertPlans, workbookOf } from '../../../../test/reliability/support/history';
import { insertBreak } from '../../../../test/support/factories/record';
import { WorkerBench } from '../testing/worker-bench';

describe('judging channels again', () => {
  let bench: WorkerBench;
  let channelId: number;
  beforeAll(async () => {
    bench = await WorkerBench.open();
  });
  afterAll(() => bench.close());
  beforeEach(async () => {
    await bench.reset();
    const { plant } = bench.place;
    channelId = plant.channels[0].id;
    await insertHistory(bench.db, plant);
    // The lots are stored and judged without a plan; then the plans are approved.
    await bench.processor.runOwed((await bench.confirmed(workbookOf(plant))).owedJobId);
    await insertPlans(bench.db, plant);
  });

  const owe = (rejudgeFrom: string | null = null) =>
    bench.owe('score-channels', {
      channelIds: [channelId],
      reason: 'approval of the plan for Coat weight',
      rejudgeFrom,
    });
  const current = () => bench.db('verdicts').where({ channel_id: channelId, is_current: true });

  it('gives every lot its verdict by the new plan, keeps the former ones, holds and mails', async () => {
    expect((await current()).map(({ not_scored_reason }) => not_scored_reason as string)).toEqual(
      Array(34).fill('no_plan_in_force'),
    );
    expect(await bench.processor.runOwed(await owe())).toEqual({ done: true });
    expect((await current()).every(({ score }) => score !== null)).toBe(true);
    expect(await bench.db('verdicts').where({ channel_id: channelId })).toHaveLength(68);
    const held = await bench.db('holds').join('lots', 'lots.id', 'holds.lot_id').pluck('number');
    expect(held).toContain(BAD_LOT);
    expect(bench.mailIds).toHaveLength(4);
  });

  it('changes nothing when it is run again, or by two workers at once', async () => {
    const owedJobId = await owe();
    await Promise.all([bench.processor.runOwed(owedJobId), bench.processor.runOwed(owedJobId)]);
    const before = await bench.everything();
    await bench.oweAgain(owedJobId);
    expect(await bench.processor.runOwed(owedJobId)).toEqual({ done: true });
    expect(await bench.everything()).toEqual(before);
    expect(await bench.db('outbox')).toHaveLength(4);
  });

  it('starts the baseline afresh at a break, for settled lots too', async () => {
    await bench.processor.runOwed(await owe());
    const [lot] = await bench.db('lots').where({ number: '24110' });
    await insertBreak(bench.db, bench.place.plant, bench.place.plant.channels[0], {
      at: (lot.starts_at as Date).toISOString(),
    });
    await bench.db.raw('update channels set inputs_version = inputs_version + 1');
    expect(await bench.processor.runOwed(await owe('2026-02-01T00:00:00Z'))).toEqual({ done: true });
    const starts = await bench.db('fits').where({ channel_id: channelId }).orderBy('id').pluck('segment_starts_at');
    expect(starts.slice(-2)).toEqual([null, lot.starts_at]);
  });

  it('says in the channel’s history when it cannot be done', async () => {
    const judge = bench.threads['judge-channel.thread'];
    bench.threads['judge-channel.thread'] = () => Promise.reject(new Error('broken for good'));
    const owedJobId = await owe();
    await bench.db('owed_jobs').where({ id: owedJobId }).update({ attempts: 7 });
    await bench.processor.runOwed(owedJobId);
    bench.threads['judge-channel.thread'] = judge;
    expect((await bench.db('audit_entries').orderBy('id')).at(-1)).toMatchObject({
      action: 'fail',
      thing_kind: 'channel',
      thing_id: channelId,
      sentence: expect.stringContaining('could not judge the channel again after approval of the plan'),
    });
    expect(await bench.db('owed_jobs').where({ id: owedJobId })).toMatchObject([{ state: 'failed' }]);
  });
});
