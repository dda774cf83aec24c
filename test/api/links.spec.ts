import type { LinkPurpose } from '@app/contracts';
import { issueLink } from '../../apps/api/src/auth/issue-link';
import { startTestApp, type TestApp } from '../support/app';
import { expectProblem } from '../support/expect-problem';
import { PASSWORD, signIn } from '../support/factories/people';
import { insertPlant, type TestPlant } from '../support/factories/plant';

const NEXT = 'herring gulls over the weir';
const HOUR = 3_600_000;

describe('links that are mailed', () => {
  let app: TestApp;
  let plant: TestPlant;
  let visitor = 0;
  beforeAll(async () => {
    app = await startTestApp();
    plant = await insertPlant(app.database);
  });
  afterAll(() => app.close());
  afterEach(() => app.database('sign_in_failures').delete());

  const from = (address = `10.1.0.${++visitor}`) => ({ 'x-forwarded-for': address });
  const look = (token: string, address?: string) => app.http.get(`/api/auth/links/${token}`).set(from(address));
  const use = (token: string, body: object = { password: NEXT }) =>
    app.http.post(`/api/auth/links/${token}`).set(from()).send(body);
  const forget = (email: string, address?: string) =>
    app.http.post('/api/auth/password-reset').set(from(address)).send({ email });
  const tryPassword = (email: string, password: string) =>
    app.http.post('/api/auth/sign-in').set(from()).send({ email, password });

  async function issue(who: keyof TestPlant['people'], purpose: LinkPurpose): Promise<string> {
    const { url } = await app.database.transaction((tx) =>
      issueLink(tx, {
        personId: plant.people[who].id,
        purpose,
        at: app.clock.now(),
        publicUrl: 'http://127.0.0.1:3000',
      }),
    );
    return url.split('/').at(-1) as string;
  }
  const mails = () => app.database('outbox').orderBy('id') as unknown as Promise<Record<string, string>[]>;

  it('lead from a forgotten password to a new one: once, with every session ended', async () => {
    const session = await signIn(app, 'engineer@marrowby.example');
    await forget(' Engineer@Marrowby.example ').expect(202).expect('');
    const [mail] = await mails();
    expect(mail).toMatchObject({ recipient: 'engineer@marrowby.example', kind: 'password-reset', state: 'waiting' });
    const token = /http:\/\/127\.0\.0\.1:3000\/password\/([\w-]{43})/.exec(mail.plain_text)?.[1] as string;
    expect(await app.database('person_tokens').pluck('token_hash')).not.toContainEqual(Buffer.from(token));
    const { body } = await look(token).expect(200).expect('cache-control', 'no-store');
    expect(body).toEqual({
      purpose: 'password_reset',
      name: 'engineer',
      email: 'engineer@marrowby.example',
      expiresAt: new Date(app.clock.now().getTime() + HOUR).toISOString(),
    });
    await app.http.get('/api/me').set(session).expect(200);
    expect((await use(token).expect(200)).body).toEqual({ email: 'engineer@marrowby.example' });
    expectProblem(await app.http.get('/api/me').set(session), 401, 'not-signed-in');
    expectProblem(await tryPassword('engineer@marrowby.example', PASSWORD), 401, 'sign-in-failed');
    await tryPassword('engineer@marrowby.example', NEXT).expect(200);
    expectProblem(await use(token), 410, 'link-used');
    expectProblem(await look(token), 410, 'link-used');
    const told = await app.database('audit_entries').where({ thing_id: plant.people.engineer.id }).orderBy('id');
    expect(told.map(({ action }) => action as string)).toEqual(
      expect.arrayContaining(['request-password-reset', 'reset-password']),
    );
    expect(JSON.stringify(told)).not.toContain(token);
  });

  it('are not sent to nobody, to who is disabled or invited, and the answer does not tell', async () => {
    const before = (await mails()).length;
    await app.database('people').where({ id: plant.people.lead.id }).update({ disabled_at: new Date() });
    await app.database('people').where({ id: plant.people.technician.id }).update({ password_hash: null });
    for (const name of ['stranger', 'lead', 'technician'])
      await forget(`${name}@marrowby.example`).expect(202).expect('');
    expect(await mails()).toHaveLength(before);
    await app.database('people').where({ id: plant.people.lead.id }).update({ disabled_at: null });
  });

  it('reach who has no role at any plant, once and for an hour, and stand on no plant’s page of mails', async () => {
    const { lead } = plant.people;
    const roles = await app.database('memberships').where({ person_id: lead.id });
    await app.database('memberships').where({ person_id: lead.id }).delete();
    const fresh = async () => {
      await forget('lead@marrowby.example').expect(202).expect('');
      const mail = (await mails()).at(-1)!;
      return { mail, token: /\/password\/([\w-]{43})/.exec(mail.plain_text)?.[1] as string };
    };
    const { mail, token } = await fresh();
    expect(mail).toMatchObject({ recipient: 'lead@marrowby.example', plant_id: null });
    expect(mail.plain_text).toMatch(/until 11 Mar 2026, 13:00 \(UTC\)\./);
    const admin = await signIn(app, 'admin@marrowby.example');
    const listed = await app.http.get(`/api/plants/${plant.id}/mails?kind=password-reset`).set(admin).expect(200);
    expect(listed.body.items.map(({ id }: { id: number }) => id)).not.toContain(mail.id);
    expectProblem(await app.http.get(`/api/mails/${mail.id}`).set(admin), 404, 'not-found');
    expectProblem(await app.http.post(`/api/mails/${mail.id}/send-again`).set(admin), 404, 'not-found');
    await use(token).expect(200);
    expectProblem(await use(token), 410, 'link-used');
    const later = await fresh();
    app.clock.advance(HOUR);
    expectProblem(await look(later.token), 410, 'link-expired');
    await app.database('memberships').insert(roles);
  });

  it('are asked for three times, then only after a wait, by mailbox and whether or not it is anybody’s', async () => {
    for (const email of ['manager@marrowby.example', 'nobody@marrowby.example']) {
      for (let count = 0; count < 3; count++) await forget(email).expect(202);
      const answer = await forget(email);
      expectProblem(answer, 429, 'too-many-requests');
      expect(answer.headers['retry-after']).toBe('60');
    }
    app.clock.advance(60_000);
    await forget('manager@marrowby.example').expect(202);
  });

  it('end an hour after they were mailed; an invitation after seven days', async () => {
    const reset = await issue('manager', 'password_reset');
    const invitation = await issue('technician', 'invitation');
    app.clock.advance(HOUR - 1);
    await look(reset).expect(200);
    app.clock.advance(1);
    expectProblem(await look(reset), 410, 'link-expired');
    expectProblem(await use(reset), 410, 'link-expired');
    app.clock.advance(7 * 24 * HOUR - HOUR - 1);
    await look(invitation).expect(200);
    app.clock.advance(1);
    expectProblem(await use(invitation), 410, 'link-expired');
  });

  it('are refused when tampered with, cut or made up, and guessing them is slow', async () => {
    const token = await issue('manager', 'password_reset');
    const other = token[5] === 'A' ? 'B' : 'A';
    const wrong = [`${token.slice(0, 5)}${other}${token.slice(6)}`, token.slice(0, -1), `${token}A`, 'x', '%00'];
    for (const tampered of wrong) expectProblem(await look(tampered), 404, 'link-unknown');
    for (const tampered of wrong) expectProblem(await use(tampered), 404, 'link-unknown');
    for (let count = 0; count < 20; count++) await look('made-up', '10.9.9.9').expect(404);
    expectProblem(await look(token, '10.9.9.9'), 429, 'too-many-wrong-links');
    await look(token).expect(200);
  });

  it('end when a newer one is sent, and with the person', async () => {
    const first = await issue('manager', 'password_reset');
    const second = await issue('manager', 'password_reset');
    expectProblem(await use(first), 410, 'link-replaced');
    await app.database('people').where({ id: plant.people.manager.id }).update({ disabled_at: new Date() });
    expectProblem(await use(second), 404, 'link-unknown');
    await app.database('people').where({ id: plant.people.manager.id }).update({ disabled_at: null });
    await look(second).expect(200);
  });

  it('of two at once work for one', async () => {
    const token = await issue('director', 'password_reset');
    const answers = await Promise.all(
      ['the first of two tabs', 'the second of two tabs'].map((password) => use(token, { password })),
    );
    expect(answers.map(({ status }) => status).sort()).toEqual([200, 410]);
    const won = answers[0].status === 200 ? 'the first of two tabs' : 'the second of two tabs';
    await tryPassword('director@marrowby.example', won).expect(200);
  });

  it('take a good password only, and are not used up by a bad one', async () => {
    const token = await issue('engineer2', 'password_reset');
    const answer = await use(token, { password: 'too short' });
    expectProblem(answer, 400, 'password-too-short');
    expect(answer.body.errors).toMatchObject([{ pointer: '/password', code: 'password-too-short' }]);
    expectProblem(await use(token, { password: 'passwordpassword' }), 400, 'password-common');
    expectProblem(await use(token, {}), 400, 'invalid-input');
    await use(token, { password: NEXT, name: 'Somebody Else' }).expect(200);
    expect(await app.database('people').where({ id: plant.people.engineer2.id }).first()).toMatchObject({
      name: 'engineer2',
    });
  });

  it('let in who was locked out by too many wrong passwords', async () => {
    for (let count = 0; count < 5; count++) await tryPassword('admin@marrowby.example', 'guess');
    await tryPassword('admin@marrowby.example', PASSWORD).expect(429);
    await use(await issue('admin', 'password_reset')).expect(200);
    await tryPassword('admin@marrowby.example', NEXT).expect(200);
  });
});
