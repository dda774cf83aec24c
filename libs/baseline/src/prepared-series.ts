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

/** Checks the observations, takes off the weighted straight line, scales time and weight, and sorts the points by lot. */
export function prepareSeries(obs: Observations): PreparedSeries {
  checkObservations(obs);
  const { t, y, weight, lot, pulls } = obs;
  const n = t.length;
  const timeScale = t[n - 1] - t[0];
  let totalWeight = 0;
  let pullCount = 0;
  let st = 0;
  let sy = 0;
  for (let i = 0; i < n; i++) {
    const w = weight[i] * pulls[lot[i]];
    if (w === 0) continue;
    pullCount++;
    totalWeight += w;
    st += w * ((t[i] - t[0]) / timeScale);
    sy += w * y[i];
  }
  const u0 = st / totalWeight;
  const lineLevel = sy / totalWeight;
  let suu = 0;
  let suy = 0;
  for (let i = 0; i < n; i++) {
    const w = weight[i] * pulls[lot[i]];
    if (w === 0) continue;
    const u = (t[i] - t[0]) / timeScale - u0;
    suu += w * u * u;
    suy += w * u * (y[i] - lineLevel);
  }
  const slope = suu > 0 ? suy / suu : 0;
  const weightScale = totalWeight / pullCount;
  const gap = new Float64Array(n);
  const pull = new Float64Array(n);
  const r = new Float64Array(n);
  let lineRss = 0;
  let sumSquares = 0;
  for (let i = 0; i < n; i++) {
    if (i + 1 < n) gap[i] = (t[i + 1] - t[i]) / timeScale;
    r[i] = y[i] - lineLevel - slope * ((t[i] - t[0]) / timeScale - u0);
    const w = weight[i] * pulls[lot[i]];
    if (w === 0) continue;
    pull[i] = w / weightScale;
    lineRss += w * r[i] * r[i];
    sumSquares += w * y[i] * y[i];
  }
  if (!Number.isFinite(timeScale + weightScale + lineRss + sumSquares)) {
    throw new BaselineError('ill-posed', 'Times, values or weights are so large that sums over them overflow.');
  }
  const { pointsByLot, lotStart } = sortByLot(lot, pulls.length);
  const lineSlope = slope / timeScale;
  const lineTime = u0 * timeScale;
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
    lineSlope,
    lineTime,
    lineRss,
    sumSquares,
    pointsByLot,
    lotStart,
  };
}

function sortByLot(lot: Int32Array, lotCount: number): { pointsByLot: Int32Array; lotStart: Int32Array } {
  const lotStart = new Int32Array(lotCount + 1);
  for (let i = 0; i < lot.length; i++) lotStart[lot[i] + 1]++;
  for (let j = 0; j < lotCount; j++) lotStart[j + 1] += lotStart[j];
  const next = lotStart.slice(0, lotCount);
  const pointsByLot = new Int32Array(lot.length);
  for (let i = 0; i < lot.length; i++) pointsByLot[next[lot[i]]++] = i;
  return { pointsByLot, lotStart };
}
