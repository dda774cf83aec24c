import type { Clock } from '@app/platform';

/** The time of the played past; the real one once the past is over. */
export class PlayClock implements Clock {
  private at: Date | null = null;

  set(epochSeconds: number): void {
    this.at = new Date(epochSeconds * 1000);
  }

  release(): void {
    this.at = null;
  }

  now(): Date {
    return this.at ?? new Date();
  }
}
