import { BaselineError } from './baseline-error';
import { checkObservations, type Observations } from './observations';

/** Checked, scaled observations: what every smoothness shares. Time runs from 0 to 1, the mean pulling weight is 1. */
export interface PreparedSeries {
  readonly obs: Observations;
  readonly n: number;
  /** t[i+1] - t[i] over the range, formed from the raw stamps (length n; the last is 0). */
  readonly gap: Float64Array;
  /** Scaled weight in the fit (weight times its lot's factor); 0 for points of lots that do not pull. */
  readonly pull: Float64Array;
  /** Value minus the weighted straight line. */
  readonly r: Float64Array;
  readonly timeScale: number;
  readonly weightScale: number;
  /** Sum of the pulling points' raw weights times their lots' factors, and their number. */
  readonly totalWeight: number;
  readonly pullCount: number;
  /** The line that was taken off: level at lineTime (s) and slope (1/s). */
  readonly lineLevel: number;
  readonly lineSlope: number;
  readonly lineTime: number;
  /** Sum w r^2 (raw weights) of the weighted straight line, and sum w y^2. */
  readonly lineRss: number;
  readonly sumSquares: number;
  /** Points by lot: lot j has pointsByLot[lotStart[j]] .. pointsByLot[lotStart[j+1]-1], in time order. */
  readonly pointsByLot: Int32Array;
  readonly lotStart: Int32Array;
}

/** Ranges of time and mean weights up to this, and down to its inverse, keep their cubes, quotients and products within the range of doubles. */
const EXTREME = 1e100;

/**
 * Checks the observations, takes off the weighted straight line, scales time and weight. The order by lot is worked out when it is first asked for.
 * @throws BaselineError as checkObservations; 'ill-posed' when sums overflow, or the range of time or the mean weight is beyond 1e-100 .. 1e100
 */
export function prepareSeries(obs: Observations): PreparedSeries {
  checkObservations(obs);
  const { t, y, weight, lot, pulls } = obs;
  const n = t.length;
  const origin = t[0];
  const timeScale = t[n - 1] - origin;
  const perTime = 1 / timeScale;
  const gap = new Float64Array(n);
  const pull = new Float64Array(n);
  const r = new Float64Array(n);
  let totalWeight = 0;
  let pullCount = 0;
  let st = 0;
  let sy = 0;
  for (let i = 0; i < n; i++) {
    const w = weight[i] * pulls[lot[i]];
    pull[i] = w;
    if (w === 0) continue;
    pullCount++;
    totalWeight += w;
    st += w * ((t[i] - origin) * perTime);
    sy += w * y[i];
  }
  const u0 = st / totalWeight;
  const lineLevel = sy / totalWeight;
  let suu = 0;
  let suy = 0;
  for (let i = 0; i < n; i++) {
    const u = (t[i] - origin) * perTime - u0;
    const wu = pull[i] * u;
    suu += wu * u;
    suy += wu * (y[i] - lineLevel);
  }
  const slope = suu > 0 ? suy / suu : 0;
  const weightScale = totalWeight / pullCount;
  const perWeight = 1 / weightScale;
  let lineRss = 0;
  let sumSquares = 0;
  for (let i = 0; i < n; i++) {
    const v = y[i] - lineLevel - slope * ((t[i] - origin) * perTime - u0);
    const w = pull[i];
    lineRss += w * v * v;
    sumSquares += w * y[i] * y[i];
    r[i] = v;
    pull[i] = w * perWeight;
    if (i > 0) gap[i - 1] = (t[i] - t[i - 1]) * perTime;
  }
  if (!Number.isFinite(timeScale + weightScale + lineRss + sumSquares)) {
    throw new BaselineError('ill-posed', 'Times, values or weights are so large that sums over them overflow.');
  }
  if (!(isModerate(timeScale) && isModerate(weightScale))) {
    throw new BaselineError(
      'ill-posed',
      `Times over ${timeScale} with a mean weight of ${weightScale} leave no digits.`,
    );
  }
  let byLot: LotOrder | undefined;
  return {
    obs,
    n,
    gap,
    pull,
    r,
    timeScale,
    weightScale,
    totalWeight,
    pullCount,
    lineLevel,
    lineSlope: slope / timeScale,
    lineTime: u0 * timeScale,
    lineRss,
    sumSquares,
    get pointsByLot() {
      return (byLot ??= sortByLot(lot, pulls.length)).pointsByLot;
    },
    get lotStart() {
      return (byLot ??= sortByLot(lot, pulls.length)).lotStart;
    },
  };
}

function isModerate(x: number): boolean {
  return x < EXTREME && x > 1 / EXTREME;
}

type LotOrder = Pick<PreparedSeries, 'pointsByLot' | 'lotStart'>;

function sortByLot(lot: Int32Array, lotCount: number): LotOrder {
  // Counts go in two places late: sums then make start[j + 1] the start of lot j, and moving each along its points makes it the end, the next lot's start.
  const start = new Int32Array(lotCount + 2);
  for (let i = 0; i < lot.length; i++) start[lot[i] + 2]++;
  for (let j = 1; j <= lotCount; j++) start[j + 1] += start[j];
  const pointsByLot = new Int32Array(lot.length);
  for (let i = 0; i < lot.length; i++) pointsByLot[start[lot[i] + 1]++] = i;
  return { pointsByLot, lotStart: start.subarray(0, lotCount + 1) };
}
