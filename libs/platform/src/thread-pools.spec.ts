import { mkdirSync, mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { ThreadPools } from './thread-pools';

const THREADS = {
  'echo.thread': 'module.exports = (task) => ({ ...task, thread: require("node:worker_threads").threadId });',
  'throw.thread': 'module.exports = () => { const error = new RangeError("too far"); throw error; };',
  'end.thread': 'module.exports = ({ now }) => (now ? process.exit(3) : "alive");',
  'hang.thread': 'module.exports = () => new Promise(() => setInterval(() => {}, 1000));',
  'spin.thread': 'module.exports = () => { for (;;); };',
  'read-all.thread':
    'module.exports = ({ fill }) => { const all = []; while (fill) all.push(new Array(100000).fill(1.5)); return "small"; };',
};

describe('worker threads', () => {
  let dist: string;
  let pools: ThreadPools;
  const former = process.env.EBBLINE_DIST;
  beforeAll(() => {
    dist = mkdtempSync(join(tmpdir(), 'ebbline-threads-'));
    mkdirSync(join(dist, 'threads'));
    for (const [name, text] of Object.entries(THREADS)) writeFileSync(join(dist, 'threads', `${name}.js`), text);
    process.env.EBBLINE_DIST = dist;
  });
  afterAll(() => {
    if (former === undefined) delete process.env.EBBLINE_DIST;
    else process.env.EBBLINE_DIST = former;
    rmSync(dist, { recursive: true, force: true });
  });
  beforeEach(() => {
    pools = new ThreadPools();
  });
  afterEach(() => pools.close());

  it('run a task apart from the main thread and answer', async () => {
    const answer = await pools.run<{ a: number; thread: number }>('echo.thread', { a: 1 });
    expect(answer).toEqual({ a: 1, thread: expect.any(Number) });
    expect(answer.thread).toBeGreaterThan(0);
  });

  it('hand on what a task throws', async () => {
    await expect(pools.run('throw.thread', {})).rejects.toThrow('too far');
  });

  it('reject the task of a thread that ends, and go on with another thread', async () => {
    await expect(pools.run('end.thread', { now: true })).rejects.toThrow();
    expect(await pools.run('end.thread', { now: false })).toBe('alive');
  });

  it('reject a reader that takes more memory than it may, and go on', async () => {
    await expect(pools.run('read-all.thread', { fill: true })).rejects.toMatchObject({
      code: 'ERR_WORKER_OUT_OF_MEMORY',
    });
    expect(await pools.run('read-all.thread', { fill: false })).toBe('small');
  });

  it('end a task that takes too long, also one that never yields', async () => {
    for (const name of ['hang.thread', 'spin.thread'])
      await expect(pools.run(name, {}, AbortSignal.timeout(300))).rejects.toMatchObject({ name: 'AbortError' });
  });

  it('reject what runs when they are closed, soon, and run nothing any more', async () => {
    const running = [pools.run('hang.thread', {}), pools.run('spin.thread', {})].map((run) =>
      run.then(
        () => 'answered',
        () => 'rejected',
      ),
    );
    await pools.run('echo.thread', {});
    const begun = performance.now();
    await pools.close();
    expect(await Promise.all(running)).toEqual(['rejected', 'rejected']);
    expect(performance.now() - begun).toBeLessThan(3_000);
    await expect(pools.run('echo.thread', {})).rejects.toThrow('stopping');
  });
});
