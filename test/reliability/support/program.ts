import { type ChildProcess, spawn } from 'node:child_process';
import { existsSync } from 'node:fs';
import { createServer } from 'node:net';
import { distPath } from '../../support/dist';

export interface ProgramOptions {
  app: 'api' | 'worker';
  databaseUrl: string;
  smtpUrl: string;
  port?: number;
  redisUrl?: string;
}

const PATIENCE_MS = 60_000;

/** A port that was free a moment ago. */
export function freePort(): Promise<number> {
  return new Promise((resolve, reject) => {
    const server = createServer();
    server.once('error', reject);
    server.listen(0, '127.0.0.1', () => {
      const { port } = server.address() as { port: number };
      server.close(() => resolve(port));
    });
  });
}

/** One of the built programs, in a process of its own. */
export class Program {
  private readonly lines: string[] = [];
  private ending?: { code: number | null; signal: string | null };
  private readonly ended: Promise<void>;

  private constructor(private readonly child: ChildProcess) {
    for (const stream of [child.stdout, child.stderr])
      stream?.on('data', (chunk: Buffer) => this.lines.push(chunk.toString()));
    this.ended = new Promise((resolve) =>
      child.once('close', (code, signal) => {
        this.ending = { code, signal };
        resolve();
      }),
    );
  }

  static start({ app, databaseUrl, smtpUrl, port, redisUrl }: ProgramOptions): Program {
    const file = distPath('apps', app, 'main.js');
    if (!existsSync(file)) throw new Error(`${file} is missing: run npm run build:server first.`);
    const { PATH, HOME, TMPDIR, EBBLINE_DIST } = process.env;
    const env = {
      ...{ PATH, HOME, TMPDIR, EBBLINE_DIST },
      PORT: String(port ?? 0),
      DATABASE_URL: databaseUrl,
      SMTP_URL: smtpUrl,
      EBBLINE_JWT_SECRET: 'a secret of the kill tests, forty characters',
      EBBLINE_PUBLIC_URL: 'http://127.0.0.1:3000',
      ...(redisUrl && { REDIS_URL: redisUrl }),
    };
    return new Program(spawn(process.execPath, [file], { env, stdio: ['ignore', 'pipe', 'pipe'] }));
  }

  get output(): string {
    return this.lines.join('');
  }

  get exit(): { code: number | null; signal: string | null } | undefined {
    return this.ending;
  }

  /** Throws when the program has ended by itself. */
  requireAlive(): void {
    if (this.ending) throw new Error(`the program has ended (${JSON.stringify(this.ending)}):\n${this.output}`);
  }

  /** As a power failure would. */
  async kill(): Promise<void> {
    this.child.kill('SIGKILL');
    await this.ended;
  }

  /** As a service manager would; answers how long it took in ms. */
  async stop(): Promise<number> {
    const begun = performance.now();
    this.child.kill('SIGTERM');
    await this.ended;
    return performance.now() - begun;
  }
}

/** Polls until `look` answers something. */
export async function until<T>(
  what: string,
  look: () => Promise<T | undefined | false | null>,
  {
    program,
    patienceMs = PATIENCE_MS,
    everyMs = 25,
  }: { program?: Program; patienceMs?: number; everyMs?: number } = {},
): Promise<T> {
  const end = performance.now() + patienceMs;
  for (;;) {
    const found = await look();
    if (found) return found;
    program?.requireAlive();
    if (performance.now() > end)
      throw new Error(`not within ${patienceMs / 1000} s: ${what}\n${program?.output ?? ''}`);
    await new Promise((resolve) => setTimeout(resolve, everyMs));
  }
}
