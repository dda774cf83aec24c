import type { Clock } from '@app/platform';

/** A clock that stands still until it is set. */
export class SettableClock implements Clock {
  constructor(private at: Date) {}

  now(): Date {
    return new Date(this.at);
  }

  set(at: Date | string): void {
    this.at = new Date(at);
  }

  advance(milliseconds: number): void {
    this.at = new Date(this.at.getTime() + milliseconds);
  }
}
