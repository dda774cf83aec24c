import { Workbook } from 'exceljs';
import type { Queue } from 'bull';
import { DUE_SUMMARIES_JOB } from '@app/contracts';
import { findFirstReadingAt, insertOwedJob, listOutboxAttachments } from '@app/data';
import type { Dispatcher } from '@app/platform';
import { insertManyWeeks } from '../../../../libs/data/src/testing/summary-week-rows';
import { WorkerBench } from '../testing/worker-bench';
import { DueSummariesService } from './due-summaries.service';
import type { SummaryMailService } from './summary-mail.service';

const DAY = 86_400_000;

describe('the weekly summary', () => {
  let bench: WorkerBench;
  let queued: { name: string; options: unknown }[];
  let dispatched: number[];
  beforeAll(async () => {
    bench = await WorkerBench.open();
  });
  afterAll(() => bench.close());
  beforeEach(async () => {
    await bench.reset();
    queued = [];
    dispatched = [];
    await insertManyWeeks(bench.db, bench.place.plant, new Date('2026-02-16T00:00:00Z'), 7, 6);
    bench.clock.set('2026-03-09T06:00:00Z');
  });

  const due = () => {
    const queue = {
      add: (name: string, _data: object, options: unknown) => Promise.resolve(queued.push({ name, options })),
    };
    const dispatcher = { owedJobs: (ids: number[]) => Promise.resolve(void dispatched.push(...ids)) };
    return new DueSummariesService(
      bench.db,
      bench.clock,
      queue as unknown as Queue,
      dispatcher as unknown as Dispatcher,
    );
  };
  const plantId = () => bench.place.plant.id;
  const runAll = async () => {
    const ids = (await bench.db('owed_jobs').where({ state: 'owed' }).orderBy('id').pluck('id')) as number[];
    return Promise.all(ids.map((id) => bench.processor.runOwed(id)));
  };
  const told = async () => {
    const found = await bench
      .db('summaries')
      .orderBy(['week_starts_on', 'version'])
      .select<{ week: string; version: number }[]>(
        bench.db.raw(`to_char(week_starts_on, 'YYYY-MM-DD') as week`),
        'version',
      );
    return found.map(({ week, version }) => `${week} v${version}`);
  };
  const mails = () => bench.db('outbox').orderBy('id');

  it('is owed from Monday 06:00 of the plant’s clock on, made once and mailed to the director', async () => {
    bench.clock.set('2026-03-09T05:59:59Z');
    await bench.db('summaries').insert({
      plant_id: plantId(),
      week_starts_on: '2026-02-23',
      version: 1,
      content: '{}',
      made_at: bench.clock.now(),
    });
    expect(await due().oweDue()).toBe(0);
    bench.clock.set('2026-03-09T06:00:00Z');
    await Promise.all([due().oweDue(), due().oweDue()]);
    expect(await bench.db('owed_jobs').select('name', 'subject')).toEqual([
      {
        name: 'weekly-summary',
        subject: { plantId: plantId(), weekStartsOn: '2026-03-02', isSent: true, askedBy: null },
      },
    ]);
    expect(new Set(dispatched).size).toBe(1);
    await runAll();
    expect(await told()).toEqual(['2026-02-23 v1', '2026-03-02 v1']);
    expect(await mails()).toMatchObject([
      {
        kind: 'weekly-summary',
        recipient: 'director@marrowby.example',
        subject: expect.stringContaining('Marrowby Works, 2 to 8 Mar 2026: '),
      },
    ]);
    expect(await due().oweDue()).toBe(0);
  });

  it('looks for due weeks at start and with every beat of a repeated job', async () => {
    await due().start();
    expect(queued).toEqual([
      { name: DUE_SUMMARIES_JOB, options: { repeat: { every: 300_000 }, removeOnComplete: true, removeOnFail: true } },
    ]);
    expect(await bench.db('owed_jobs').pluck('name')).toEqual(['weekly-summary']);
  });

  describe('after a stop of weeks', () => {
    const MISSED = ['2026-03-09 v1', '2026-03-16 v1', '2026-03-23 v1'];
    beforeEach(async () => {
      await due().oweDue();
      await runAll();
      bench.clock.advance(3 * 7 * DAY);
    });

    it('makes a page of each missed week and mails the newest alone, once, naming and linking the others', async () => {
      for (let start = 0; start < 3; start++) {
        await due().start();
        await runAll();
      }
      expect(await told()).toEqual(['2026-03-02 v1', ...MISSED]);
      const [, mail, ...more] = (await mails()) as { subject: string; plain_text: string; html: string }[];
      expect(more).toEqual([]);
      expect(mail.subject).toContain('23 to 29 Mar 2026');
      const earlier = await bench.db('summaries').whereIn('week_starts_on', ['2026-03-09', '2026-03-16']).pluck('id');
      for (const part of [mail.plain_text, mail.html]) {
        expect(part).toContain('9 to 15 Mar 2026');
        expect(part).toContain('16 to 22 Mar 2026');
        for (const id of earlier) expect(part).toContain(`http://127.0.0.1:3000/summaries/${id}`);
      }
      expect((await bench.db('audit_entries').orderBy('id').pluck('sentence')).slice(1)).toEqual([
        'Ebbline made version 1 of the summary of the week of 9 to 15 Mar 2026, which had been missed.',
        'Ebbline made version 1 of the summary of the week of 16 to 22 Mar 2026, which had been missed.',
        'Ebbline made version 1 of the summary of the week of 23 to 29 Mar 2026 and mailed it to 1 person.',
      ]);
    });

    it('writes pages and mail together or not at all', async () => {
      await due().oweDue();
      const handler = bench.handlers.find(({ jobName }) => jobName === 'weekly-summary') as unknown as {
        mails: SummaryMailService;
      };
      const write = jest.spyOn(handler.mails, 'write').mockImplementationOnce(async (...of) => {
        await handler.mails.write(...of);
        throw new Error('the connection broke after the mail was written');
      });
      await expect(runAll()).rejects.toThrow('the connection broke');
      expect([await told(), (await mails()).length]).toEqual([['2026-03-02 v1'], 1]);
      write.mockRestore();
      await runAll();
      expect([await told(), (await mails()).length]).toEqual([['2026-03-02 v1', ...MISSED], 2]);
    });

    it('leaves a week that is still owed to the newer one', async () => {
      bench.clock.advance(-7 * DAY);
      await due().oweDue();
      bench.clock.advance(7 * DAY);
      await due().oweDue();
      expect(await bench.db('owed_jobs').where({ state: 'owed' })).toHaveLength(2);
      await runAll();
      expect([await told(), (await mails()).length]).toEqual([['2026-03-02 v1', ...MISSED], 2]);
    });
  });

  it('is not made before the plant’s first reading', async () => {
    bench.clock.set('2026-02-16T07:00:00Z');
    expect(await findFirstReadingAt(bench.db, plantId())).not.toBeNull();
    expect(await due().oweDue()).toBe(0);
  });

  it('is written once however often its job runs', async () => {
    await due().oweDue();
    const [id] = (await bench.db('owed_jobs').pluck('id')) as number[];
    const answers = await Promise.all([bench.processor.runOwed(id), bench.processor.runOwed(id)]);
    expect(answers.filter(({ done }) => done)).toHaveLength(1);
    const before = await bench.everything();
    await bench.oweAgain(id);
    expect(await bench.processor.runOwed(id)).toEqual({ done: false, reason: 'the week has its summary' });
    expect(await bench.everything()).toEqual(before);
    expect(await bench.db('audit_entries').pluck('sentence')).toEqual([
      'Ebbline made version 1 of the summary of the week of 2 to 8 Mar 2026 and mailed it to 1 person.',
    ]);
  });

  it('is a new version when somebody asks, mailed only when they say so', async () => {
    await due().oweDue();
    await runAll();
    const askedBy = bench.place.plant.people.manager.id;
    const ask = (isSent: boolean) =>
      bench.db.transaction((tx) =>
        insertOwedJob(tx, {
          plantId: plantId(),
          name: 'weekly-summary',
          subject: { plantId: plantId(), weekStartsOn: '2026-03-02', isSent, askedBy },
          at: bench.clock.now(),
        }),
      );
    await bench.processor.runOwed(await ask(false));
    expect([await told(), (await mails()).length]).toEqual([['2026-03-02 v1', '2026-03-02 v2'], 1]);
    await bench.processor.runOwed(await ask(true));
    expect([(await told()).at(-1), (await mails()).length]).toEqual(['2026-03-02 v3', 2]);
    expect((await mails())[1].plain_text).toContain('version 3');
    expect((await bench.db('audit_entries').orderBy('id').pluck('sentence'))[1]).toBe(
      'Ebbline made version 2 of the summary of the week of 2 to 8 Mar 2026 asked for by manager.',
    );
  });

  it('brings its chart and a workbook that reads back', async () => {
    await due().oweDue();
    await runAll();
    const [mail] = (await mails()) as { id: number; html: string }[];
    const [chart, book] = await listOutboxAttachments(bench.db, mail.id);
    expect(mail.html).toContain(`src="cid:${chart.contentId}"`);
    expect(chart.bytes.subarray(0, 8)).toEqual(Buffer.from([137, 80, 78, 71, 13, 10, 26, 10]));
    expect(book.fileName).toBe('summary-2026-03-02.xlsx');
    const read = new Workbook();
    await read.xlsx.load(book.bytes as never);
    expect(read.worksheets.map(({ name }) => name)).toContain('Open holds');
  });

  it('says where people look when it cannot be made, and is not tried again for hours', async () => {
    await due().oweDue();
    const [id] = (await bench.db('owed_jobs').pluck('id')) as number[];
    await bench.db('owed_jobs').where({ id }).update({ attempts: 20 });
    await bench.processor.runOwed(id);
    expect(await bench.db('audit_entries').pluck('sentence')).toEqual([
      expect.stringContaining('Ebbline could not make the summary of the week of 2 to 8 Mar 2026.'),
    ]);
    bench.clock.advance(5 * 3_600_000);
    expect(await due().oweDue()).toBe(0);
    bench.clock.advance(2 * 3_600_000);
    expect(await due().oweDue()).toBe(1);
  });
});
