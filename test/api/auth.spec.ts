import { expectProblem } from '../support/expect-problem';
import { startTestApp, type TestApp } from '../support/app';
import { PASSWORD, signIn } from '../support/factories/people';
import { insertPlant, type TestPlant } from '../support/factories/plant';

const ENGINEER = 'engineer@marrowby.example';
const cookieOf = (response: { headers: Record<string, unknown> }) => (response.headers['set-cookie'] as string[])[0];
const tokenOf = (response: { headers: Record<string, unknown> }) => cookieOf(response).split(';')[0];

describe('signing in', () => {
  let app: TestApp;
  let plant: TestPlant;
  beforeAll(async () => {
    app = await startTestApp();
    plant = await insertPlant(app.database);
  });
  afterAll(() => app.close());
  afterEach(() => app.database('sign_in_failures').delete());

  const tryPassword = (email: string, password: string, address = '10.0.0.1') =>
    app.http.post('/api/auth/sign-in').set('x-forwarded-for', address).send({ email, password });
  const refresh = (token: string) => app.http.post('/api/auth/refresh').set('cookie', token);
  const me = (accessToken: string) => app.http.get('/api/me').set('authorization', `Bearer ${accessToken}`);

  it('answers an access token, and a refresh cookie that no script can read', async () => {
    const response = await tryPassword(ENGINEER.toUpperCase(), PASSWORD).expect(200);
    expect(Object.keys(response.body)).toEqual(['accessToken']);
    expect(cookieOf(response)).toMatch(
      /^ebbline_refresh=[\w-]{43}; Max-Age=604800; Path=\/api\/auth; Expires=[^;]+; HttpOnly; SameSite=Strict$/,
    );
  });

  it('tells who the person is', async () => {
    const { body } = await app.http
      .get('/api/me')
      .set(await signIn(app, 'lead@marrowby.example'))
      .expect(200);
    expect(body).toEqual({
      id: plant.people.lead.id,
      name: 'lead',
      email: 'lead@marrowby.example',
      theme: 'system',
      memberships: [
        {
          plant: { id: plant.id, name: 'Marrowby Works', timeZone: 'Europe/London' },
          roles: ['line_lead'],
          permissions: ['read', 'set_aside'],
          lineIds: [plant.lines[0].id],
        },
      ],
      isInstallationAdministrator: false,
      mailCatcherUrl: null,
    });
  });

  it('gives the same answer for an unknown person, a wrong password and a disabled person', async () => {
    await app.database('people').where({ id: plant.people.technician.id }).update({ disabled_at: new Date() });
    const answers = [
      await tryPassword('stranger@marrowby.example', PASSWORD),
      await tryPassword(ENGINEER, 'wrong'),
      await tryPassword('technician@marrowby.example', PASSWORD),
    ];
    for (const answer of answers) expectProblem(answer, 401, 'sign-in-failed');
    const told = answers.map(({ body }) => ({ ...body, correlationId: '' }));
    expect(told[1]).toEqual(told[0]);
    expect(told[2]).toEqual(told[0]);
  });

  it('points at the fields that are missing or unknown', async () => {
    const response = await app.http.post('/api/auth/sign-in').send({ email: ENGINEER, remember: true });
    expectProblem(response, 400, 'invalid-input');
    const pointers = (response.body.errors as { pointer: string }[]).map((error) => error.pointer);
    expect([...new Set(pointers)].sort()).toEqual(['/password', '/remember']);
  });

  it('ends with the access token after 15 minutes', async () => {
    const { body } = await tryPassword(ENGINEER, PASSWORD).expect(200);
    await me(body.accessToken).expect(200);
    app.clock.advance(15 * 60_000 - 1_000);
    await me(body.accessToken).expect(200);
    app.clock.advance(1_000);
    expectProblem(await me(body.accessToken), 401, 'not-signed-in');
  });

  it('takes no token that is forged, unsigned or missing', async () => {
    const part = (value: object) => Buffer.from(JSON.stringify(value)).toString('base64url');
    const claims = part({ sub: String(plant.people.engineer.id), exp: 9_999_999_999 });
    for (const token of [`${part({ alg: 'none' })}.${claims}.`, `${part({ alg: 'HS256' })}.${claims}.AAAA`, 'nonsense'])
      expectProblem(await me(token), 401, 'not-signed-in');
    expectProblem(await app.http.get('/api/me'), 401, 'not-signed-in');
  });

  it('puts a person who is disabled out at once', async () => {
    const response = await tryPassword('engineer2@marrowby.example', PASSWORD).expect(200);
    await app.database('people').where({ id: plant.people.engineer2.id }).update({ disabled_at: new Date() });
    expectProblem(await me(response.body.accessToken), 401, 'not-signed-in');
    expectProblem(await refresh(tokenOf(response)), 401, 'session-ended');
  });

  it('ends the access token with the session that it came of', async () => {
    const [here, there] = [await tryPassword(ENGINEER, PASSWORD), await tryPassword(ENGINEER, PASSWORD)];
    await app.http.post('/api/auth/sign-out').set('cookie', tokenOf(here)).expect(204);
    expectProblem(await me(here.body.accessToken), 401, 'not-signed-in');
    await me(there.body.accessToken).expect(200);
  });

  it('leaves a trail: who came, who left, which password was wrong, which session was taken twice', async () => {
    const before = Number((await app.database('audit_entries').max('id as id'))[0].id ?? 0);
    const first = await tryPassword(ENGINEER, PASSWORD, '10.0.0.7');
    await tryPassword(ENGINEER, 'wrong', '10.0.0.8');
    await tryPassword('stranger@marrowby.example', 'wrong', '10.0.0.8');
    await app.http.post('/api/auth/sign-out').set('cookie', tokenOf(first)).expect(204);
    await app.http.post('/api/auth/sign-out').set('cookie', tokenOf(first)).expect(204);
    const second = await tryPassword(ENGINEER, PASSWORD, '10.0.0.7');
    await refresh(tokenOf(second)).expect(200);
    app.clock.advance(11_000);
    await refresh(tokenOf(second)).set('x-forwarded-for', '10.0.0.66').expect(401);
    const told = await app.database('audit_entries').where('id', '>', before).orderBy('id');
    expect(told.map(({ action, actor_name, address }) => [action, actor_name, address])).toEqual([
      ['sign-in', 'engineer', '10.0.0.7'],
      ['sign-in-failed', 'Ebbline', '10.0.0.8'],
      ['sign-out', 'engineer', expect.any(String)],
      ['sign-in', 'engineer', '10.0.0.7'],
      ['end-reused-session', 'Ebbline', '10.0.0.66'],
    ]);
    for (const entry of told)
      expect(entry).toMatchObject({
        plant_id: plant.id,
        thing_kind: 'person',
        thing_id: plant.people.engineer.id,
        sentence: expect.stringContaining('engineer'),
      });
  });

  describe('refreshing', () => {
    it('brings a new access token and a new cookie each time', async () => {
      const first = await tryPassword(ENGINEER, PASSWORD);
      const second = await refresh(tokenOf(first)).expect(200);
      expect(tokenOf(second)).not.toBe(tokenOf(first));
      await me(second.body.accessToken).expect(200);
      await refresh(tokenOf(second)).expect(200);
    });

    it('with a token used before ends the whole family', async () => {
      const first = await tryPassword(ENGINEER, PASSWORD);
      const second = await refresh(tokenOf(first)).expect(200);
      app.clock.advance(11_000);
      expectProblem(await refresh(tokenOf(first)), 401, 'session-ended');
      expectProblem(await refresh(tokenOf(second)), 401, 'session-ended');
    });

    it('leaves the other sign-ins of the person alone when one family ends', async () => {
      const [here, there] = [await tryPassword(ENGINEER, PASSWORD), await tryPassword(ENGINEER, PASSWORD)];
      await refresh(tokenOf(here)).expect(200);
      app.clock.advance(11_000);
      await refresh(tokenOf(here)).expect(401);
      await refresh(tokenOf(there)).expect(200);
    });

    it('from two tabs in the same second keeps both signed in', async () => {
      const token = tokenOf(await tryPassword(ENGINEER, PASSWORD));
      const [one, other] = await Promise.all([refresh(token), refresh(token)]);
      expect([one.status, other.status]).toEqual([200, 200]);
      app.clock.advance(60_000);
      await refresh(tokenOf(one)).expect(200);
      await refresh(tokenOf(other)).expect(200);
    });

    it('is over after seven days without use', async () => {
      const response = await tryPassword(ENGINEER, PASSWORD);
      app.clock.advance(7 * 86_400_000);
      expectProblem(await refresh(tokenOf(response)), 401, 'session-ended');
    });

    it('needs a cookie that was given; none is no failure, and brings nothing', async () => {
      const none = await app.http.post('/api/auth/refresh').expect(204).expect('');
      expect(none.headers['set-cookie']).toBeUndefined();
      expectProblem(await refresh('ebbline_refresh=made-up'), 401, 'session-ended');
    });

    it('is over after signing out, in every tab', async () => {
      const first = await tryPassword(ENGINEER, PASSWORD);
      const second = await refresh(tokenOf(first));
      const out = await app.http.post('/api/auth/sign-out').set('cookie', tokenOf(first)).expect(204);
      expect(cookieOf(out)).toMatch(/^ebbline_refresh=; Path=\/api\/auth; Expires=Thu, 01 Jan 1970/);
      expectProblem(await refresh(tokenOf(second)), 401, 'session-ended');
      await app.http.post('/api/auth/sign-out').expect(204);
    });
  });

  describe('guessing', () => {
    const guess = async (email: string, times: number, address?: string) => {
      for (let count = 0; count < times; count++) await tryPassword(email, `guess ${count}`, address);
    };

    it('makes the account wait after five wrong passwords, longer each time, wherever from', async () => {
      await guess(ENGINEER, 5);
      const waiting = await tryPassword(ENGINEER, PASSWORD, '10.0.0.2');
      expectProblem(waiting, 429, 'too-many-wrong-passwords');
      expect(waiting.headers['retry-after']).toBe('5');
      app.clock.advance(5_000);
      await guess(ENGINEER, 1, '10.0.0.3');
      expect((await tryPassword(ENGINEER, PASSWORD, '10.0.0.4')).headers['retry-after']).toBe('10');
      app.clock.advance(10_000);
      await tryPassword(ENGINEER, PASSWORD, '10.0.0.4').expect(200);
      await tryPassword(ENGINEER, 'wrong', '10.0.0.4').expect(401);
    });

    it('makes the address wait too, whomever it tries', async () => {
      for (const name of ['a', 'b', 'c', 'd', 'e']) await guess(`${name}@marrowby.example`, 1, '10.0.0.9');
      expectProblem(await tryPassword(ENGINEER, PASSWORD, '10.0.0.9'), 429, 'too-many-wrong-passwords');
      await tryPassword(ENGINEER, PASSWORD, '10.0.0.10').expect(200);
    });

    it('waits the same for a person who does not exist', async () => {
      await guess('stranger@marrowby.example', 5);
      const answer = await tryPassword('stranger@marrowby.example', PASSWORD, '10.0.0.2');
      expectProblem(answer, 429, 'too-many-wrong-passwords');
    });

    it('gains nothing by guessing all at once', async () => {
      const answers = await Promise.all(
        Array.from({ length: 12 }, (_, count) => tryPassword(ENGINEER, `guess ${count}`, `10.0.1.${count}`)),
      );
      const statuses = answers.map((answer) => answer.status).sort();
      expect(statuses).toEqual([...Array<number>(5).fill(401), ...Array<number>(7).fill(429)]);
    });

    it('forgets wrong passwords after the right one, and after an hour', async () => {
      await guess(ENGINEER, 4);
      await tryPassword(ENGINEER, PASSWORD, '10.0.0.2').expect(200);
      await guess(ENGINEER, 4, '10.0.0.2');
      await tryPassword(ENGINEER, PASSWORD, '10.0.0.3').expect(200);
      await guess(ENGINEER, 4, '10.0.0.3');
      app.clock.advance(3_600_001);
      await guess(ENGINEER, 1, '10.0.0.4');
      await tryPassword(ENGINEER, PASSWORD, '10.0.0.4').expect(200);
    });
  });
});

describe('behind https', () => {
  it('the refresh cookie is sent over https only', async () => {
    const app = await startTestApp({ config: { publicUrl: 'https://ebbline.marrowby.example' } });
    try {
      await insertPlant(app.database);
      const response = await app.http.post('/api/auth/sign-in').send({ email: ENGINEER, password: PASSWORD });
      expect(cookieOf(response)).toContain('; Secure');
      expect(response.headers['strict-transport-security']).toBeDefined();
    } finally {
      await app.close();
    }
  });
});
