import { mkdirSync, mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { dirname, join } from 'node:path';

const { sourcesHash, stampBuild, isBuiltFrom } = jest.requireActual<{
  sourcesHash: (root: string) => string;
  stampBuild: (dist: string, hash: string) => void;
  isBuiltFrom: (dist: string, hash: string) => boolean;
}>('./build-stamp.mjs');

describe('the stamp of a build', () => {
  let root: string;
  const write = (file: string, text: string) => {
    mkdirSync(dirname(join(root, file)), { recursive: true });
    writeFileSync(join(root, file), text);
  };

  beforeEach(() => {
    root = mkdtempSync(join(tmpdir(), 'ebbline-stamp-'));
    write('apps/api/src/main.ts', 'one');
    write('package.json', '{}');
  });
  afterEach(() => rmSync(root, { recursive: true, force: true }));

  it('stays while the sources stay, also when a spec changes', () => {
    const before = sourcesHash(root);
    write('apps/api/src/main.spec.ts', 'a spec');
    write('dist/apps/api/main.js', 'built');
    expect(sourcesHash(root)).toBe(before);
  });

  it('changes with the bytes, the name and the number of the sources', () => {
    const hashes = [sourcesHash(root)];
    write('apps/api/src/main.ts', 'two');
    hashes.push(sourcesHash(root));
    write('libs/mail/src/index.ts', 'two');
    hashes.push(sourcesHash(root));
    rmSync(join(root, 'libs/mail/src/index.ts'));
    write('libs/mail/src/other.ts', 'two');
    hashes.push(sourcesHash(root));
    expect(new Set(hashes).size).toBe(4);
  });

  it('tells whether dist was built from a state of the sources', () => {
    const dist = join(root, 'dist');
    expect(isBuiltFrom(dist, sourcesHash(root))).toBe(false);
    stampBuild(dist, sourcesHash(root));
    expect(isBuiltFrom(dist, sourcesHash(root))).toBe(true);
    write('apps/api/src/main.ts', 'three');
    expect(isBuiltFrom(dist, sourcesHash(root))).toBe(false);
  });
});
