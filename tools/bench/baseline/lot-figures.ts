import { longSeries } from '../../../libs/baseline/src/testing/long-series';
import { measure } from './clock';
import { fitAndScore, fixedLambda } from './ours';
import { inLots } from './series';

const LOTS = 360;
const POINTS_PER_LOT = 16;

export interface LotFigures {
  points: number;
  lots: number;
  /** Medians, s: fit and scores with every point its own lot, with lots of neighbours, and with lots that each cover the whole window. */
  single: number;
  contiguous: number;
  interleaved: number;
}

/** What lots of many points cost: 360 lots of 16 points, contiguous in time and all interleaved over the whole window. */
export function measureLots(repeats: number): LotFigures {
  const points = LOTS * POINTS_PER_LOT;
  const single = longSeries(points);
  const lambda = fixedLambda(single);
  const contiguous = inLots(single, LOTS, (i) => Math.floor(i / POINTS_PER_LOT));
  const interleaved = inLots(single, LOTS, (i) => i % LOTS);
  const [a, b, c] = [single, contiguous, interleaved].map(
    (series) => measure(repeats, () => fitAndScore(series, lambda)).median,
  );
  return { points, lots: LOTS, single: a, contiguous: b, interleaved: c };
}
