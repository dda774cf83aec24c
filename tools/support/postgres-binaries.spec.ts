import { mkdirSync, mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';

const { listPostgres } = jest.requireActual<{
  listPostgres: (debianRoot: string, pathVariable: string) => { major: string | undefined; bin: string }[];
}>('./postgres-binaries.mjs');

describe('listPostgres', () => {
  let root: string;
  const install = (folder: string, programs: string[]) => {
    mkdirSync(join(root, folder), { recursive: true });
    for (const program of programs) writeFileSync(join(root, folder, program), '');
    return join(root, folder);
  };

  beforeEach(() => {
    root = mkdtempSync(join(tmpdir(), 'ebbline-postgres-'));
  });
  afterEach(() => rmSync(root, { recursive: true, force: true }));

  it('names the newest of Debian first, as a number and not as a word', () => {
    install('9/bin', ['postgres', 'initdb']);
    install('15/bin', ['postgres', 'initdb']);
    install('17/bin', ['postgres', 'initdb']);
    expect(listPostgres(root, '').map(({ major }) => major)).toEqual(['17', '15', '9']);
  });

  it('passes over a folder that has only the client', () => {
    install('17/bin', ['psql']);
    install('15/bin', ['postgres', 'initdb', 'psql']);
    expect(listPostgres(root, '').map(({ major }) => major)).toEqual(['15']);
  });

  it('takes the one on PATH when Debian has none', () => {
    const bin = install('opt/bin', ['postgres', 'initdb']);
    expect(listPostgres(join(root, 'nothing'), `/nowhere:${bin}`)).toEqual([{ major: undefined, bin }]);
  });

  it('is empty when there is none', () => {
    expect(listPostgres(join(root, 'nothing'), '/nowhere')).toEqual([]);
  });
});
