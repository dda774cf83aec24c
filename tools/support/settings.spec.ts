interface Settings {
  port: number;
  dataDir: string;
  seed: string;
  demoPassword: string | undefined;
}
const { readSettings, refuseProduction } = jest.requireActual<{
  readSettings: (env: Record<string, string>, root: string) => Settings;
  refuseProduction: (env: Record<string, string>) => void;
}>('./settings.mjs');

describe('readSettings', () => {
  it('has an answer for everything that is not set', () => {
    expect(readSettings({}, '/srv/ebbline')).toEqual({
      port: 3000,
      dataDir: '/srv/ebbline/.data',
      seed: 'demo',
      demoPassword: undefined,
    });
  });

  it('takes what is set', () => {
    const env = {
      PORT: '3100',
      EBBLINE_DATA_DIR: '/data',
      EBBLINE_SEED: 'empty',
      EBBLINE_DEMO_PASSWORD: 'long enough',
    };
    expect(readSettings(env, '/srv/ebbline')).toEqual({
      port: 3100,
      dataDir: '/data',
      seed: 'empty',
      demoPassword: 'long enough',
    });
  });

  it.each([
    [{ PORT: '0' }, 'PORT'],
    [{ PORT: '65536' }, 'PORT'],
    [{ PORT: '80.5' }, 'PORT'],
    [{ PORT: 'NaN' }, 'PORT'],
    [{ EBBLINE_SEED: 'full' }, 'EBBLINE_SEED'],
    [{ EBBLINE_DEMO_PASSWORD: 'short' }, 'EBBLINE_DEMO_PASSWORD'],
  ])('names the setting that cannot be used in %j', (env, name) => {
    expect(() => readSettings(env as Record<string, string>, '/srv')).toThrow(name);
  });
});

describe('refuseProduction', () => {
  it('names the demo sign-ins, the generated secret and the mail catcher', () => {
    expect(() => refuseProduction({ NODE_ENV: 'production' })).toThrow(/demo sign-ins[^]*secret[^]*mail catcher/);
  });

  it('lets everything else pass', () => {
    expect(() => refuseProduction({ NODE_ENV: 'development' })).not.toThrow();
    expect(() => refuseProduction({})).not.toThrow();
  });
});
