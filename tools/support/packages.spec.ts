interface Lock {
  packages: Record<string, { version?: string; optional?: boolean }>;
}
const { matchesLock } = jest.requireActual<{ matchesLock: (lock: Lock, installed: Lock) => boolean }>('./packages.mjs');

const lock: Lock = {
  packages: {
    '': { version: '0.1.0' },
    'node_modules/a': { version: '1.0.0' },
    'node_modules/a/node_modules/b': { version: '2.0.0' },
    'node_modules/for-another-system': { version: '3.0.0', optional: true },
  },
};
const installed = (extra: Lock['packages'] = {}): Lock => ({
  packages: { 'node_modules/a': { version: '1.0.0' }, 'node_modules/a/node_modules/b': { version: '2.0.0' }, ...extra },
});

describe('matchesLock', () => {
  it('is content with what is installed when only optional packages are missing', () => {
    expect(matchesLock(lock, installed())).toBe(true);
  });

  it('sees another version, at whatever depth', () => {
    expect(matchesLock(lock, installed({ 'node_modules/a/node_modules/b': { version: '2.0.1' } }))).toBe(false);
  });

  it('sees a package that is missing', () => {
    expect(matchesLock(lock, { packages: { 'node_modules/a': { version: '1.0.0' } } })).toBe(false);
  });

  it('sees a package that the lock file does not have', () => {
    expect(matchesLock(lock, installed({ 'node_modules/c': { version: '1.0.0' } }))).toBe(false);
  });
});
