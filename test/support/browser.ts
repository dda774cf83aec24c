import { mkdtemp, rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { type CaughtMessage, MailCatcher } from '@app/mail';
import { type Browser, type BrowserContextOptions, chromium, type Page } from 'playwright-core';
import { createPlayedPlant } from './browser-plant';
import { BrowserProgram } from './browser-program';
import { watchTroubles } from './browser-troubles';
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
  ) {}

  static async start(makeDatabase: () => Promise<TestDatabase> = createPlayedPlant): Promise<Trial> {
    const database = await makeDatabase();
    const folder = await mkdtemp(join(tmpdir(), 'ebbline-browser-'));
    const catcher = await MailCatcher.start({ folder: join(folder, 'mails') });
    const [program, browser] = await Promise.all([
      BrowserProgram.start({ databaseUrl: database.url, smtpUrl: catcher.smtpUrl }),
      chromium.launch({ executablePath: CHROMIUM, args: FLAGS.split(' ') }),
    ]);
    return new Trial(database, folder, catcher, program, browser);
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

  /** A window of a browser of its own: nothing is shared with the others. */
  async open(options: BrowserContextOptions & { width?: number } = {}): Promise<Page> {
    const { width = 1440, ...rest } = options;
    const height = width < 500 ? 844 : 900;
    const context = await this.browser.newContext({ viewport: { width, height }, baseURL: this.url, ...rest });
    context.setDefaultTimeout(PATIENCE_MS);
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
