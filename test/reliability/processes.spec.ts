import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { MailCatcher } from '@app/mail';
import { RedisServer } from '../../libs/platform/src/testing/redis-server';
import { RouteClient } from './support/client';
import { BAD_LOT } from './support/history';
import { outboxMessageIds, readOutcome } from './support/outcome';
import { freePort, Program, until } from './support/program';
import { makeScene, type Scene } from './support/scene';
import { StopPoint } from './support/stop-point';

jest.setTimeout(120_000);

/** No program takes longer to stop, whatever it does. */
const STOP_MS = 5_000;

describe('programs in processes of their own', () => {
  let scene: Scene;
  let redis: RedisServer;
  let database: { url: string; drop(): Promise<void> };
  let folder: string;
  let catcher: MailCatcher;
  let atMail: () => Promise<void>;
  let programs: Program[];
  let port: number;
  let client: RouteClient;

  beforeAll(async () => {
    [scene, redis] = await Promise.all([makeScene(), RedisServer.start()]);
  });
  afterAll(async () => {
    await scene.drop();
    await redis.stop();
  });
  beforeEach(async () => {
    programs = [];
    database = await scene.copy();
    folder = mkdtempSync(join(tmpdir(), 'ebbline-processes-'));
    atMail = () => Promise.resolve();
    catcher = await MailCatcher.start({ folder, onData: () => atMail() });
    port = await freePort();
    client = new RouteClient(port);
  });
  afterEach(async () => {
    await Promise.all(programs.map((program) => program.kill()));
    await catcher.close();
    await database.drop();
    rmSync(folder, { recursive: true, force: true });
  });

  const start = (app: 'api' | 'worker', redisUrl?: string): Program => {
    const program = Program.start({ app, databaseUrl: database.url, smtpUrl: catcher.smtpUrl, port, redisUrl });
    programs.push(program);
    return program;
  };
  const startApi = async (redisUrl?: string) => {
    const api = start('api', redisUrl);
    await client.ready(api);
    await client.signIn('engineer@marrowby.example');
    return api;
  };
  const upload = () => client.upload(scene.plant.lines[0].id, 'shift.xlsx', scene.workbook);
  const scored = (id: number) =>
    until('the intake is scored', async () => (await client.intake(id)).state === 'scored', { everyMs: 100 });
  const mailed = () => until('four mails are there', () => Promise.resolve(catcher.messages().length === 4));
  const expectAllOnce = async () => {
    await until('every mail is recorded as sent', async () => {
      const { outbox } = await readOutcome(database.url, catcher);
      return outbox.every((mail) => (mail as { state: string }).state === 'sent');
    });
    const outcome = await readOutcome(database.url, catcher);
    expect(outcome.readings).toHaveLength((30 + 4) * 2 * 12);
    expect(outcome.verdicts).toHaveLength((30 + 4) * 2);
    expect(outcome.fits).toHaveLength(2);
    expect(outcome.holds).toMatchObject([{ number: BAD_LOT }]);
    expect(outcome.audit.map((entry) => (entry as { action: string }).action)).toEqual([
      'upload',
      'read',
      'confirm',
      'store',
      'score',
      'hold',
    ]);
    expect(
      catcher
        .messages()
        .map(({ messageId }) => messageId)
        .sort(),
    ).toEqual(await outboxMessageIds(database.url));
  };
  /** It ended by the signal, soon, and had nothing to complain of. */
  const expectGoodStop = async (program: Program) => {
    expect(await program.stop()).toBeLessThan(STOP_MS);
    expect({ ...program.exit, output: program.output }).toMatchObject({ code: null, signal: 'SIGTERM' });
    expect(program.output).not.toMatch(/unhandled|uncaught|ERROR|"level":[56]0/i);
  };

  it('take a workbook in on Redis: the routes in one, the work in two others', async () => {
    const workers = [start('worker', redis.url), start('worker', redis.url)];
    const api = await startApi(redis.url);
    const { id, isConfirmable } = await upload();
    expect(isConfirmable).toBe(true);
    await client.confirm(id);
    await scored(id);
    await mailed();
    await expectAllOnce();
    for (const program of [...workers, api]) await expectGoodStop(program);
  });

  it('give the work of a killed one to the other', async () => {
    const first = start('worker', redis.url);
    await startApi(redis.url);
    const { id } = await upload();
    const point = await StopPoint.open(database.url);
    await point.atTrigger('fits', 'insert');
    await client.confirm(id);
    await point.reached();
    start('worker', redis.url);
    await first.kill();
    await point.release();
    await scored(id);
    await mailed();
    await expectAllOnce();
  });

  it('answer requests while Redis is away, and do what is owed once it is back', async () => {
    const worker = start('worker', redis.url);
    const api = await startApi(redis.url);
    const { id } = await upload();
    await redis.kill();
    await client.confirm(id);
    expect((await client.intake(id)).state).toBe('queued');
    await redis.again();
    await scored(id);
    await mailed();
    await expectAllOnce();
    await redis.kill();
    await Promise.all([worker, api].map(expectGoodStop));
    await redis.again();
  });

  it('stop soon in the middle of a fit, and do it after the next start without counting that attempt', async () => {
    const program = await startApi();
    const { id } = await upload();
    const point = await StopPoint.open(database.url);
    await point.atReading('breaks');
    await client.confirm(id);
    await until('the readings are stored', async () => (await client.intake(id)).state === 'working');
    await point.reached();
    await expectGoodStop(program);
    await point.release();
    await startApi();
    await scored(id);
    await mailed();
    await expectAllOnce();
  });

  it('stop soon while a mail server keeps them waiting, and send that mail after the next start', async () => {
    const program = await startApi();
    let open = () => {};
    const gate = new Promise<void>((resolve) => {
      open = resolve;
    });
    const begun = new Promise<void>((resolve) => {
      atMail = () => {
        resolve();
        return gate;
      };
    });
    const { id } = await upload();
    await client.confirm(id);
    await begun;
    await expectGoodStop(program);
    open();
    await startApi();
    await mailed();
    await expectAllOnce();
  });

  it('stop soon while somebody watches an intake', async () => {
    const program = await startApi();
    const { id } = await upload();
    const watching = await client.watch(id);
    await expectGoodStop(program);
    await watching.ended;
  });
});
