import { spawn } from 'node:child_process';
import { mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';

interface Taken {
  release?: () => void;
  holder?: { pid: number; port?: number };
}
const { takeLock } = jest.requireActual<{ takeLock: (folder: string, details?: object) => Taken }>('./lock.mjs');

describe('takeLock', () => {
  let folder: string;
  const file = () => join(folder, 'running.lock');
  const holdAs = (holder: object) => writeFileSync(file(), JSON.stringify(holder));

  beforeEach(() => {
    folder = mkdtempSync(join(tmpdir(), 'ebbline-lock-'));
  });
  afterEach(() => rmSync(folder, { recursive: true, force: true }));

  it('is given once, and names its holder to the second', () => {
    const first = takeLock(folder, { port: 3000 });
    expect(first.holder).toBeUndefined();
    expect(takeLock(folder).holder).toMatchObject({ pid: process.pid, port: 3000 });
  });

  it('is given again after its release', () => {
    takeLock(folder).release?.();
    expect(takeLock(folder).holder).toBeUndefined();
  });

  it('is taken over from a process that is gone', async () => {
    const child = spawn(process.execPath, ['-e', '']);
    await new Promise((resolve) => child.once('exit', resolve));
    holdAs({ pid: child.pid });
    expect(takeLock(folder).holder).toBeUndefined();
    expect(JSON.parse(readFileSync(file(), 'utf8'))).toMatchObject({ pid: process.pid });
  });

  it('is taken over when another process has the id of the holder now', () => {
    holdAs({ pid: process.pid, mark: 'another start' });
    expect(takeLock(folder).holder).toBeUndefined();
  });

  it('is taken over when its file was cut off', () => {
    writeFileSync(file(), '{"pid":');
    expect(takeLock(folder).holder).toBeUndefined();
  });
});
