import { getQueueToken } from '@nestjs/bull';
import type { Queue } from 'bull';
import { Workbook } from 'exceljs';
import {
  DomainError,
  DUE_SUMMARIES_EVERY_MS,
  DUE_SUMMARIES_JOB,
  type SummaryListView,
  type SummaryView,
  WORK_QUEUE,
} from '@app/contracts';
import { insertManyWeeks } from '../../libs/data/src/testing/summary-week-rows';
import { WeeklySummaryHandler } from '../../apps/worker/src/summary/weekly-summary.handler';
import { WorkerModule } from '../../apps/worker/src/worker.module';
import { startTestApp, type TestApp } from '../support/app';
import { expectProblem } from '../support/expect-problem';
import { signIn } from '../support/factories/people';
import { insertPlant, type TestPlant } from '../support/factories/plant';

const WEEK = '2026-03-02';
type Headers = { authorization: string };

describe('weekly summaries', () => {
  let app: TestApp;
  let plant: TestPlant;
  const as = {} as Record<'manager' | 'engineer' | 'director' | 'lead' | 'stranger', Headers>;

  beforeAll(async () => {
    app = await startTestApp({ extraImports: [WorkerModule.register({ isMailing: false })] });
    plant = await insertPlant(app.database);
    await insertPlant(app.database, { name: 'Overdale', domain: 'overdale.example' });
    for (const name of ['manager', 'engineer', 'director', 'lead'] as const)
      as[name] = await signIn(app, `${name}@marrowby.example`);
    as.stranger = await signIn(app, 'manager@overdale.example');
    await insertManyWeeks(app.database, plant, new Date('2026-02-23T00:00:00Z'), 11, 10);
  });
  afterAll(() => app.close());

  const path = () => `/api/plants/${plant.id}/summaries`;
  const ask = (headers: Headers, body: object) => app.http.post(path()).set(headers).send(body);
  const list = async (headers: Headers = as.director) =>
    (await app.http.get(path()).set(headers).expect(200)).body as SummaryListView;
  async function made(version: number, week = WEEK): Promise<number> {
    const end = Date.now() + 60_000;
    for (;;) {
      const item = (await list()).items.find(({ weekStartsOn }) => weekStartsOn === week);
      if (item?.version === version) return item.id;
      if (Date.now() > end) throw new Error('no summary came');
      await new Promise((resolve) => setTimeout(resolve, 50));
    }
  }

  it('are made anew on demand, and mailed when that is asked for', async () => {
    expect(await list()).toEqual({ items: [], lastWeekStartsOn: WEEK, underWay: [], maySend: false });
    expect((await ask(as.manager, { weekStartsOn: WEEK }).expect(202)).body).toEqual({
      jobId: expect.any(Number),
      weekStartsOn: WEEK,
      version: 1,
    });
    const first = await made(1);
    expect(await app.database('outbox').count()).toEqual([{ count: 0 }]);
    expect((await ask(as.manager, { weekStartsOn: WEEK, send: true }).expect(202)).body.version).toBe(2);
    const second = await made(2);
    expect(await app.database('outbox').select('kind', 'recipient', 'event')).toEqual([
      { kind: 'weekly-summary', recipient: 'director@marrowby.example', event: `summary-${second}` },
    ]);
    const { body } = await app.http.get(`/api/summaries/${first}`).set(as.director).expect(200);
    expect(body as SummaryView).toMatchObject({
      id: first,
      version: 1,
      week: { startsOn: WEEK, from: '2026-03-02T00:00:00.000Z', to: '2026-03-09T00:00:00.000Z' },
      headline: expect.stringMatching(/\.$/),
      versions: [
        { id: second, version: 2 },
        { id: first, version: 1 },
      ],
      maySend: false,
    });
    expect((await list(as.manager)).maySend).toBe(true);
    const audited = await app.database('audit_entries').where({ action: 'request-summary' }).orderBy('id');
    expect(audited).toMatchObject([
      { actor_name: 'manager', thing_kind: 'plant', after: { weekStartsOn: WEEK, send: false } },
      { sentence: 'manager asked for a new version of the summary of the week of 2 to 8 Mar 2026, to be mailed.' },
    ]);
    expect(audited[0].address).toBeTruthy();
  });

  it('come as a workbook with real numbers under a frozen header', async () => {
    const [{ id }] = (await list()).items;
    const answer = await app.http
      .get(`/api/summaries/${id}/workbook`)
      .set(as.director)
      .buffer(true)
      .parse((response, done) => {
        const parts: Buffer[] = [];
        response.on('data', (part: Buffer) => parts.push(part));
        response.on('end', () => done(null, Buffer.concat(parts)));
      })
      .expect(200);
    expect(answer.headers['content-disposition']).toContain('summary-2026-03-02.xlsx');
    const book = new Workbook();
    await book.xlsx.load(answer.body);
    const sheet = book.getWorksheet('Lots by line');
    expect(sheet?.views[0]).toMatchObject({ state: 'frozen', ySplit: 1 });
    expect(sheet?.autoFilter).toBeTruthy();
    expect(sheet?.getRow(2).getCell(3).value).toEqual(expect.any(Number));
  });

  it('refuse what is no week that is over and measured', async () => {
    const pointer = async (body: object) => (await ask(as.manager, body).expect(400)).body.errors[0].pointer;
    expect(await pointer({ weekStartsOn: '2026-03-03' })).toBe('/weekStartsOn');
    expect(await pointer({ weekStartsOn: 'last' })).toBe('/weekStartsOn');
    expect(await pointer({ weekStartsOn: WEEK, send: 'perhaps' })).toBe('/send');
    expectProblem(await ask(as.manager, { weekStartsOn: '2026-03-09' }), 409, 'week-not-over');
    expectProblem(await ask(as.manager, { weekStartsOn: '2026-02-09' }), 409, 'week-before-readings');
  });

  it('are closed to other roles, other plants and nobody', async () => {
    const [{ id }] = (await list()).items;
    for (const read of [path(), `/api/summaries/${id}`, `/api/summaries/${id}/workbook`]) {
      expect((await app.http.get(read)).status).toBe(401);
      expectProblem(await app.http.get(read).set(as.lead), 403, 'forbidden');
      expectProblem(await app.http.get(read).set(as.stranger), 404, 'not-found');
      await app.http.get(read).set(as.engineer).expect(200);
    }
    expectProblem(await ask(as.director, { weekStartsOn: WEEK }), 403, 'forbidden');
    expectProblem(await ask(as.engineer, { weekStartsOn: WEEK }), 403, 'forbidden');
    expectProblem(await ask(as.stranger, { weekStartsOn: WEEK }), 404, 'not-found');
    expect((await app.http.post(path()).send({ weekStartsOn: WEEK })).status).toBe(401);
  });

  it('that cannot be made say so and why, until they are asked for again', async () => {
    const underWay = async (state: string) => {
      for (let tries = 0; tries < 200; tries++) {
        const [first] = (await list()).underWay;
        if (first?.state === state) return first;
        await new Promise((resolve) => setTimeout(resolve, 50));
      }
      throw new Error(`no summary is ${state}`);
    };
    app.clock.advance(1_000);
    let giveUp = () => {};
    const handler = app.nest.get(WeeklySummaryHandler, { strict: false });
    const run = jest.spyOn(handler, 'run').mockImplementation(
      () =>
        new Promise((_done, reject) => {
          giveUp = () => reject(new DomainError('unprocessable', 'broken', 'A figure of the week is broken.'));
        }),
    );
    const { body: asked } = await ask(as.manager, { weekStartsOn: WEEK }).expect(202);
    const item = { jobId: asked.jobId, weekStartsOn: WEEK, since: app.clock.now().toISOString() };
    expect(await underWay('being_made')).toEqual({ ...item, state: 'being_made', sentence: null });
    while (run.mock.calls.length === 0) await new Promise((resolve) => setTimeout(resolve, 50));
    giveUp();
    expect(await underWay('failed')).toEqual({
      ...item,
      state: 'failed',
      sentence: 'Ebbline gave up. A figure of the week is broken.',
    });
    expect((await list()).items[0].version).toBe(2);
    run.mockRestore();
    app.clock.advance(1_000);
    const { body: again } = await ask(as.manager, { weekStartsOn: WEEK }).expect(202);
    expect(again).toMatchObject({ version: 3 });
    await made(3);
    expect((await list()).underWay).toEqual([]);
  });

  it('are made by the beat of a repeated job once a Monday has come', async () => {
    const queue = app.nest.get<Queue>(getQueueToken(WORK_QUEUE), { strict: false });
    expect((await queue.getRepeatableJobs()).map(({ name, every }) => [name, every])).toEqual([
      [DUE_SUMMARIES_JOB, DUE_SUMMARIES_EVERY_MS],
    ]);
    app.clock.set('2026-03-16T06:00:00Z');
    as.director = await signIn(app, 'director@marrowby.example');
    await queue.add(DUE_SUMMARIES_JOB, {}, { removeOnComplete: true });
    await made(1, '2026-03-09');
  });
});
