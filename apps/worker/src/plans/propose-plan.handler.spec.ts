import { insertPlanDraft } from '@app/data';
import { insertHistory } from '../../../../test/reliability/support/history';
import { WorkerBench } from '../testing/worker-bench';

describe('working out a plan', () => {
  let bench: WorkerBench;
  let channelId: number;
  beforeAll(async () => {
    bench = await WorkerBench.open();
  });
  afterAll(() => bench.close());
  beforeEach(async () => {
    await bench.reset();
    channelId = bench.place.plant.channels[0].id;
  });

  const drafted = async () => {
    const { plant } = bench.place;
    const planId = await bench.db.transaction((tx) =>
      insertPlanDraft(tx, {
        plantId: plant.id,
        channelId,
        reason: 'first plan',
        isRobust: false,
        draftedBy: plant.people.engineer.id,
        draftedAt: bench.clock.now(),
      }),
    );
    return { planId, owedJobId: await bench.owe('propose-plan', { planId }) };
  };
  const plan = () => bench.db('plan_revisions').first();
  const audited = () => bench.db('audit_entries').orderBy('id').select('action', 'actor_name');

  it('proposes it from the readings in the name of who asked, once, however often it runs', async () => {
    await insertHistory(bench.db, bench.place.plant);
    const { owedJobId } = await drafted();
    const answers = await Promise.all([bench.processor.runOwed(owedJobId), bench.processor.runOwed(owedJobId)]);
    expect(answers.filter(({ done }) => done)).toHaveLength(1);
    expect(await plan()).toMatchObject({
      state: 'proposed',
      proposed_by: bench.place.plant.people.engineer.id,
      parameters: { method: 'smoothing_spline', signals: expect.any(Object) },
    });
    const before = await bench.everything();
    await bench.oweAgain(owedJobId);
    expect(await bench.processor.runOwed(owedJobId)).toEqual({ done: false, reason: 'the plan is no draft' });
    expect(await bench.everything()).toEqual(before);
    expect(await audited()).toEqual([{ action: 'propose', actor_name: 'engineer' }]);
  });

  it('states the allowance by the shares of the plant', async () => {
    await insertHistory(bench.db, bench.place.plant);
    await bench.db('plants').update({ allowance_notice_share: 0.25, allowance_cap_share: 0.5 });
    await bench.processor.runOwed((await drafted()).owedJobId);
    // The tolerance of coat weight is 2.4 g/m².
    const { parameters } = await plan();
    expect(parameters.allowanceNotice).toBeCloseTo(0.6, 12);
    expect(parameters.allowanceCap).toBeCloseTo(1.2, 12);
  });

  it('retires it with a sentence when the channel has no readings yet', async () => {
    await bench.processor.runOwed((await drafted()).owedJobId);
    expect(await plan()).toMatchObject({ state: 'retired', failure: expect.stringContaining('no readings yet') });
    expect(await audited()).toEqual([{ action: 'retire', actor_name: 'Ebbline' }]);
  });

  it('retires it in sight of a person when it cannot be done', async () => {
    const thread = bench.threads['propose-plan.thread'];
    bench.threads['propose-plan.thread'] = () => Promise.reject(new Error('broken for good'));
    const { owedJobId } = await drafted();
    await bench.db('owed_jobs').where({ id: owedJobId }).update({ attempts: 7 });
    await bench.processor.runOwed(owedJobId);
    bench.threads['propose-plan.thread'] = thread;
    expect(await plan()).toMatchObject({
      state: 'retired',
      failure: expect.stringContaining('could not do this work'),
    });
  });
});
