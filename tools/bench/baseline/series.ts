import type { Observations } from '@app/baseline';

/** The same points in other lots, all of which pull. */
export function inLots(points: Observations, lotCount: number, lotOf: (point: number) => number): Observations {
  const lot = Int32Array.from(points.t, (_, i) => lotOf(i));
  return { ...points, lot, pulls: new Uint8Array(lotCount).fill(1) };
}
