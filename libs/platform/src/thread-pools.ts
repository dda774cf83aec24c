import { availableParallelism } from 'node:os';
import { Injectable, type OnApplicationShutdown } from '@nestjs/common';
import { Piscina } from 'piscina';
import { threadFile } from './project-root';

/** A reader that grows beyond this is ended by the runtime, and the file refused. */
const READER_HEAP_MB = 256;
const JUDGE_HEAP_MB = 128;
/** Small, since every thread has its own: what lives long moves on soon enough. */
const YOUNG_HEAP_MB = 16;
const IDLE_MS = 30_000;

/** Worker threads, so that no event loop that serves anybody reads a workbook or fits a baseline. */
@Injectable()
export class ThreadPools implements OnApplicationShutdown {
  private readonly pools = new Map<string, Piscina>();
  private isClosed = false;

  /** Runs the default export of `<name>.ts` in a thread. */
  async run<T>(name: string, task: unknown, signal?: AbortSignal): Promise<T> {
    if (this.isClosed) throw new Error('the program is stopping');
    return (await this.pool(name).run(task, { signal })) as T;
  }

  private pool(name: string): Piscina {
    const existing = this.pools.get(name);
    if (existing) return existing;
    const isReader = name.startsWith('read-');
    const pool = new Piscina({
      filename: threadFile(name),
      minThreads: 0,
      maxThreads: isReader ? 1 : Math.max(1, availableParallelism()),
      idleTimeout: IDLE_MS,
      resourceLimits: {
        maxOldGenerationSizeMb: isReader ? READER_HEAP_MB : JUDGE_HEAP_MB,
        maxYoungGenerationSizeMb: YOUNG_HEAP_MB,
      },
    });
    this.pools.set(name, pool);
    return pool;
  }

  /** Ends the threads; what runs in them is rejected, and nothing runs in them any more. */
  async close(): Promise<void> {
    this.isClosed = true;
    await Promise.all([...this.pools.values()].map((pool) => pool.destroy()));
  }

  async onApplicationShutdown(): Promise<void> {
    await this.close();
  }
}
