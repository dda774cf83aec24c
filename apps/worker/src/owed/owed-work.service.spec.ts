import { Logger } from '@nestjs/common';
import { insertMails, leaseMail } from '@app/data';
import type { Config, Dispatcher } from '@app/platform';
import { WorkerBench } from '../testing/worker-bench';
import { OwedWorkService } from './owed-work.service';

describe('what stands as owed', () => {
  let bench: WorkerBench;
  let jobs: number[];
  let mails: number[];
  let fails: boolean;
  beforeAll(async () => {
    bench = await WorkerBench.open();
  });
  afterAll(() => bench.close());
  beforeEach(async () => {
    await bench.reset();
    [jobs, mails, fails] = [[], [], false];
  });
  afterEach(() => jest.restoreAllMocks());

  const dispatcher = {
    queueOwedJobs: (ids: number[]) =>
      fails ? Promise.reject(new Error('no queue')) : Promise.resolve(void jobs.push(...ids)),
    queueMails: (ids: number[]) => Promise.resolve(void mails.push(...ids)),
  } as unknown as Dispatcher;
  const service = (redisUrl: string | null) =>
    new OwedWorkService(bench.db, { redisUrl } as Config, bench.clock, dispatcher);
  const begin = async (redisUrl: string | null) => {
    const begun = service(redisUrl);
    await begun.onApplicationBootstrap();
    begun.onApplicationShutdown();
  };
  const waitingMail = async () => {
    const mail = { event: 'e', kind: 'held-lots', recipient: 'a@b.example', subject: 's', html: 'h', text: 't' };
    const [id] = await bench.db.transaction((tx) => insertMails(tx, bench.place.plant.id, [mail], bench.clock.now()));
    return id;
  };

  it('is queued at start', async () => {
    const owedJobId = await bench.owe('score-intake', { intakeId: 1 });
    const mailId = await waitingMail();
    await begin(null);
    expect([jobs, mails]).toEqual([[owedJobId], [mailId]]);
  });

  it('has at once, when this is the only program, the mails that a killed one had taken', async () => {
    const mailId = await waitingMail();
    await leaseMail(bench.db, mailId, bench.clock.now(), 20);
    await begin(null);
    expect(mails).toEqual([mailId]);
  });

  it('leaves a mail with the worker beside that sends it', async () => {
    await leaseMail(bench.db, await waitingMail(), bench.clock.now(), 20);
    await begin('redis://127.0.0.1:1');
    expect(mails).toEqual([]);
  });

  it('is looked for again after a failure, which is only said', async () => {
    jest.spyOn(Logger.prototype, 'warn').mockImplementation(() => undefined);
    const owedJobId = await bench.owe('score-intake', { intakeId: 1 });
    const sweeper = service(null);
    fails = true;
    await sweeper.sweep();
    fails = false;
    await sweeper.sweep();
    expect(jobs).toEqual([owedJobId]);
  });
});
