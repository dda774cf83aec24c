/** Injection tokens of what both programs share. */
export const CONFIG = Symbol('Config');
export const DATABASE = Symbol('Database');
export const CLOCK = Symbol('Clock');

/** The time, so that tests and the demo's history can set it. */
export interface Clock {
  now(): Date;
}

export const systemClock: Clock = { now: () => new Date() };
