import { Logger } from '@nestjs/common';
import Bull, { type Queue } from 'bull';
import type { Config } from '../config';
import { RedisServer } from '../testing/redis-server';
import { Dispatcher } from './dispatcher';
import { QUEUE_SETTINGS, QueueClients } from './queue.module';

describe('the dispatcher', () => {
  let clients: QueueClients;
  let queues: Queue[];
  let dispatcher: Dispatcher;
  let warned: jest.SpyInstance;
  beforeEach(() => {
    warned = jest.spyOn(Logger.prototype, 'warn').mockImplementation(() => undefined);
  });
  afterEach(() => jest.restoreAllMocks());

  const open = (redisUrl: string | null) => {
    clients = new QueueClients({ redisUrl } as Config);
    queues = ['work', 'mail'].map(
      (name) => new Bull(name, { createClient: () => clients.create(), settings: QUEUE_SETTINGS }),
    );
    for (const queue of queues) queue.on('error', () => undefined);
    dispatcher = new Dispatcher(queues[0], queues[1]);
  };
  const close = async () => {
    clients.end();
    await Promise.all(queues.map((queue) => queue.close(true)));
  };

  it('queues each owed job and mail once, under an id of its own', async () => {
    open(null);
    await dispatcher.owedJobs([7, 8, 7]);
    await dispatcher.owedJobs([7]);
    await dispatcher.mails([7]);
    const [work, mail] = await Promise.all(queues.map((queue) => queue.getWaiting()));
    expect(work.map(({ id, data }) => [id, data]).sort()).toEqual([
      ['owed-7', { owedJobId: 7 }],
      ['owed-8', { owedJobId: 8 }],
    ]);
    expect(mail.map(({ id, name, data }) => [id, name, data])).toEqual([['mail-7', 'send-mail', { outboxId: 7 }]]);
    await close();
  });

  it('says what fails and throws nothing, except to the timer', async () => {
    open(null);
    jest.spyOn(queues[0], 'add').mockRejectedValue(new Error('no room'));
    await dispatcher.owedJobs([1]);
    expect(warned).toHaveBeenCalledWith(expect.stringContaining('no room'));
    await expect(dispatcher.queueOwedJobs([1])).rejects.toThrow('no room');
    await close();
  });

  it('keeps a request no longer than a few seconds when Redis is away, and queues it once Redis is back', async () => {
    const redis = await RedisServer.start();
    open(redis.url);
    await dispatcher.owedJobs([1]);
    await redis.kill();
    const begun = performance.now();
    await dispatcher.owedJobs([2]);
    expect(performance.now() - begun).toBeLessThan(6_000);
    expect(warned).toHaveBeenCalledWith(expect.stringContaining('does not answer'));
    const patient = dispatcher.queueOwedJobs([3]);
    await redis.again();
    await patient;
    expect((await queues[0].getWaiting()).map(({ id }) => id)).toEqual(expect.arrayContaining(['owed-3']));
    await close();
    await redis.stop();
  });
});
