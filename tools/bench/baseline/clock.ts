/** A measurement lasts at least this long: short calls are repeated within it. The yardsticks keep the same rule. */
const LEAST_SECONDS = 0.2;
const WARM_UP_SECONDS = 0.5;
const WARM_UP_CALLS = 2;

const now = () => performance.now() / 1000;
export const collectGarbage = () => (globalThis as { gc?: () => void }).gc?.();

export interface Timing<T> {
  /** Seconds a call, one entry a repeat. */
  seconds: number[];
  median: number;
  last: T;
}

/** Warms up, then times `repeats` measurements; garbage of earlier work is collected before each, as R's system.time does. */
export function measure<T>(repeats: number, run: () => T): Timing<T> {
  const end = now() + WARM_UP_SECONDS;
  let last = run();
  let once = Infinity;
  for (let call = 1; call < WARM_UP_CALLS || now() < end; call++) {
    const begun = now();
    last = run();
    once = Math.min(once, now() - begun);
  }
  const calls = Math.max(1, Math.ceil(LEAST_SECONDS / once));
  const seconds: number[] = [];
  for (let repeat = 0; repeat < repeats; repeat++) {
    collectGarbage();
    const begun = now();
    for (let call = 0; call < calls; call++) last = run();
    seconds.push((now() - begun) / calls);
  }
  return { seconds, median: median(seconds), last };
}

export function median(values: number[]): number {
  const sorted = [...values].sort((a, b) => a - b);
  const middle = sorted.length >> 1;
  return sorted.length % 2 === 1 ? sorted[middle] : (sorted[middle - 1] + sorted[middle]) / 2;
}
