import { Injectable } from '@nestjs/common';

/** The work under way in this process, so that a stop can wait for it a little before it is cut short. */
@Injectable()
export class RunningWork {
  private readonly running = new Set<Promise<unknown>>();
  private isEnding = false;

  /** From then on what fails may have been cut short. */
  get isStopping(): boolean {
    return this.isEnding;
  }

  track<T>(work: Promise<T>): Promise<T> {
    const settled = work
      .catch(() => undefined)
      .finally(() => {
        this.running.delete(settled);
      });
    this.running.add(settled);
    return work;
  }

  beginToStop(): void {
    this.isEnding = true;
  }

  /** Until nothing runs, or for as long as told. */
  async settled(milliseconds: number): Promise<void> {
    let timer: NodeJS.Timeout | undefined;
    const late = new Promise<void>((resolve) => {
      timer = setTimeout(resolve, milliseconds);
    });
    await Promise.race([Promise.all(this.running), late]);
    clearTimeout(timer);
  }
}
