import { startTestApp, type TestApp } from '../support/app';
import { PASSWORD, signIn } from '../support/factories/people';
import { insertPlant } from '../support/factories/plant';

describe('signing in', () => {
  let app: TestApp;
  beforeAll(async () => {
    app = await startTestApp();
    await insertPlant(app.database);
  });
  afterAll(() => app.close());

  it('answers an access token, and who the person is', async () => {
    const headers = await signIn(app, 'engineer@marrowby.example');
    const { body } = await app.http.get('/api/me').set(headers).expect(200);
    expect(body).toMatchObject({ name: 'engineer', email: 'engineer@marrowby.example', mailCatcherUrl: null });
    expect(body.memberships).toEqual([
      expect.objectContaining({ roles: ['engineer'], permissions: expect.arrayContaining(['upload_intake']) }),
    ]);
    expect(PASSWORD).toBeDefined();
  });
});
