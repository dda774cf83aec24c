import { type ChildProcess, spawn } from 'node:child_process';
import { mkdtempSync, rmSync } from 'node:fs';
import { createServer } from 'node:net';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import Redis from 'ioredis';

const PATIENCE_MS = 15_000;

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

/** Debian's redis-server on loopback, for one spec; it keeps nothing on the disk. */
export class RedisServer {
  private child!: ChildProcess;
  private readonly folder = mkdtempSync(join(tmpdir(), 'ebbline-redis-'));

  private constructor(private readonly port: number) {}

  static async start(): Promise<RedisServer> {
    const server = new RedisServer(await freePort());
    await server.again();
    return server;
  }

  get url(): string {
    return `redis://127.0.0.1:${this.port}`;
  }

  /** Starts it at the same address, empty. */
  async again(): Promise<void> {
    const options = ['--port', String(this.port), '--bind', '127.0.0.1', '--save', '', '--appendonly', 'no'];
    this.child = spawn('redis-server', [...options, '--dir', this.folder], { stdio: 'ignore' });
    const failed = new Promise<never>((_resolve, reject) => this.child.once('error', reject));
    const client = new Redis(this.url, { retryStrategy: () => 30, maxRetriesPerRequest: null });
    client.on('error', () => undefined);
    const late = new Promise<never>((_resolve, reject) => {
      setTimeout(() => reject(new Error('redis-server does not answer')), PATIENCE_MS).unref();
    });
    try {
      await Promise.race([client.ping(), failed, late]);
    } finally {
      client.disconnect();
    }
  }

  async kill(): Promise<void> {
    const ended = new Promise((resolve) => this.child.once('close', resolve));
    if (this.child.exitCode === null && this.child.signalCode === null) {
      this.child.kill('SIGKILL');
      await ended;
    }
  }

  async stop(): Promise<void> {
    await this.kill();
    rmSync(this.folder, { recursive: true, force: true });
  }
}
