import type { ApiTokenView, NewApiToken, PersonView, Role } from '@app/contracts';
import { startTestApp, type TestApp } from '../support/app';
import { expectProblem } from '../support/expect-problem';
import { insertPerson, PASSWORD, signIn } from '../support/factories/people';
import { insertPlant, type TestPlant } from '../support/factories/plant';

type Headers = { authorization: string };
const NEXT = 'herring gulls over the weir';

describe('the people of a plant', () => {
  let app: TestApp;
  let plant: TestPlant;
  let overdale: TestPlant;
  let admin: Headers;
  let otherAdmin: Headers;

  beforeEach(async () => {
    app = await startTestApp();
    plant = await insertPlant(app.database);
    overdale = await insertPlant(app.database, { name: 'Overdale', domain: 'overdale.example' });
    admin = await signIn(app, 'admin@marrowby.example');
    otherAdmin = await signIn(app, 'admin@overdale.example');
  });
  afterEach(() => app.close());

  const path = (rest = '', plantId = plant.id) => `/api/plants/${plantId}/people${rest}`;
  const list = async (plantId = plant.id, by = admin) =>
    ((await app.http.get(path('', plantId)).set(by).expect(200)).body as { items: PersonView[] }).items;
  const invite = (body: object, by = admin, plantId = plant.id) => app.http.post(path('', plantId)).set(by).send(body);
  const change = (id: number, roles: Role[], lineIds: number[] = [], by = admin) =>
    app.http
      .patch(path(`/${id}`))
      .set(by)
      .send({ roles, lineIds });
  const act = (id: number, what: 'disable' | 'enable' | 'invitation', by = admin, plantId = plant.id) =>
    app.http.post(path(`/${id}/${what}`, plantId)).set(by);
  const wenna = { email: 'Wenna@Marrowby.example', name: 'Wenna Pascoe', roles: ['engineer'], lineIds: [] as number[] };
  const mails = () => app.database('outbox').orderBy('id') as unknown as Promise<Record<string, string>[]>;
  const tokenIn = (mail: Record<string, string>) => /\/invitation\/([\w-]{43})/.exec(mail.plain_text)?.[1] as string;
  const accept = (token: string) => app.http.post(`/api/auth/links/${token}`).send({ password: NEXT });
  const audit = async (action: string) => app.database('audit_entries').where({ action }).orderBy('id');

  it('are listed for its administrator, with roles, lines and whether they can sign in', async () => {
    const people = await list();
    expect(people.map(({ name }) => name)).toEqual([
      'admin',
      'director',
      'engineer',
      'engineer2',
      'lead',
      'manager',
      'technician',
    ]);
    expect(people[4]).toEqual({
      id: plant.people.lead.id,
      name: 'lead',
      email: 'lead@marrowby.example',
      roles: ['line_lead'],
      lineIds: [plant.lines[0].id],
      state: 'active',
      invitedUntil: null,
    });
  });

  it('are nobody else’s business', async () => {
    const manager = await signIn(app, 'manager@marrowby.example');
    expectProblem(await app.http.get(path()), 401, 'not-signed-in');
    expectProblem(await app.http.get(path()).set(manager), 403, 'forbidden');
    expectProblem(await invite(wenna, manager), 403, 'forbidden');
    expectProblem(await change(plant.people.lead.id, ['director'], [], manager), 403, 'forbidden');
    for (const what of ['disable', 'enable', 'invitation'] as const)
      expectProblem(await act(plant.people.lead.id, what, manager), 403, 'forbidden');
    expectProblem(await app.http.get(path()).set(otherAdmin), 404, 'not-found');
    expectProblem(await act(plant.people.lead.id, 'disable', otherAdmin), 404, 'not-found');
    expectProblem(await act(plant.people.lead.id, 'disable', otherAdmin, overdale.id), 404, 'not-found');
  });

  it('come by an invitation: mailed, accepted once, then signed in with the roles', async () => {
    const lineIds = [plant.lines[1].id];
    const { body } = await invite({ ...wenna, lineIds }).expect(201);
    expect(body).toMatchObject({
      email: 'wenna@marrowby.example',
      state: 'invited',
      roles: ['engineer'],
      lineIds,
      invitedUntil: '2026-03-18T12:00:00.000Z',
    });
    expectProblem(
      await app.http.post('/api/auth/sign-in').send({ email: wenna.email, password: 'nobody has this password' }),
      401,
      'sign-in-failed',
    );
    const [mail] = await mails();
    expect(mail).toMatchObject({ recipient: 'wenna@marrowby.example', kind: 'invitation' });
    for (const fact of [
      'admin invites you, Wenna Pascoe, to Marrowby Works',
      'quality engineer',
      'Calender 1',
      '18 Mar 2026, 12:00',
    ])
      expect(mail.plain_text).toContain(fact);
    const token = tokenIn(mail);
    await accept(token).expect(200);
    expectProblem(await accept(token), 410, 'link-used');
    const me = await app.http.get('/api/me').set(await signIn(app, 'wenna@marrowby.example', NEXT));
    expect(me.body.memberships).toMatchObject([{ plant: { id: plant.id }, roles: ['engineer'], lineIds }]);
    expect((await list()).find(({ name }) => name === 'Wenna Pascoe')).toMatchObject({
      state: 'active',
      invitedUntil: null,
    });
    expect((await audit('invite-person'))[0]).toMatchObject({
      plant_id: plant.id,
      actor_name: 'admin',
      sentence: 'admin invited Wenna Pascoe (wenna@marrowby.example) as quality engineer.',
    });
    expect((await audit('accept-invitation'))[0]).toMatchObject({ plant_id: plant.id, actor_name: 'Wenna Pascoe' });
    expectProblem(await act((body as PersonView).id, 'invitation'), 409, 'already-accepted');
  });

  it('are sent their invitation again; the earlier link ends', async () => {
    const { id } = (await invite(wenna).expect(201)).body as PersonView;
    app.clock.advance(8 * 86_400_000);
    admin = await signIn(app, 'admin@marrowby.example');
    const again = await act(id, 'invitation').expect(200);
    expect(again.body.invitedUntil).toBe('2026-03-26T12:00:00.000Z');
    const [first, second] = await mails();
    expectProblem(await accept(tokenIn(first)), 410, 'link-replaced');
    await accept(tokenIn(second)).expect(200);
  });

  it('keep their name and password when another plant invites them', async () => {
    const { body } = await invite({ ...wenna, email: 'engineer@overdale.example' }).expect(201);
    expect(body).toMatchObject({ id: overdale.people.engineer.id, name: 'engineer', state: 'active' });
    const [mail] = await mails();
    expect(mail.plain_text).toContain('the password that you have');
    expect(mail.plain_text).not.toContain('/invitation/');
    const { body: me } = await app.http.get('/api/me').set(await signIn(app, 'engineer@overdale.example'));
    expect(me.memberships).toHaveLength(2);
  });

  it('are not invited twice, without a role, to another plant’s line, or under what is no address', async () => {
    const twice = await invite({ ...wenna, email: 'lead@marrowby.example' });
    expectProblem(twice, 409, 'already-here');
    expect(twice.body.errors).toMatchObject([{ pointer: '/email' }]);
    const bad = await invite({ email: 'wenna', name: ' ', roles: [], lineIds: ['x'] });
    expectProblem(bad, 400, 'invalid-input');
    const pointers = (bad.body.errors as { pointer: string }[]).map(({ pointer }) => pointer);
    expect([...new Set(pointers)].sort()).toEqual(['/email', '/lineIds', '/name', '/roles']);
    expectProblem(await invite({ ...wenna, lineIds: [overdale.lines[0].id] }), 400, 'unknown-line');
    expectProblem(await invite({ ...wenna, roles: ['owner'] }), 400, 'invalid-input');
    expect(await mails()).toHaveLength(0);
    expect(await app.database('people').where({ email: 'wenna@marrowby.example' })).toEqual([]);
  });

  it('invited twice in the same moment are one', async () => {
    const answers = await Promise.all([invite(wenna), invite(wenna)]);
    expect(answers.map(({ status }) => status).sort()).toEqual([201, 409]);
    expect(await mails()).toHaveLength(1);
  });

  it('change what they may do with the next request', async () => {
    const lead = await signIn(app, 'lead@marrowby.example');
    expectProblem(await app.http.get(path()).set(lead), 403, 'forbidden');
    const { body } = await change(plant.people.lead.id, ['line_lead', 'administrator'], [plant.lines[1].id]).expect(
      200,
    );
    expect(body).toMatchObject({ roles: ['administrator', 'line_lead'], lineIds: [plant.lines[1].id] });
    await app.http.get(path()).set(lead).expect(200);
    expect((await audit('change-roles'))[0]).toMatchObject({
      sentence: 'admin made lead line lead and administrator on Calender 1.',
      before: { roles: ['line_lead'], lineIds: [plant.lines[0].id] },
      after: { roles: ['line_lead', 'administrator'], lineIds: [plant.lines[1].id] },
    });
    await change(plant.people.lead.id, []).expect(200);
    expectProblem(await app.http.get(path()).set(lead), 404, 'not-found');
    expect((await list()).map(({ name }) => name)).not.toContain('lead');
    expectProblem(await change(plant.people.lead.id, ['engineer']), 404, 'not-found');
  });

  it('always have an administrator who can sign in', async () => {
    const { admin: last, director } = plant.people;
    expectProblem(await change(last.id, ['director']), 409, 'last-administrator');
    expectProblem(await change(last.id, []), 409, 'last-administrator');
    await invite({ ...wenna, roles: ['administrator'] }).expect(201);
    expectProblem(await change(last.id, []), 409, 'last-administrator');
    await change(director.id, ['administrator']).expect(200);
    await change(last.id, ['director']).expect(200);
    expectProblem(await app.http.get(path()).set(admin), 403, 'forbidden');
  });

  it('keep one administrator when two take the role from each other at once', async () => {
    await change(plant.people.director.id, ['administrator']).expect(200);
    const director = await signIn(app, 'director@marrowby.example');
    const answers = await Promise.all([
      change(plant.people.director.id, ['director']),
      change(plant.people.admin.id, ['director'], [], director),
    ]);
    expect(answers.filter(({ status }) => status === 200)).toHaveLength(1);
    expect(await app.database('memberships').where({ plant_id: plant.id, role: 'administrator' })).toHaveLength(1);
  });

  it('who are disabled are out at once, with tokens and links, until they are enabled', async () => {
    const { lead } = plant.people;
    const here = await app.http.post('/api/auth/sign-in').send({ email: lead.email, password: PASSWORD }).expect(200);
    const cookie = (here.headers['set-cookie'] as unknown as string[])[0].split(';')[0];
    const token = { authorization: `Bearer ${(here.body as { accessToken: string }).accessToken}` };
    await app.http.post('/api/auth/password-reset').send({ email: lead.email }).expect(202);
    const link = /\/password\/([\w-]{43})/.exec((await mails())[0].plain_text)?.[1] as string;
    expect((await act(lead.id, 'disable').expect(200)).body).toMatchObject({ state: 'disabled' });
    expectProblem(await app.http.get('/api/me').set(token), 401, 'not-signed-in');
    expectProblem(await app.http.post('/api/auth/refresh').set('cookie', cookie), 401, 'session-ended');
    expectProblem(await accept(link), 404, 'link-unknown');
    expectProblem(
      await app.http.post('/api/auth/sign-in').send({ email: lead.email, password: PASSWORD }),
      401,
      'sign-in-failed',
    );
    expect((await act(lead.id, 'disable').expect(200)).body).toMatchObject({ state: 'disabled' });
    expect((await act(lead.id, 'enable').expect(200)).body).toMatchObject({ state: 'active' });
    expectProblem(await app.http.get('/api/me').set(token), 401, 'not-signed-in');
    expectProblem(await accept(link), 410, 'link-replaced');
    await signIn(app, lead.email);
    expect((await audit('disable-person')).map(({ sentence }) => sentence as string)).toEqual(['admin disabled lead.']);
    expect(await audit('enable-person')).toHaveLength(1);
  });

  it('lose their API tokens for good when they are disabled or taken out of the plant', async () => {
    const { manager, engineer } = plant.people;
    const look = (headers: Headers) => app.http.get(`/api/lines/${plant.lines[0].id}/intakes`).set(headers);
    const make = async (email: string): Promise<Headers> => {
      const made = await app.http
        .post(`/api/plants/${plant.id}/api-tokens`)
        .set(await signIn(app, email))
        .send({ name: 'Line computer' })
        .expect(201);
      return { authorization: `Bearer ${(made.body as NewApiToken).token}` };
    };
    const [theirs, other] = [await make(manager.email), await make(engineer.email)];
    await look(theirs).expect(200);
    await act(manager.id, 'disable').expect(200);
    expectProblem(await look(theirs), 401, 'token-not-in-force');
    await act(manager.id, 'enable').expect(200);
    expectProblem(await look(theirs), 401, 'token-not-in-force');
    const listed = await app.http.get(`/api/plants/${plant.id}/api-tokens`).set(await signIn(app, manager.email));
    expect((listed.body as ApiTokenView[]).map(({ revokedAt }) => revokedAt)).toEqual([app.clock.now().toISOString()]);
    await look(other).expect(200);
    await change(engineer.id, []).expect(200);
    await invite({ ...wenna, email: engineer.email }).expect(201);
    expectProblem(await look(other), 401, 'token-not-in-force');
  });

  it('are not disabled over the head of another plant’s administrator, nor by themselves', async () => {
    const { engineer } = overdale.people;
    await invite({ ...wenna, email: engineer.email }).expect(201);
    expectProblem(await act(engineer.id, 'disable'), 409, 'is-elsewhere');
    expectProblem(await act(engineer.id, 'disable', otherAdmin, overdale.id), 409, 'is-elsewhere');
    expectProblem(await act(plant.people.admin.id, 'disable'), 409, 'is-yourself');
    const both = await insertPerson(app.database, {
      email: 'both@marrowby.example',
      plantId: plant.id,
      roles: ['administrator'],
    });
    await app.database('memberships').insert({ plant_id: overdale.id, person_id: both.id, role: 'administrator' });
    await act(engineer.id, 'disable', await signIn(app, both.email)).expect(200);
    expect(await audit('disable-person')).toHaveLength(2);
  });
});
