import { type ChildProcess, spawn } from 'node:child_process';
import { readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';

/** The built program, API and worker in one process, as `npm start` runs it. */
export class BenchServer {
  private constructor(
    private readonly child: ChildProcess,
    readonly url: string,
  ) {}

  static async start(dist: string, databaseUrl: string, port: number): Promise<BenchServer> {
    const child = spawn(process.execPath, [join(dist, 'apps', 'api', 'main.js')], {
      env: {
        PATH: process.env.PATH,
        DATABASE_URL: databaseUrl,
        PORT: String(port),
        EBBLINE_JWT_SECRET: 'a secret of the bench, of some forty characters',
        SMTP_URL: 'smtp://127.0.0.1:9',
      },
      stdio: ['ignore', 'ignore', 'inherit'],
    });
    const server = new BenchServer(child, `http://127.0.0.1:${port}/api`);
    const end = performance.now() + 60_000;
    while (!(await server.isReady())) {
      if (performance.now() > end || child.exitCode !== null) throw new Error('the server did not come up');
      await new Promise((resolve) => setTimeout(resolve, 100));
    }
    return server;
  }

  private async isReady(): Promise<boolean> {
    return fetch(`${this.url}/health/ready`).then(
      (answer) => answer.ok,
      () => false,
    );
  }

  /** Forgets the peak so far (Linux). */
  resetPeak(): void {
    writeFileSync(`/proc/${this.child.pid}/clear_refs`, '5');
  }

  /** Largest resident memory of the process with its threads since the last reset, MB. */
  peakMegabytes(): number {
    const [, kilobytes] = /VmHWM:\s+(\d+) kB/.exec(readFileSync(`/proc/${this.child.pid}/status`, 'utf8')) ?? [];
    return Number(kilobytes) / 1024;
  }

  async stop(): Promise<void> {
    const ended = new Promise((resolve) => this.child.once('exit', resolve));
    this.child.kill('SIGTERM');
    await ended;
  }
}

/** A person signed in at the server. */
export class BenchClient {
  private constructor(
    private readonly url: string,
    private readonly token: string,
  ) {}

  static async signIn(url: string, email: string, password: string): Promise<BenchClient> {
    const answer = await fetch(`${url}/auth/sign-in`, {
      method: 'POST',
      headers: { 'content-type': 'application/json' },
      body: JSON.stringify({ email, password }),
    });
    return new BenchClient(url, ((await answer.json()) as { accessToken: string }).accessToken);
  }

  async send<T>(method: string, path: string, body?: unknown): Promise<T> {
    const answer = await fetch(`${this.url}/${path}`, {
      method,
      headers: {
        authorization: `Bearer ${this.token}`,
        ...(body === undefined ? {} : { 'content-type': 'application/json' }),
      },
      ...(body === undefined ? {} : { body: JSON.stringify(body) }),
    });
    if (!answer.ok) throw new Error(`${method} ${path}: ${answer.status} ${await answer.text()}`);
    return (await answer.json()) as T;
  }

  async upload<T>(path: string, file: string): Promise<T> {
    const form = new FormData();
    form.set('file', new Blob([readFileSync(file)]), 'bench.xlsx');
    const answer = await fetch(`${this.url}/${path}`, {
      method: 'POST',
      headers: { authorization: `Bearer ${this.token}` },
      body: form,
    });
    if (!answer.ok) throw new Error(`POST ${path}: ${answer.status} ${await answer.text()}`);
    return (await answer.json()) as T;
  }
}
