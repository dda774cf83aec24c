import { PerformanceObserver } from 'node:perf_hooks';
import { setTimeout as pause } from 'node:timers/promises';
import { collectGarbage } from './clock';

const CANDIDATES = 200;
/** Until the code is compiled for good: interpreted code puts every intermediate number on the heap. */
const WARM_UP_CANDIDATES = 50;
const WARM_UP_SECONDS = 1;
/** Each candidate is this much smoother than the one before. */
const STEP = 1.05;

export interface AllocationFigures {
  what: string;
  candidates: number;
  /** Growth of the heap and of array buffers per candidate, before anything is collected. */
  bytesPerCandidate: number;
  /** Collections that ran by themselves meanwhile: with any, more was allocated than the growth says. */
  collections: number;
  /** Growth that is left after a collection. */
  keptBytes: number;
}

const inUse = () => {
  const { heapUsed, arrayBuffers } = process.memoryUsage();
  return heapUsed + arrayBuffers;
};

/** What an evaluator of the smoothness criterion allocates per candidate lambda, once it is prepared and warm. Needs --expose-gc. */
export async function measureAllocation(
  what: string,
  evaluate: (lambda: number) => unknown,
  lambda: number,
): Promise<AllocationFigures> {
  let collections = 0;
  const observer = new PerformanceObserver((list) => {
    collections += list.getEntries().length;
  });
  const end = performance.now() + 1000 * WARM_UP_SECONDS;
  for (let k = 0; k < WARM_UP_CANDIDATES || performance.now() < end; k++) evaluate(lambda * STEP ** (k % CANDIDATES));
  collectGarbage();
  await pause(50);
  observer.observe({ entryTypes: ['gc'] });
  const before = inUse();
  for (let k = 0; k < CANDIDATES; k++) evaluate(lambda * STEP ** k);
  const after = inUse();
  await pause(50);
  observer.disconnect();
  collectGarbage();
  const kept = inUse();
  return {
    what,
    candidates: CANDIDATES,
    bytesPerCandidate: (after - before) / CANDIDATES,
    collections,
    keptBytes: Math.max(0, kept - before),
  };
}
