import type { Observations } from '@app/baseline';

import { nominalOf, pointWeight, whyUnusable } from './lot-values';
import type { LotOnChannel, VarianceComponents } from './types';

/** All usable points of a segment in time order. `lot` is the index in the list of lots that they were made from. */
export interface SegmentPoints {
  t: Float64Array;
  /** Deviation from nominal, unit. */
  y: Float64Array;
  weight: Float64Array;
  count: Float64Array;
  lot: Int32Array;
}

/** Points of the lots that can take part in a fit, by time and, where times are equal, by the lots' order. */
export function segmentPoints(
  lots: readonly LotOnChannel[],
  components: VarianceComponents,
  fallbackNominal: number,
): SegmentPoints {
  const rows: { at: number; y: number; weight: number; count: number; lot: number }[] = [];
  lots.forEach((lot, index) => {
    if (whyUnusable(lot) !== null) return;
    const nominal = nominalOf(lot, fallbackNominal);
    for (const { at, mean, count } of lot.points)
      rows.push({
        at,
        y: mean - nominal,
        weight: pointWeight(components, lot.points.length, count),
        count,
        lot: index,
      });
  });
  rows.sort((a, b) => a.at - b.at || a.lot - b.lot);
  return {
    t: Float64Array.from(rows, (row) => row.at),
    y: Float64Array.from(rows, (row) => row.y),
    weight: Float64Array.from(rows, (row) => row.weight),
    count: Float64Array.from(rows, (row) => row.count),
    lot: Int32Array.from(rows, (row) => row.lot),
  };
}

/** A choice of the lots as observations of their own, with the lots numbered afresh. */
export interface ChosenPoints {
  observations: Observations;
  count: Float64Array;
  /** Index among the chosen → index in the segment. */
  lots: Int32Array;
  /** Index in the segment → index among the chosen, −1 when not chosen. */
  place: Int32Array;
}

/**
 * @param pulls per lot of the segment, 1 when it pulls
 * @param isChosen per lot of the segment
 */
export function choosePoints(
  points: SegmentPoints,
  lotCount: number,
  isChosen: (lot: number) => boolean,
  pulls: Uint8Array,
): ChosenPoints {
  const place = new Int32Array(lotCount).fill(-1);
  const lots: number[] = [];
  const kept = new Int32Array(points.t.length);
  let size = 0;
  for (let i = 0; i < points.t.length; i += 1) {
    const lot = points.lot[i];
    if (place[lot] < 0) {
      if (!isChosen(lot)) continue;
      place[lot] = lots.push(lot) - 1;
    }
    kept[size] = i;
    size += 1;
  }
  const pick = (from: Float64Array) => {
    const to = new Float64Array(size);
    for (let k = 0; k < size; k += 1) to[k] = from[kept[k]];
    return to;
  };
  const lot = new Int32Array(size);
  for (let k = 0; k < size; k += 1) lot[k] = place[points.lot[kept[k]]];
  return {
    observations: {
      t: pick(points.t),
      y: pick(points.y),
      weight: pick(points.weight),
      lot,
      pulls: Uint8Array.from(lots, (index) => pulls[index]),
    },
    count: pick(points.count),
    lots: Int32Array.from(lots),
    place,
  };
}
