import { execFile } from 'node:child_process';
import { mkdtemp, rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { promisify } from 'node:util';
import { type CaughtMessage, MailCatcher } from '@app/mail';
import { type Browser, type BrowserContextOptions, chromium, type Page } from 'playwright-core';
import { createPlayedPlant } from './browser-plant';
import { BrowserProgram, clockAt } from './browser-program';
import { watchTroubles } from './browser-troubles';
import { distPath } from './dist';
import type { TestDatabase } from './database';

/** Debian's; another one may be named. */
const CHROMIUM = process.env.CHROMIUM ?? '/usr/bin/chromium';
const FLAGS =
  '--no-sandbox --disable-gpu --disable-quic --no-first-run --disable-background-networking --disable-component-update --disable-sync';
/** A busy machine is no failure. */
const PATIENCE_MS = 60_000;
const POLL_MS = 50;

jest.setTimeout(2 * PATIENCE_MS);

/** The program at a played plant, a mail catcher, and a browser. */
export class Trial {
  /** Of all windows, in the order in which they came. */
  readonly troubles: string[] = [];

  private constructor(
    private readonly database: TestDatabase,
    /** Gone at the end. */
    readonly folder: string,
    private readonly catcher: MailCatcher,
    private readonly program: BrowserProgram,
    private readonly browser: Browser,
    /** How far its clocks are ahead of the machine's, ms; null where they are the machine's. */
    private ahead: number | null,
  ) {}

  /** `at`: where the clocks of the program and of its windows begin, ISO 8601; without it, they are the machine's. */
  static async start(
    makeDatabase: () => Promise<TestDatabase> = createPlayedPlant,
    { at }: { at?: string } = {},
  ): Promise<Trial> {
    const instant = at === undefined ? undefined : Date.parse(at);
    const database = await makeDatabase();
    const folder = await mkdtemp(join(tmpdir(), 'ebbline-browser-'));
    const catcher = await MailCatcher.start({ folder: join(folder, 'mails') });
    const [program, browser] = await Promise.all([
      BrowserProgram.start({ databaseUrl: database.url, smtpUrl: catcher.smtpUrl, at: instant }),
      chromium.launch({ executablePath: CHROMIUM, args: FLAGS.split(' ') }),
    ]);
    const ahead = instant === undefined ? null : instant - Date.now();
    return new Trial(database, folder, catcher, program, browser, ahead);
  }

  get url(): string {
    return this.program.url;
  }

  /** Mails, oldest first, once there are this many; those of the weeks, which come to the director by themselves, apart. */
  async mails(count: number): Promise<CaughtMessage[]> {
    const end = performance.now() + PATIENCE_MS;
    const found = () => this.catcher.messages().filter(({ to }) => !to.startsWith('director@'));
    while (found().length < count && performance.now() < end)
      await new Promise((resolve) => setTimeout(resolve, POLL_MS));
    return found().reverse();
  }

  /** The newest mail to somebody with these words in its subject or text, once there is one. */
  async mailTo(to: string, words: RegExp): Promise<CaughtMessage> {
    const end = performance.now() + PATIENCE_MS;
    for (;;) {
      const found = this.catcher
        .messages()
        .find((mail) => mail.to === to && words.test(`${mail.subject}\n${mail.text}`));
      if (found) return found;
      if (performance.now() > end) throw new Error(`no mail to ${to} with ${words}`);
      await new Promise((resolve) => setTimeout(resolve, POLL_MS));
    }
  }

  /** Everybody whom mails of a subject came to, in the order of their addresses. */
  recipientsOf(subject: RegExp): string[] {
    const mails = this.catcher.messages().filter((mail) => subject.test(mail.subject));
    return mails.map(({ to }) => to).sort();
  }

  /** What is printed for who begins an installation without a plant. */
  async printFirstLink(): Promise<string> {
    const clock = this.ahead === null ? null : clockAt(Date.now() + this.ahead);
    const { stdout } = await promisify(execFile)(
      process.execPath,
      [...(clock?.flags ?? []), distPath('tools', 'first-link.js')],
      { env: { ...clock?.env, DATABASE_URL: this.database.url, EBBLINE_PUBLIC_URL: this.url } },
    );
    return stdout;
  }

  /** Lets time pass for the program and for every window at once. */
  async moveTo(at: string): Promise<void> {
    this.ahead = Date.parse(at) - Date.now();
    this.program.moveTo(Date.parse(at));
    for (const context of this.browser.contexts()) await context.clock.setSystemTime(at);
  }

  /** A window of a browser of its own: nothing is shared with the others. */
  async open(options: BrowserContextOptions & { width?: number } = {}): Promise<Page> {
    const { width = 1440, ...rest } = options;
    const height = width < 500 ? 844 : 900;
    const context = await this.browser.newContext({ viewport: { width, height }, baseURL: this.url, ...rest });
    context.setDefaultTimeout(PATIENCE_MS);
    if (this.ahead !== null) await context.clock.install({ time: Date.now() + this.ahead });
    watchTroubles(context, this.troubles);
    return context.newPage();
  }

  async close(): Promise<void> {
    await this.browser.close();
    await this.program.stop();
    await this.catcher.close();
    await rm(this.folder, { recursive: true, force: true });
    await this.database.drop();
  }
}
