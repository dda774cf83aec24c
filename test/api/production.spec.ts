import { systemClock } from '@app/platform';
import { createApp } from '../../apps/api/src/create-app';
import { insertPerson } from '../support/factories/people';
import { startTestApp, testConfig } from '../support/app';

describe('a start in production', () => {
  it('is refused on a database with demo sign-ins, and goes on without them', async () => {
    const app = await startTestApp();
    try {
      const config = { ...testConfig(app.url), isProduction: true };
      const clean = await createApp(config, systemClock);
      await clean.init();
      await clean.close();
      const { id } = await insertPerson(app.database, { email: 'engineer@marrowby.example' });
      await app.database('people').where({ id }).update({ is_demo: true });
      const refused = await createApp(config, systemClock);
      await expect(refused.init()).rejects.toThrow('demo sign-ins');
      await refused.close();
    } finally {
      await app.close();
    }
  });
});
