import type { ApiTokenView, IntakeView, NewApiToken } from '@app/contracts';
import { WorkerModule } from '../../apps/worker/src/worker.module';
import { startTestApp, type TestApp } from '../support/app';
import { expectProblem } from '../support/expect-problem';
import { insertPerson, signIn } from '../support/factories/people';
import { insertPlan } from '../support/factories/plans';
import { insertPlant, type TestPlant } from '../support/factories/plant';
import { longWorkbook, scatter } from '../support/shift-workbook';

type Headers = { authorization: string };

describe('API tokens', () => {
  let app: TestApp;
  let plant: TestPlant;
  let other: TestPlant;
  let token: NewApiToken;
  let machine: Headers;
  const as = {} as Record<'engineer' | 'manager' | 'lead' | 'admin', Headers>;

  beforeAll(async () => {
    app = await startTestApp({ extraImports: [WorkerModule.register({ isMailing: false })] });
    plant = await insertPlant(app.database);
    await insertPlan(app.database, plant, plant.channels[0]);
    other = await insertPlant(app.database, { name: 'Overdale', domain: 'overdale.example' });
    for (const name of ['engineer', 'manager', 'lead', 'admin'] as const)
      as[name] = await signIn(app, `${name}@marrowby.example`);
    const made = await app.http
      .post(`/api/plants/${plant.id}/api-tokens`)
      .set(as.engineer)
      .send({ name: ' Line computer ' })
      .expect(201);
    token = made.body as NewApiToken;
    machine = { authorization: `Bearer ${token.token}` };
  });
  afterAll(() => app.close());

  const workbook = (first: number, day: number) =>
    longWorkbook(
      Array.from({ length: 4 }, (_, index) => ({
        number: String(first + index),
        startsAt: new Date(Date.UTC(2026, 2, day) + index * 7_200_000).toISOString(),
        values: scatter(60, 12, 0.3, first + index),
      })),
    );
  const send = (bytes: Buffer, headers: Headers = machine, query = '') =>
    app.http.post(`/api/lines/${plant.lines[0].id}/intakes${query}`).set(headers).attach('file', bytes, 'shift.xlsx');
  const list = async (headers: Headers) =>
    (await app.http.get(`/api/plants/${plant.id}/api-tokens`).set(headers).expect(200)).body as ApiTokenView[];
  const entriesOf = async (action: string) =>
    (
      await app.database.raw<{ rows: { sentence: string; thingId: number }[] }>(
        'select sentence, after, thing_id as "thingId" from audit_entries where action = ? order by id',
        [action],
      )
    ).rows;
  async function until(id: number, state: string): Promise<IntakeView> {
    const end = Date.now() + 60_000;
    for (;;) {
      const intake = (await app.http.get(`/api/intakes/${id}`).set(machine).expect(200)).body as IntakeView;
      if (intake.state === state) return intake;
      if (Date.now() > end) throw new Error(`${intake.state}, not ${state}: ${intake.failure}`);
      await new Promise((resolve) => setTimeout(resolve, 50));
    }
  }

  it('are shown once and kept as a hash, each to its person alone', async () => {
    expect(token).toMatchObject({ name: 'Line computer', lastUsedAt: null, revokedAt: null });
    expect(token.token).toMatch(/^ebb_[\w-]{43}$/);
    const kept = await app.database('api_tokens').select('*');
    expect(JSON.stringify(kept)).not.toContain(token.token);
    expect(JSON.stringify(await list(as.engineer))).not.toContain('ebb_');
    expect(await list(as.engineer)).toHaveLength(1);
    expect(await list(as.manager)).toEqual([]);
    const [entry] = await entriesOf('make-api-token');
    expect(entry?.sentence).toBe('engineer made the API token "Line computer".');
    expect(JSON.stringify(entry)).not.toContain('ebb_');
  });

  it('send a workbook in the name of the person, and say by which token in the audit', async () => {
    const received = (await send(await workbook(24001, 8)).expect(201)).body as IntakeView;
    expect(received).toMatchObject({ state: 'needs_attention', receivedBy: 'engineer' });
    const [entry] = await entriesOf('upload');
    expect(entry.sentence).toMatch(/^engineer, by the API token "Line computer", uploaded shift\.xlsx for Coater 2/);
    expect((await list(as.engineer))[0].lastUsedAt).toBe(app.clock.now().toISOString());
    await app.http.post(`/api/intakes/${received.id}/confirm`).set(as.engineer).expect(200);
    await until(received.id, 'scored');
  });

  it('let a workbook of a known layout confirm itself', async () => {
    const received = (await send(await workbook(24005, 9), machine, '?confirm=auto').expect(201)).body as IntakeView;
    const scored = await until(received.id, 'scored');
    expect(scored).toMatchObject({ confirmedBy: 'engineer', rowsUsed: 48, rowsNotUsed: 0 });
    const entry = (await entriesOf('confirm')).find(({ thingId }) => Number(thingId) === received.id);
    expect(entry?.sentence).toMatch(/confirmed itself, as engineer had asked/);
  });

  it('leave a workbook with a row that is not used to a person', async () => {
    const bytes = await longWorkbook([
      { number: '24009', startsAt: '2026-03-10T00:00:00.000Z', values: scatter(60, 3, 0.3, 1) },
      { number: '24010', startsAt: '2026-03-10T02:00:00.000Z', values: [60.1], channel: 'Sheen' },
    ]);
    const received = (await send(bytes, machine, '?confirm=auto').expect(201)).body as IntakeView;
    expect(received).toMatchObject({ state: 'needs_attention', rowsNotUsed: 1, confirmedAt: null });
  });

  it('leave a workbook of another layout to a person', async () => {
    await app.database('layouts').update({ fingerprint: Buffer.alloc(32) });
    const received = (await send(await workbook(24013, 10), machine, '?confirm=auto').expect(201)).body as IntakeView;
    expect(received).toMatchObject({ state: 'needs_attention', confirmedAt: null });
  });

  it('open nothing else', async () => {
    const [{ id }] = (await app.http.get(`/api/lines/${plant.lines[0].id}/intakes`).set(machine).expect(200)).body
      .items;
    await app.http.get(`/api/intakes/${id}/workbook`).set(machine).expect(200);
    expectProblem(await app.http.post(`/api/intakes/${id}/confirm`).set(machine), 403, 'not-for-tokens');
    expectProblem(await app.http.get('/api/desk').set(machine), 403, 'not-for-tokens');
    expectProblem(await app.http.get('/api/me').set(machine), 403, 'not-for-tokens');
    expectProblem(await app.http.get(`/api/plants/${plant.id}/api-tokens`).set(machine), 403, 'not-for-tokens');
    const answer = await app.http.post('/api/auth/refresh').set(machine);
    expect([204, 401]).toContain(answer.status);
  });

  it('speak at their plant alone, though their person is somebody elsewhere', async () => {
    const both = await insertPerson(app.database, {
      email: 'both@marrowby.example',
      plantId: plant.id,
      roles: ['engineer'],
    });
    await app.database('memberships').insert({ plant_id: other.id, person_id: both.id, role: 'engineer' });
    const made = await app.http
      .post(`/api/plants/${plant.id}/api-tokens`)
      .set(await signIn(app, both.email))
      .send({ name: 'Script' })
      .expect(201);
    const headers = { authorization: `Bearer ${(made.body as NewApiToken).token}` };
    expect((await app.http.get(`/api/lines/${plant.lines[0].id}/intakes`).set(headers)).status).toBe(200);
    expectProblem(await app.http.get(`/api/lines/${other.lines[0].id}/intakes`).set(headers), 404, 'not-found');
  });

  it('end with the role, with the person and with their revocation', async () => {
    const manager = plant.people.manager;
    const made = await app.http
      .post(`/api/plants/${plant.id}/api-tokens`)
      .set(as.manager)
      .send({ name: 'Nightly' })
      .expect(201);
    const nightly = made.body as NewApiToken;
    const headers = { authorization: `Bearer ${nightly.token}` };
    const look = () => app.http.get(`/api/lines/${plant.lines[0].id}/intakes`).set(headers);
    expect((await look()).status).toBe(200);
    await app.database('memberships').where({ person_id: manager.id }).update({ role: 'line_lead' });
    expectProblem(await look(), 404, 'not-found');
    await app.database('memberships').where({ person_id: manager.id }).update({ role: 'quality_manager' });
    await app.database('people').where({ id: manager.id }).update({ disabled_at: app.clock.now() });
    expectProblem(await look(), 401, 'token-not-in-force');
    await app.database('people').where({ id: manager.id }).update({ disabled_at: null });
    expect((await look()).status).toBe(200);
    const revoke = `/api/plants/${plant.id}/api-tokens/${nightly.id}`;
    await app.http.delete(revoke).set(as.engineer).expect(204);
    expect((await look()).status).toBe(200);
    await app.http.delete(revoke).set(as.manager).expect(204);
    expectProblem(await look(), 401, 'token-not-in-force');
    await app.http.delete(revoke).set(as.manager).expect(204);
    expect(await entriesOf('revoke-api-token')).toHaveLength(1);
  });

  it('need a name, and are made by who may send workbooks', async () => {
    const make = (headers: Headers, body: object) =>
      app.http.post(`/api/plants/${plant.id}/api-tokens`).set(headers).send(body);
    expectProblem(await make(as.engineer, { name: ' ' }), 400, 'invalid-input');
    expectProblem(await make(as.lead, { name: 'Tablet' }), 403, 'forbidden');
    expectProblem(await make(as.admin, { name: 'Tablet' }), 403, 'forbidden');
    expectProblem(await make({ authorization: 'Bearer ebb_AAAA' }, { name: 'Tablet' }), 401, 'token-not-in-force');
  });
});
