import Bull, { type JobOptions, type Queue } from 'bull';
import type { Config } from '../config';
import { RedisServer } from '../testing/redis-server';
import { QUEUE_SETTINGS, QueueClients } from './queue.module';

const PATIENCE_MS = 15_000;

interface Work {
  name: string;
}

async function until(isSo: () => boolean | Promise<boolean>): Promise<void> {
  const end = performance.now() + PATIENCE_MS;
  while (!(await isSo())) {
    if (performance.now() > end) throw new Error('waited too long');
    await new Promise((resolve) => setTimeout(resolve, 10));
  }
}
const pause = (milliseconds: number) => new Promise((resolve) => setTimeout(resolve, milliseconds));

describe.each(['in the process', 'on Redis'])('a queue %s', (where) => {
  let redis: RedisServer | undefined;
  let clients: QueueClients;
  let queue: Queue<Work>;
  let queues: Queue<Work>[];
  let number = 0;

  beforeAll(async () => {
    if (where === 'on Redis') redis = await RedisServer.start();
  });
  afterAll(() => redis?.stop());

  const open = (name: string, settings: object = {}): Queue<Work> => {
    const opened = new Bull<Work>(name, {
      createClient: () => clients.create(),
      settings: { ...QUEUE_SETTINGS, ...settings },
    });
    queues.push(opened);
    return opened;
  };
  beforeEach(() => {
    clients = new QueueClients({ redisUrl: redis?.url ?? null } as Config);
    queues = [];
    queue = open(`queue-${(number += 1)}`);
  });
  afterEach(async () => {
    await Promise.all(queues.map((one) => one.close(true)));
    clients.end();
  });

  const once = (id: string, more: JobOptions = {}): JobOptions => ({
    jobId: id,
    removeOnComplete: true,
    removeOnFail: true,
    ...more,
  });
  const counts = async () => {
    const { waiting, active, completed, failed, delayed } = await queue.getJobCounts();
    return waiting + active + completed + failed + delayed;
  };

  it('hands each job to a processor with its data, in order, and gives the answer back', async () => {
    const seen: string[] = [];
    const answered: unknown[] = [];
    queue.on('completed', (_job, answer) => answered.push(answer));
    void queue.process(({ data }) => {
      seen.push(data.name);
      return Promise.resolve({ done: data.name });
    });
    for (const name of ['a', 'b', 'ü "quoted"']) await queue.add({ name });
    await until(() => answered.length === 3);
    expect(seen).toEqual(['a', 'b', 'ü "quoted"']);
    expect(answered).toEqual([{ done: 'a' }, { done: 'b' }, { done: 'ü "quoted"' }]);
  });

  it('hands out what was added before anybody processed', async () => {
    await queue.add('by-name', { name: 'early' });
    const seen: string[] = [];
    void queue.process('by-name', 2, ({ data }) => Promise.resolve(void seen.push(data.name)));
    await until(() => seen.length === 1);
  });

  it('runs as many at once as told, not more', async () => {
    let running = 0;
    let most = 0;
    let done = 0;
    void queue.process(2, async () => {
      most = Math.max(most, (running += 1));
      await pause(30);
      running -= 1;
      done += 1;
    });
    for (let index = 0; index < 6; index++) await queue.add({ name: String(index) });
    await until(() => done === 6);
    expect(most).toBe(2);
  });

  it('tries again after its backoff, then leaves nothing behind', async () => {
    const tries: number[] = [];
    void queue.process(() => {
      tries.push(performance.now());
      return tries.length < 3 ? Promise.reject(new Error('not yet')) : Promise.resolve();
    });
    await queue.add({ name: 'a' }, once('job-1', { attempts: 5, backoff: { type: 'exponential', delay: 100 } }));
    await until(() => tries.length === 3);
    // Bull's exponential backoff: (2^n − 1) times the delay after the n-th try.
    expect(tries[1] - tries[0]).toBeGreaterThan(95);
    expect(tries[2] - tries[1]).toBeGreaterThan(290);
    await until(async () => (await counts()) === 0);
  });

  it('gives up after its attempts, forgets the job, and takes it anew', async () => {
    let tries = 0;
    void queue.process(() => Promise.reject(new Error(`no ${(tries += 1)}`)));
    const options = once('job-1', { attempts: 2, backoff: 20 });
    await queue.add({ name: 'a' }, options);
    await until(async () => tries === 2 && (await counts()) === 0);
    await queue.add({ name: 'a' }, options);
    await until(async () => tries === 4 && (await counts()) === 0);
  });

  it('holds a delayed job back', async () => {
    let at = 0;
    void queue.process(() => Promise.resolve(void (at = performance.now())));
    const added = performance.now();
    await queue.add({ name: 'a' }, { delay: 400 });
    await until(() => at > 0);
    expect(at - added).toBeGreaterThan(390);
  });

  it('repeats a job', async () => {
    let times = 0;
    void queue.process(() => Promise.resolve(void (times += 1)));
    await queue.add({ name: 'a' }, { repeat: { every: 300 }, removeOnComplete: true });
    await until(() => times >= 3);
  });

  it('keeps one job of an id while it waits, runs, or is put off, and takes the id again afterwards', async () => {
    const seen: string[] = [];
    let finish = () => {};
    let isFirst = true;
    await queue.add({ name: 'first' }, once('job-1', { attempts: 2, backoff: 300 }));
    await queue.add({ name: 'while waiting' }, once('job-1'));
    void queue.process(2, async ({ data }) => {
      seen.push(data.name);
      if (!isFirst) return;
      isFirst = false;
      await new Promise<void>((resolve) => {
        finish = resolve;
      });
      throw new Error('again');
    });
    await until(() => seen.length === 1);
    await queue.add({ name: 'while running' }, once('job-1'));
    await pause(100);
    finish();
    await until(async () => (await queue.getDelayedCount()) === 1);
    await queue.add({ name: 'while put off' }, once('job-1'));
    await until(async () => (await counts()) === 0);
    expect(seen).toEqual(['first', 'first']);
    await queue.add({ name: 'afterwards' }, once('job-1'));
    await until(() => seen.length === 3);
    expect(seen[2]).toBe('afterwards');
  });

  it('closes within a second while it idles, without waiting for what runs, and twice', async () => {
    const idle = open('idle');
    void idle.process(() => Promise.resolve());
    let isRunning = false;
    void queue.process(() => {
      isRunning = true;
      return new Promise(() => {});
    });
    await queue.add({ name: 'for ever' });
    await until(() => isRunning);
    const begun = performance.now();
    await Promise.all([idle.close(), queue.close(true), queue.close()]);
    expect(performance.now() - begun).toBeLessThan(2_000);
  });

  it('gives a job of a worker that is gone to another one', async () => {
    const settings = { lockDuration: 600, lockRenewTime: 300, stalledInterval: 300 };
    const gone = open('stalling', settings);
    let isTaken = false;
    void gone.process(() => {
      isTaken = true;
      return new Promise(() => {});
    });
    await gone.add({ name: 'a' }, once('job-1'));
    await until(() => isTaken);
    await gone.close(true);
    const other = open('stalling', settings);
    const seen: string[] = [];
    void other.process(({ data }) => Promise.resolve(void seen.push(data.name)));
    await until(() => seen.length === 1);
  });
});

describe('stores in the process', () => {
  it('are one a program: another one’s jobs are not seen', async () => {
    const programs = [1, 2].map(() => new QueueClients({ redisUrl: null } as Config));
    const queues = programs.map((clients) => new Bull('same name', { createClient: () => clients.create() }));
    await queues[0].add({}, { jobId: 'job-1' });
    expect(await Promise.all(queues.map((queue) => queue.getWaitingCount()))).toEqual([1, 0]);
    await Promise.all(queues.map((queue) => queue.close(true)));
    for (const clients of programs) clients.end();
  });
});
