import { startTestApp, type TestApp } from '../support/app';
import { expectProblem } from '../support/expect-problem';
import { PASSWORD, signIn } from '../support/factories/people';
import { insertPlant, type TestPlant } from '../support/factories/plant';

type Headers = { authorization: string };
const NEXT = 'herring gulls over the weir';

describe('one’s own profile', () => {
  let app: TestApp;
  let plant: TestPlant;
  let overdale: TestPlant;
  const as = {} as Record<'engineer' | 'director' | 'lead', Headers>;
  beforeAll(async () => {
    app = await startTestApp();
    plant = await insertPlant(app.database);
    overdale = await insertPlant(app.database, { name: 'Overdale', domain: 'overdale.example' });
    for (const name of ['engineer', 'director', 'lead'] as const)
      as[name] = await signIn(app, `${name}@marrowby.example`);
  });
  afterAll(() => app.close());
  afterEach(() => app.database('sign_in_failures').delete());

  const me = (by: Headers) => app.http.get('/api/me').set(by);
  const change = (by: Headers, body: object) => app.http.patch('/api/me').set(by).send(body);
  const setPassword = (by: Headers, body: object) => app.http.post('/api/me/password').set(by).send(body);
  const mail = (by: Headers, plantId = plant.id) => app.http.get(`/api/me/subscriptions/${plantId}`).set(by);
  const chooseMail = (by: Headers, subscriptions: object[], plantId = plant.id) =>
    app.http.put(`/api/me/subscriptions/${plantId}`).set(by).send({ subscriptions });
  const trail = async (action: string) =>
    (await app.database('audit_entries').where({ action }).orderBy('id').pluck('sentence')) as string[];

  it('has the name and the theme that one chose', async () => {
    await change(as.engineer, { theme: 'dark' }).expect(204);
    await change(as.engineer, { name: '  Wenna Pascoe ' }).expect(204);
    await change(as.engineer, { name: 'Wenna Pascoe' }).expect(204);
    expect((await me(as.engineer)).body).toMatchObject({ name: 'Wenna Pascoe', theme: 'dark' });
    expect(await trail('change-profile')).toEqual([
      'engineer chose the theme "dark".',
      'engineer is called Wenna Pascoe now.',
    ]);
    expectProblem(await change(as.engineer, { theme: 'sepia' }), 400, 'invalid-input');
    expectProblem(await change(as.engineer, { name: ' ' }), 400, 'invalid-input');
    expectProblem(await change(as.engineer, { email: 'other@marrowby.example' }), 400, 'invalid-input');
    expectProblem(await app.http.patch('/api/me').send({ theme: 'dark' }), 401, 'not-signed-in');
  });

  it('takes a new password with the old one, and ends the other sessions', async () => {
    const elsewhere = await signIn(app, 'lead@marrowby.example');
    const wrong = await setPassword(as.lead, { current: 'not mine', next: NEXT });
    expectProblem(wrong, 400, 'wrong-password');
    expect(wrong.body.errors).toMatchObject([{ pointer: '/current' }]);
    const short = await setPassword(as.lead, { current: PASSWORD, next: 'short' });
    expectProblem(short, 400, 'password-too-short');
    expect(short.body.errors).toMatchObject([{ pointer: '/next' }]);
    expectProblem(await setPassword(as.lead, { current: PASSWORD, next: PASSWORD }), 400, 'same-password');
    await setPassword(as.lead, { current: PASSWORD, next: NEXT }).expect(204);
    await me(as.lead).expect(200);
    expectProblem(await me(elsewhere), 401, 'not-signed-in');
    await signIn(app, 'lead@marrowby.example', NEXT);
    expect(await trail('change-password')).toHaveLength(1);
    expect(await trail('password-refused')).toEqual(['A password given again as lead failed: the password was wrong.']);
  });

  it('can be signed out everywhere at once', async () => {
    const [here, there] = [
      await signIn(app, 'manager@marrowby.example'),
      await signIn(app, 'manager@marrowby.example'),
    ];
    await app.http.post('/api/me/sign-out-everywhere').set(here).expect(204);
    for (const session of [here, there]) expectProblem(await me(session), 401, 'not-signed-in');
    await me(as.director).expect(200);
    expect(await trail('sign-out-everywhere')).toEqual(['manager signed out everywhere.']);
  });

  it('says which mails one wants, of those that one’s roles may have', async () => {
    expect((await mail(as.director)).body.subscriptions).toContainEqual({
      kind: 'weekly_summary',
      isWanted: true,
      isChosen: false,
    });
    const { body } = await chooseMail(as.director, [{ kind: 'weekly_summary', isWanted: false }]).expect(200);
    expect(body.subscriptions).toContainEqual({ kind: 'weekly_summary', isWanted: false, isChosen: true });
    await chooseMail(as.director, [{ kind: 'weekly_summary', isWanted: false }]).expect(200);
    expect(await trail('change-subscriptions')).toEqual(['director does not want the weekly summary by mail.']);
    const lead = { authorization: (await signIn(app, 'lead@marrowby.example', NEXT)).authorization };
    const strange = await chooseMail(lead, [{ kind: 'weekly_summary', isWanted: true }]);
    expectProblem(strange, 400, 'mail-not-for-role');
    expect(strange.body.errors).toMatchObject([{ pointer: '/subscriptions/0/kind' }]);
    expectProblem(await chooseMail(as.director, [{ kind: 'gossip', isWanted: true }]), 400, 'invalid-input');
    expectProblem(await mail(as.director, overdale.id), 404, 'not-found');
    expectProblem(await chooseMail(as.director, [], overdale.id), 404, 'not-found');
  });
});
