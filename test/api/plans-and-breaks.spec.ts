import type { PlanView } from '@app/contracts';
import { WorkerModule } from '../../apps/worker/src/worker.module';
import { startTestApp, type TestApp } from '../support/app';
import { expectProblem } from '../support/expect-problem';
import { insertIntake, insertLot, insertReadings } from '../support/factories/lots';
import { PASSWORD, signIn } from '../support/factories/people';
import { insertPlant, type TestPlant } from '../support/factories/plant';
import { scatter } from '../support/shift-workbook';

type Headers = { authorization: string };

describe('plans and breaks', () => {
  let app: TestApp;
  let plant: TestPlant;
  let channelId: number;
  const as = {} as Record<'manager' | 'engineer' | 'engineer2' | 'lead' | 'technician' | 'stranger', Headers>;

  beforeAll(async () => {
    app = await startTestApp({ extraImports: [WorkerModule.register({ isMailing: false })] });
    plant = await insertPlant(app.database);
    channelId = plant.channels[0].id;
    await insertPlant(app.database, { name: 'Overdale', domain: 'overdale.example' });
    for (const name of ['manager', 'engineer', 'engineer2', 'lead', 'technician'] as const)
      as[name] = await signIn(app, `${name}@marrowby.example`);
    as.stranger = await signIn(app, 'manager@overdale.example');
    const intakeId = await insertIntake(app.database, plant);
    for (let index = 0; index < 80; index++) {
      const startsAt = new Date(Date.UTC(2026, 2, 4) + index * 7_200_000);
      const lot = await insertLot(app.database, plant, { number: String(25000 + index), startsAt });
      await insertReadings(
        app.database,
        plant,
        { channel: plant.channels[0], lot, intakeId },
        scatter(60, 8, 0.3, index + 7),
      );
    }
  });
  afterAll(() => app.close());

  const post = (path: string, headers: Headers, body: object) => app.http.post(`/api/${path}`).set(headers).send(body);
  async function until<T>(look: () => Promise<T>, isSo: (seen: T) => boolean): Promise<T> {
    const end = Date.now() + 60_000;
    for (;;) {
      const seen = await look();
      if (isSo(seen)) return seen;
      if (Date.now() > end) throw new Error(`still ${JSON.stringify(seen).slice(0, 500)}`);
      await new Promise((resolve) => setTimeout(resolve, 50));
    }
  }
  const plan = async (id: number, headers: Headers = as.lead) =>
    (await app.http.get(`/api/plans/${id}`).set(headers).expect(200)).body as PlanView;

  it('are drafted, worked out, proposed, and approved by a second person, who signs', async () => {
    const drafted = await post(`channels/${channelId}/plans`, as.engineer, { reason: 'First plan.' }).expect(202);
    const { id } = drafted.body as PlanView;
    const proposed = await until(
      () => plan(id),
      (seen) => seen.state !== 'draft',
    );
    expect(proposed).toMatchObject({
      state: 'proposed',
      revision: 1,
      proposedBy: 'engineer',
      failure: null,
      mayApprove: false,
    });
    expect(proposed.parameters).toMatchObject({
      method: 'smoothing_spline',
      shortestPeriodSeconds: 3 * 86_400,
      limit: 3,
      isRobust: false,
    });
    expectProblem(await post(`channels/${channelId}/plans`, as.engineer2, { reason: 'Another.' }), 409, 'plan-pending');
    expect(await plan(id, as.manager)).toMatchObject({ mayApprove: true, whyNot: null });
    expectProblem(await post(`plans/${id}/approval`, as.manager, { password: 'not mine' }), 400, 'wrong-password');
    expectProblem(await post(`plans/${id}/approval`, as.engineer2, { password: PASSWORD }), 403, 'forbidden');
    const approved = await post(`plans/${id}/approval`, as.manager, { password: PASSWORD }).expect(200);
    expect(approved.body).toMatchObject({ state: 'in_force', approvedBy: 'manager', mayApprove: false });
    expectProblem(await post(`plans/${id}/approval`, as.manager, { password: PASSWORD }), 409, 'not-approvable');
    const judged = await until(
      async () =>
        Number(
          (
            await app
              .database('verdicts')
              .where({ channel_id: channelId, is_current: true })
              .whereNotNull('score')
              .count()
          )[0].count,
        ),
      (count) => count === 80,
    );
    expect(judged).toBe(80);
    expect(await app.database('holds').count()).toEqual([{ count: 0 }]);
  });

  it('cannot be approved by who proposed them', async () => {
    const { body } = await post(`channels/${channelId}/plans`, as.manager, {
      reason: 'With more readings.',
      isRobust: true,
    }).expect(202);
    const proposed = await until(
      () => plan((body as PlanView).id),
      (seen) => seen.state === 'proposed',
    );
    expect(proposed.parameters?.isRobust).toBe(true);
    expectProblem(await post(`plans/${body.id}/approval`, as.manager, { password: PASSWORD }), 403, 'own-proposal');
  });

  it('say why a channel without readings gets none', async () => {
    const { body } = await post(`channels/${plant.channels[1].id}/plans`, as.engineer, {
      reason: 'First plan.',
    }).expect(202);
    const ended = await until(
      () => plan((body as PlanView).id),
      (seen) => seen.state !== 'draft',
    );
    expect(ended).toMatchObject({
      state: 'retired',
      parameters: null,
      failure: expect.stringMatching(/readings.*\.$/),
    });
  });

  it('are listed for who may read, and closed to the others', async () => {
    const { body } = await app.http.get(`/api/channels/${channelId}/plans`).set(as.technician).expect(200);
    expect((body.items as PlanView[]).map((item) => [item.revision, item.state])).toEqual([
      [2, 'proposed'],
      [1, 'in_force'],
    ]);
    const [{ id }] = body.items as PlanView[];
    for (const path of [`channels/${channelId}/plans`, `plans/${id}`]) {
      expectProblem(await app.http.get(`/api/${path}`).set(as.stranger), 404, 'not-found');
      expect((await app.http.get(`/api/${path}`)).status).toBe(401);
    }
    expectProblem(await post(`channels/${channelId}/plans`, as.lead, { reason: 'x' }), 403, 'forbidden');
    expectProblem(await post(`channels/${channelId}/plans`, as.stranger, { reason: 'x' }), 404, 'not-found');
    expect((await post(`channels/${channelId}/plans`, as.engineer, { reason: ' ' })).body.errors[0].pointer).toBe(
      '/reason',
    );
    const unclear = await post(`channels/${channelId}/plans`, as.engineer, { reason: 'x', isRobust: 'perhaps' });
    expect(unclear.body.errors[0].pointer).toBe('/isRobust');
    expectProblem(await post(`plans/${id}/approval`, as.stranger, { password: PASSWORD }), 404, 'not-found');
    expect((await app.http.post(`/api/plans/${id}/approval`).send({ password: PASSWORD })).status).toBe(401);
  });

  describe('breaks', () => {
    const body = { at: '2026-03-08T06:00:00Z', kind: 'adjustment', reason: 'Window wiped.' };
    const declare = (headers: Headers, changed: object = {}) =>
      post(`channels/${channelId}/breaks`, headers, { ...body, ...changed });

    it('start the baseline afresh: lots that it reached across are judged again, and both verdicts are kept', async () => {
      const before = Number((await app.database('verdicts').where({ channel_id: channelId }).count())[0].count);
      const { body: declared } = await declare(as.engineer).expect(201);
      expect(declared).toMatchObject({
        at: '2026-03-08T06:00:00.000Z',
        kind: 'adjustment',
        reason: 'Window wiped.',
        by: 'engineer',
      });
      await until(
        async () =>
          Number((await app.database('owed_jobs').where({ name: 'score-channels', state: 'owed' }).count())[0].count),
        (count) => count === 0,
      );
      const after = Number((await app.database('verdicts').where({ channel_id: channelId }).count())[0].count);
      expect(after).toBeGreaterThan(before);
      const segments = await app
        .database('fits')
        .where({ channel_id: channelId })
        .whereNotNull('segment_starts_at')
        .select('segment_starts_at');
      expect(segments).toEqual([{ segment_starts_at: new Date(body.at) }]);
      const record = await app.http
        .get(`/api/channels/${channelId}/record?from=${Date.UTC(2026, 2, 4)}&to=${Date.UTC(2026, 2, 11)}&width=400`)
        .set(as.lead)
        .expect(200);
      expect(record.body.breaks).toHaveLength(1);
    });

    it('are refused ahead of now, of an unknown kind, without a reason', async () => {
      expectProblem(await declare(as.engineer, { at: '2026-03-12T06:00:00Z' }), 400, 'break-in-future');
      const bad = await declare(as.engineer, { at: 'yesterday', kind: 'magic', reason: '' });
      expect((bad.body.errors as { pointer: string }[]).map((error) => error.pointer).sort()).toEqual([
        '/at',
        '/kind',
        '/reason',
      ]);
    });

    it('are closed to other roles, other plants and nobody', async () => {
      expectProblem(await declare(as.lead), 403, 'forbidden');
      expectProblem(await declare(as.technician), 403, 'forbidden');
      expectProblem(await declare(as.stranger), 404, 'not-found');
      expect((await app.http.post(`/api/channels/${channelId}/breaks`).send(body)).status).toBe(401);
    });
  });
});
