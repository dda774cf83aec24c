import { type ChildProcess, spawn } from 'node:child_process';
import { createServer } from 'node:net';
import { join } from 'node:path';
import { distPath } from './dist';

const PATIENCE_MS = 60_000;
const POLL_MS = 50;

/** A port that was free a moment ago. */
function freePort(): Promise<number> {
  return new Promise((resolve, reject) => {
    const server = createServer();
    server.once('error', reject);
    server.listen(0, '127.0.0.1', () => {
      const { port } = server.address() as { port: number };
      server.close(() => resolve(port));
    });
  });
}

/** What runs by a clock of its own from an instant on, ms since 1970. */
export const clockAt = (at: number) => ({
  flags: ['--require', join(__dirname, 'moved-clock.cjs')],
  env: { TEST_CLOCK_AT: String(at) },
});

interface ProgramOptions {
  databaseUrl: string;
  smtpUrl: string;
  /** Where its clock begins, ms since 1970; without it, it has the machine's. */
  at?: number;
}

/** The built program as `npm start` runs it: routes, worker and pages in one process of its own, at an address that mails name. */
export class BrowserProgram {
  private constructor(
    private readonly child: ChildProcess,
    readonly url: string,
  ) {}

  static async start({ databaseUrl, smtpUrl, at }: ProgramOptions): Promise<BrowserProgram> {
    const port = await freePort();
    const url = `http://127.0.0.1:${port}`;
    const { PATH, HOME, TMPDIR } = process.env;
    const clock = at === undefined ? null : clockAt(at);
    const child = spawn(process.execPath, [...(clock?.flags ?? []), distPath('apps', 'api', 'main.js')], {
      env: {
        ...{ PATH, HOME, TMPDIR },
        ...clock?.env,
        PORT: String(port),
        DATABASE_URL: databaseUrl,
        SMTP_URL: smtpUrl,
        EBBLINE_PUBLIC_URL: url,
        EBBLINE_JWT_SECRET: 'a secret of the journeys, forty characters or more',
      },
      stdio: ['ignore', 'pipe', 'pipe', ...(clock === null ? [] : ['ipc' as const])],
    });
    const output: string[] = [];
    for (const stream of [child.stdout, child.stderr])
      stream?.on('data', (chunk: Buffer) => output.push(chunk.toString()));
    const end = performance.now() + PATIENCE_MS;
    while (!(await isReady(url))) {
      if (child.exitCode !== null || performance.now() > end) {
        child.kill('SIGKILL');
        throw new Error(`the program did not come up:\n${output.join('')}`);
      }
      await new Promise((resolve) => setTimeout(resolve, POLL_MS));
    }
    return new BrowserProgram(child, url);
  }

  /** Sets the clock of a program that has one of its own. */
  moveTo(at: number): void {
    this.child.send(at);
  }

  async stop(): Promise<void> {
    if (this.child.exitCode !== null) return;
    const ended = new Promise((resolve) => this.child.once('close', resolve));
    this.child.kill('SIGTERM');
    await ended;
  }
}

const isReady = (url: string): Promise<boolean> =>
  fetch(`${url}/api/health/ready`).then(
    (answer) => answer.ok,
    () => false,
  );
