import { isInstallationAdministrator } from '@app/data';
import { firstLinkLines } from '../../tools/first-link/print-first-link';
import { startTestApp, type TestApp } from '../support/app';
import { expectProblem } from '../support/expect-problem';
import { signIn } from '../support/factories/people';
import { insertPlant } from '../support/factories/plant';

const NEXT = 'herring gulls over the weir';

describe('an empty installation', () => {
  let app: TestApp;
  beforeAll(async () => {
    app = await startTestApp();
  });
  afterAll(() => app.close());

  const print = (isOnlyWhenUnused = true) =>
    firstLinkLines(app.database, {
      email: 'administrator@localhost',
      publicUrl: 'http://127.0.0.1:3000',
      at: app.clock.now(),
      isOnlyWhenUnused,
    });
  const tokenIn = (lines: string[]) => /\/invitation\/([\w-]{43})$/m.exec(lines.join('\n'))?.[1] as string;

  it('prints a link, another at the next start, and one person begins with the last of them', async () => {
    const [first, second] = [tokenIn(await print()), tokenIn(await print())];
    expectProblem(await app.http.get(`/api/auth/links/${first}`), 410, 'link-replaced');
    const { body } = await app.http.get(`/api/auth/links/${second}`).expect(200);
    expect(body).toMatchObject({ purpose: 'first_administrator', email: 'administrator@localhost' });
    const wrong = await app.http.post(`/api/auth/links/${second}`).send({ password: NEXT, email: 'no address' });
    expectProblem(wrong, 400, 'invalid-input');
    const name = 'Tamsin Okafor';
    const chosen = await app.http
      .post(`/api/auth/links/${second}`)
      .send({ password: NEXT, name, email: 'Tamsin@Overdale.example' })
      .expect(200);
    expect(chosen.body).toEqual({ email: 'tamsin@overdale.example' });
    const me = await app.http.get('/api/me').set(await signIn(app, 'tamsin@overdale.example', NEXT));
    expect(me.body).toMatchObject({ name, memberships: [], isInstallationAdministrator: true });
    expect(await isInstallationAdministrator(app.database, (me.body as { id: number }).id)).toBe(true);
    const told = await app.database('audit_entries').where({ action: 'accept-invitation' });
    expect(told).toMatchObject([{ plant_id: null, actor_name: name }]);
  });

  it('prints none at a start once it was used, but one when asked; it is still that person’s', async () => {
    expect(await print()).toEqual([]);
    const { body } = await app.http.get(`/api/auth/links/${tokenIn(await print(false))}`).expect(200);
    expect(body).toMatchObject({ email: 'tamsin@overdale.example', name: 'Tamsin Okafor' });
    expect(await app.database('people')).toHaveLength(1);
  });

  it('prints none any more once there is a plant', async () => {
    const plant = await insertPlant(app.database);
    expect(await print(false)).toEqual([]);
    expect(await isInstallationAdministrator(app.database, plant.people.admin.id)).toBe(false);
  });
});
