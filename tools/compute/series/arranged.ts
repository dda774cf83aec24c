import type { Observations } from '@app/baseline';
import { InputError } from '../input-error';
import type { Series } from './series';

/**
 * A series as the engine takes it: in time order, with one engine lot a named lot (or a row, where there is no column lot), then one lot of
 * its own, which does not pull, for each row of weight 0.
 */
export interface ArrangedSeries {
  obs: Observations;
  /** Row of each point. */
  rowOf: Int32Array;
  /** Engine lot to which the row of each point belongs by name, also when its weight is 0; -1 for a row of weight 0 without a lot. */
  homeLot: Int32Array;
  /** Engine lots that stand for a name (or a row): 0 .. homeCount - 1, in the order of their first points. */
  homeCount: number;
  /** Names by engine lot; empty where there is no column lot. */
  lotNames: string[];
}

/** @throws InputError when nothing pulls */
export function arrange(series: Series): ArrangedSeries {
  const { t, y, w } = series;
  const n = t.length;
  const rowOf = timeOrder(t);
  const { homeLot, homeCount, lotNames } = series.lot ? named(series, rowOf) : unnamed(w, rowOf);
  const lot = new Int32Array(n);
  let lotCount = homeCount;
  for (let i = 0; i < n; i++) lot[i] = w[rowOf[i]] > 0 ? homeLot[i] : lotCount++;
  if (lotCount === homeCount + n)
    throw new InputError(n === 0 ? 'there are no rows below the header' : 'every row has weight 0');
  const obs: Observations = {
    t: Float64Array.from(rowOf, (row) => t[row]),
    y: Float64Array.from(rowOf, (row) => y[row]),
    weight: Float64Array.from(rowOf, (row) => (w[row] > 0 ? w[row] : 1)),
    lot,
    pulls: new Float64Array(lotCount).fill(1, 0, homeCount),
  };
  return { obs, rowOf, homeLot, homeCount, lotNames };
}

/** Rows by time; rows of the same time in the order of the file. */
function timeOrder(t: Float64Array): Int32Array {
  const rows = Int32Array.from(t, (_, i) => i);
  let isInOrder = true;
  for (let i = 1; i < t.length && isInOrder; i++) isInOrder = t[i] >= t[i - 1];
  return isInOrder ? rows : rows.sort((a, b) => t[a] - t[b] || a - b);
}

type Homes = Pick<ArrangedSeries, 'homeLot' | 'homeCount' | 'lotNames'>;

function named(series: Series, rowOf: Int32Array): Homes {
  const place = new Int32Array(series.lotNames.length).fill(-1);
  const lotNames: string[] = [];
  const homeLot = new Int32Array(rowOf.length);
  for (let i = 0; i < rowOf.length; i++) {
    const lot = series.lot![rowOf[i]];
    if (place[lot] < 0) place[lot] = lotNames.push(series.lotNames[lot]) - 1;
    homeLot[i] = place[lot];
  }
  return { homeLot, homeCount: lotNames.length, lotNames };
}

function unnamed(w: Float64Array, rowOf: Int32Array): Homes {
  let homeCount = 0;
  const homeLot = Int32Array.from(rowOf, (row) => (w[row] > 0 ? homeCount++ : -1));
  return { homeLot, homeCount, lotNames: [] };
}
