import type { PreparedSeries } from '../prepared-series';
import { filterRange } from './filter-passes';
import { STATE_SIZE } from './information-state';
import { smoothBackward, type SmoothedPoints } from './smoothing-pass';

/** Up to this many points the forward states of a whole series are held at once, in 3 MB that are kept for the next series. */
const WHOLE_POINTS = 65536;
/** Points whose forward states are worked out together in a longer series: 100 kB, which stay in the processor's cache. */
const BLOCK = 2048;
/**
 * Points whose forward states are held at once: all of them, or in longer series a block, whose states are worked out again when they are needed, which is cheaper
 * than fresh memory for all.
 */
export function pointsHeld(n: number): number {
  return n <= WHOLE_POINTS ? n : BLOCK;
}

/** Fresh memory for the states would cost more than working them out. */
let scratch = new Float64Array(0);

/** A smoothed series: arrays in raw units, sums in scaled units. */
export interface SmoothedSeries {
  points: SmoothedPoints;
  edf: number;
  rss: number;
  penalty: number;
  logDelta: number;
  /** The state before the last point. */
  lastState: Float64Array;
}

/**
 * Forward and backward over a series, O(n). Of a long series the forward pass keeps the state before each block only, and each block's states are worked out again
 * just before the backward pass reaches it: the memory beyond the answer is n/BLOCK states and one block. No state outlives the call.
 * @returns undefined when the numbers leave the range of doubles
 */
export function smoothSeries(series: PreparedSeries, q: number): SmoothedSeries | undefined {
  const { n, gap, pull, r } = series;
  const size = pointsHeld(n);
  const blocks = Math.ceil(n / size);
  if (scratch.length < STATE_SIZE * size) scratch = new Float64Array(STATE_SIZE * size);
  const states = scratch;
  const starts = new Float64Array(STATE_SIZE * blocks);
  const state = new Float64Array(STATE_SIZE);
  let logDelta = 0;
  for (let block = 0; block < blocks; block++) {
    starts.set(state, STATE_SIZE * block);
    logDelta += filterRange(gap, pull, r, q, block * size, Math.min(n, (block + 1) * size), state, states);
  }
  const lastState = state.slice();
  const points = {
    fitted: new Float64Array(n),
    slope: new Float64Array(n),
    curvature: new Float64Array(n),
    standardError: new Float64Array(n),
    leverage: new Float64Array(n),
  };
  const later = new Float64Array(STATE_SIZE);
  const carry = { state: later, edf: 0, rss: 0, penalty: 0, value: 0, slope: 0, bend: 0, bendSize: 0 };
  for (let block = blocks - 1; block >= 0; block--) {
    const from = block * size;
    const to = Math.min(n, from + size);
    if (block < blocks - 1) {
      for (let j = 0; j < STATE_SIZE; j++) state[j] = starts[STATE_SIZE * block + j];
      filterRange(gap, pull, r, q, from, to, state, states);
    }
    if (!smoothBackward(series, q, from, to, states, carry, points)) return undefined;
  }
  const { edf, rss, penalty } = carry;
  return { points, edf, rss, penalty, logDelta, lastState };
}
