import { existsSync, mkdtempSync, readdirSync, rmSync, writeFileSync } from 'node:fs';
import { connect } from 'node:net';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { createMailTransport, type OutgoingMessage } from '../transport';
import type { CaughtMessage } from './caught-message';
import { MailCatcher, type MailCatcherOptions } from './mail-catcher';

const PIXEL = Buffer.from(
  'iVBORw0KGgoAAAANSUhEUgAAAAEAAAABCAYAAAAfFcSJAAAADUlEQVR4nGNgYGBgAAAABQABXvMqOgAAAABJRU5ErkJggg==',
  'base64',
);

function message(extra: Partial<OutgoingMessage> = {}): OutgoingMessage {
  return {
    messageId: '<hold-opened.1@marrowby.example>',
    to: 'lead@marrowby.example',
    subject: 'Lot 24117 is held: coat weight 4.3 σ below its baseline',
    html: '<p>Lot 24117 <a href="http://127.0.0.1:3000/holds/1">is held</a></p><img src="cid:mark" alt="held">',
    text: 'Lot 24117 is held. See http://127.0.0.1:3000/holds/1.',
    attachments: [{ filename: 'mark.png', content: PIXEL, contentType: 'image/png', cid: 'mark' }],
    ...extra,
  };
}

describe('MailCatcher', () => {
  let folder: string;
  let catcher: MailCatcher;

  const start = async (options: Partial<MailCatcherOptions> = {}) => {
    catcher = await MailCatcher.start({ folder, ...options });
  };
  const send = async (what: OutgoingMessage) => {
    const transport = createMailTransport(catcher.smtpUrl, 'Ebbline <ebbline@marrowby.example>');
    try {
      await transport.send(what);
    } finally {
      transport.close();
    }
  };
  const get = (path: string) => fetch(`${catcher.pageUrl}${path}`);
  const files = () => readdirSync(folder).filter((name) => name.endsWith('.eml'));

  beforeEach(() => {
    folder = mkdtempSync(join(tmpdir(), 'ebbline-catcher-'));
  });
  afterEach(async () => {
    await catcher.close();
    rmSync(folder, { recursive: true, force: true });
  });

  it('tells programs what it keeps', async () => {
    await start({ now: () => new Date('2026-03-02T04:05:06.789Z') });
    await send(message());
    const [kept, ...others] = (await (await get('/messages')).json()) as CaughtMessage[];
    expect(others).toEqual([]);
    expect(kept).toMatchObject({
      messageId: '<hold-opened.1@marrowby.example>',
      from: 'ebbline@marrowby.example',
      to: 'lead@marrowby.example',
      subject: 'Lot 24117 is held: coat weight 4.3 σ below its baseline',
      at: '2026-03-02T04:05:06.789Z',
    });
    expect(kept.text.trim()).toBe('Lot 24117 is held. See http://127.0.0.1:3000/holds/1.');
    expect(kept.html).toContain('href="http://127.0.0.1:3000/holds/1"');
  });

  it('has a message on the disk before the sender is told so', async () => {
    let isAnswered = false;
    const seen: { onDisk: boolean; answered: boolean }[] = [];
    await start({
      onStored: async (stored) => {
        await new Promise((resolve) => setTimeout(resolve, 50));
        seen.push({ onDisk: existsSync(join(folder, `${stored.id}.eml`)), answered: isAnswered });
      },
    });
    await send(message());
    isAnswered = true;
    expect(seen).toEqual([{ onDisk: true, answered: false }]);
  });

  it('drops a repeat of a Message-ID, also one that arrives at the same time', async () => {
    let stored = 0;
    await start({ onStored: () => void (stored += 1) });
    await Promise.all([send(message()), send(message()), send(message({ messageId: '<other@marrowby.example>' }))]);
    expect(files()).toHaveLength(2);
    expect(stored).toBe(2);
  });

  it('keeps its messages over a restart, drops their repeats, and clears what was half-written', async () => {
    await start({ now: () => new Date('2026-03-02T04:05:06.789Z') });
    await send(message());
    const before = catcher.messages();
    await catcher.close();
    writeFileSync(join(folder, '20260302T040507000Z-0123456789abcdef01234567.eml.next'), 'Subject: half');
    await start();
    await send(message());
    expect(catcher.messages()).toEqual(before);
    expect(readdirSync(folder)).toEqual([`${before[0].id}.eml`]);
  });

  it('keeps nothing of a message whose sender goes away in the middle', async () => {
    await start();
    const socket = connect(catcher.smtpPort, '127.0.0.1');
    const talk = ['EHLO x', 'MAIL FROM:<a@x.example>', 'RCPT TO:<b@x.example>', 'DATA'];
    await new Promise<void>((resolve) => {
      socket.on('data', (chunk) => {
        if (/^354/m.test(chunk.toString())) {
          socket.write('Message-ID: <half@x.example>\r\nSubject: half\r\n\r\nhal', () => socket.destroy());
        } else {
          const next = talk.shift();
          if (next) socket.write(`${next}\r\n`);
        }
      });
      socket.on('close', () => resolve());
    });
    await new Promise((resolve) => setTimeout(resolve, 100));
    expect(readdirSync(folder)).toEqual([]);
    await send(message());
    expect(catcher.messages()).toHaveLength(1);
  });

  it('refuses for now, and keeps nothing, when the hook at the start of a message throws', async () => {
    await start({
      onData: () => {
        throw new Error('not today');
      },
    });
    await expect(send(message())).rejects.toMatchObject({ responseCode: 451, isPermanent: false });
    expect(files()).toEqual([]);
  });

  it('lists messages newest first on its page', async () => {
    let minute = 0;
    await start({ now: () => new Date(Date.UTC(2026, 2, 2, 4, (minute += 1))) });
    await send(message({ messageId: '<1@x.example>', subject: 'The older one' }));
    await send(message({ messageId: '<2@x.example>', subject: 'The newer one' }));
    const page = await (await get('/')).text();
    expect(page.indexOf('The newer one')).toBeLessThan(page.indexOf('The older one'));
    expect(page.indexOf('The newer one')).toBeGreaterThan(0);
  });

  it('shows a message in a frame without scripts or origin, its image put in, its links linked', async () => {
    await start();
    await send(message());
    const [{ id }] = catcher.messages();
    const page = await (await get(`/mail/${id}`)).text();
    expect(page).toContain('sandbox="allow-popups allow-popups-to-escape-sandbox"');
    expect(page).toContain('<a href="http://127.0.0.1:3000/holds/1" target="_blank"');
    expect(page).toContain('hold-opened.1@marrowby.example');
    const part = await get(`/mail/${id}/html`);
    expect(part.headers.get('content-security-policy')).toMatch(/default-src 'none'.*sandbox/);
    expect(await part.text()).toContain(`src="data:image/png;base64,${PIXEL.toString('base64')}"`);
    expect(Buffer.from(await (await get(`/mail/${id}/parts/0`)).arrayBuffer())).toEqual(PIXEL);
    expect(await (await get(`/mail/${id}/source`)).text()).toMatch(/^Message-ID: <hold-opened\.1@marrowby\.example>/m);
  });

  it('shows a hostile subject as text', async () => {
    await start();
    await send(message({ subject: '<script>alert(1)</script>' }));
    const page = await (await get('/')).text();
    expect(page).not.toContain('<script>');
    expect(page).toContain('&lt;script&gt;alert(1)&lt;/script&gt;');
  });

  it('answers 404 for a mail that it does not have', async () => {
    await start();
    expect((await get('/mail/nothing')).status).toBe(404);
    expect((await get('/messages/..%2f..%2fetc')).status).toBe(404);
  });
});
