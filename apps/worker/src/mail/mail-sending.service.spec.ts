import { mkdtempSync, rmSync } from 'node:fs';
import { createServer, type Server, type Socket } from 'node:net';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { Logger } from '@nestjs/common';
import { insertMails, leaseMail } from '@app/data';
import { MailCatcher } from '@app/mail';
import type { Config } from '@app/platform';
import { WorkerBench } from '../testing/worker-bench';
import { MailSendingService } from './mail-sending.service';

describe('sending mails', () => {
  let bench: WorkerBench;
  let folder: string;
  let catcher: MailCatcher;
  let onData: () => Promise<void>;
  let service: MailSendingService;
  beforeAll(async () => {
    bench = await WorkerBench.open();
  });
  afterAll(() => bench.close());
  beforeEach(async () => {
    await bench.reset();
    jest.spyOn(Logger.prototype, 'warn').mockImplementation(() => undefined);
    onData = () => Promise.resolve();
    folder = mkdtempSync(join(tmpdir(), 'ebbline-mail-'));
    catcher = await MailCatcher.start({ folder, onData: () => onData() });
    service = serviceFor(catcher.smtpUrl);
  });
  afterEach(async () => {
    jest.restoreAllMocks();
    service.onApplicationShutdown();
    await catcher.close();
    rmSync(folder, { recursive: true, force: true });
  });

  const serviceFor = (smtpUrl: string) =>
    new MailSendingService(bench.db, bench.clock, { smtpUrl, mailFrom: 'Ebbline <ebbline@works.example>' } as Config);
  const waiting = async () => {
    const mail = {
      event: 'e',
      kind: 'held-lots',
      recipient: 'lead@works.example',
      subject: 'Lot 24117 is held',
      html: '<p>4.3 σ</p>',
      text: '4.3 σ',
    };
    const [id] = await bench.db.transaction((tx) => insertMails(tx, bench.place.plant.id, [mail], bench.clock.now()));
    return id;
  };
  const row = () => bench.db('outbox').first();

  it('sends it and says when', async () => {
    const id = await waiting();
    expect(await service.send(id)).toEqual({ sent: true });
    expect(await row()).toMatchObject({ state: 'sent', sent_at: bench.clock.now(), attempts: 1, leased_until: null });
    expect(catcher.messages()).toMatchObject([
      { to: 'lead@works.example', subject: 'Lot 24117 is held', messageId: (await row()).message_id },
    ]);
  });

  it('sends what goes with it, and the catcher shows the picture in its place', async () => {
    const bytes = Buffer.from('iVBORw0KGgo=', 'base64');
    const chart = { fileName: 'week.png', mediaType: 'image/png', contentId: 'chart@ebbline', bytes };
    const book = { fileName: 'week.xlsx', mediaType: 'application/zip', contentId: null, bytes: Buffer.from('PK') };
    const html = '<img src="cid:chart@ebbline" alt="Lots on hold">';
    const mail = { event: 'w', kind: 'weekly-summary', recipient: 'd@works.example', subject: 's', html, text: 't' };
    const [id] = await bench.db.transaction((tx) =>
      insertMails(tx, bench.place.plant.id, [mail], bench.clock.now(), [chart, book]),
    );
    expect(await service.send(id)).toEqual({ sent: true });
    const [caught] = catcher.messages();
    const shown = await (await fetch(`${catcher.pageUrl}/mail/${caught.id}/html`)).text();
    expect(shown).toContain(`src="data:image/png;base64,${bytes.toString('base64')}"`);
    const page = await (await fetch(`${catcher.pageUrl}/mail/${caught.id}`)).text();
    expect(page).toContain('week.xlsx');
  });

  it('sends it once when it is asked twice, one after the other or at once', async () => {
    const id = await waiting();
    let begun = 0;
    onData = () => Promise.resolve(void (begun += 1));
    const both = await Promise.all([service.send(id), service.send(id)]);
    expect(both.filter(({ sent }) => sent)).toHaveLength(1);
    expect(await service.send(id)).toMatchObject({ sent: false });
    expect(begun).toBe(1);
  });

  it('sends it under the same Message-ID after a crash before it was recorded, and the catcher has it once', async () => {
    const id = await waiting();
    await service.send(id);
    await bench
      .db('outbox')
      .update({ state: 'waiting', sent_at: null, leased_until: new Date(bench.clock.now().getTime() + 20_000) });
    expect(await service.send(id)).toMatchObject({ sent: false });
    bench.clock.advance(20_000);
    expect(await service.send(id)).toEqual({ sent: true });
    expect(catcher.messages()).toHaveLength(1);
  });

  it('puts it off with a growing delay while the server refuses it for now', async () => {
    const id = await waiting();
    onData = () => Promise.reject(new Error('busy'));
    for (const delaySeconds of [5, 10, 20]) {
      expect(await service.send(id)).toMatchObject({ sent: false, reason: expect.stringContaining('busy') });
      const { next_attempt_at, state } = await row();
      expect([state, (next_attempt_at as Date).getTime() - bench.clock.now().getTime()]).toEqual([
        'waiting',
        delaySeconds * 1000,
      ]);
      expect(await service.send(id)).toMatchObject({ sent: false, reason: expect.stringContaining('not yet due') });
      bench.clock.advance(delaySeconds * 1000);
    }
    onData = () => Promise.resolve();
    expect(await service.send(id)).toEqual({ sent: true });
  });

  it('puts it off when nobody listens', async () => {
    const id = await waiting();
    const nowhere = serviceFor('smtp://127.0.0.1:9');
    expect(await nowhere.send(id)).toMatchObject({ sent: false, reason: expect.stringContaining('ECONNREFUSED') });
    expect(await row()).toMatchObject({
      state: 'waiting',
      attempts: 1,
      last_error: expect.stringContaining('ECONNREFUSED'),
    });
  });

  it('gives it up in sight of the administrator after thirty attempts', async () => {
    const id = await waiting();
    onData = () => Promise.reject(new Error('busy'));
    await bench.db('outbox').update({ attempts: 29 });
    await service.send(id);
    expect(await row()).toMatchObject({ state: 'failed', attempts: 30, last_error: expect.stringContaining('busy') });
  });

  it('gives it up at once when the server says that trying again is of no use', async () => {
    const id = await waiting();
    const server = await refusingServer('550 No such person');
    const refused = serviceFor(`smtp://127.0.0.1:${(server.address() as { port: number }).port}`);
    expect(await refused.send(id)).toMatchObject({ sent: false, reason: expect.stringContaining('No such person') });
    expect(await row()).toMatchObject({ state: 'failed', attempts: 1 });
    await new Promise((resolve) => server.close(resolve));
  });

  it('keeps its lease up while a slow server takes its time, and no longer', async () => {
    const id = await waiting();
    const timers = jest.spyOn(global, 'setInterval');
    const stopped = jest.spyOn(global, 'clearInterval');
    let accept = () => {};
    const begun = new Promise<void>((resolve) => {
      onData = () => {
        resolve();
        return new Promise((go) => {
          accept = go;
        });
      };
    });
    const sending = service.send(id);
    await begun;
    const at = timers.mock.calls.findIndex(([, every]) => every === 6_000);
    bench.clock.advance(15_000);
    timers.mock.calls[at][0]();
    const in19Seconds = () => leaseMail(bench.db, id, new Date(bench.clock.now().getTime() + 19_000), 20);
    while ((await row()).leased_until.getTime() < bench.clock.now().getTime() + 20_000)
      await new Promise((resolve) => setTimeout(resolve, 5));
    expect(await in19Seconds()).toBeUndefined();
    accept();
    expect(await sending).toEqual({ sent: true });
    expect(stopped).toHaveBeenCalledWith(timers.mock.results[at].value);
  });
});

/** An SMTP server that answers every recipient with this line. */
async function refusingServer(answer: string): Promise<Server> {
  const server = createServer((socket: Socket) => {
    socket.write('220 here\r\n');
    socket.on('error', () => undefined);
    socket.on('data', (data) => {
      const line = data.toString().toUpperCase();
      if (line.startsWith('QUIT')) socket.end('221 bye\r\n');
      else socket.write(line.startsWith('RCPT') ? `${answer}\r\n` : '250 ok\r\n');
    });
  });
  await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve));
  return server;
}
