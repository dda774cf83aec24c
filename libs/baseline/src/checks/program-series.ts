import type { Observations } from '../observations';
import { reference } from '../testing/reference';

/** Series of fixtures/reference with what R's smooth.spline(all.knots = TRUE) makes of them. */
export interface RSeries {
  x: number[];
  y: number[];
  w: number[];
  fits: RFit[];
  choices: RChoice[];
  defaultDf: number;
}
export interface RFit {
  lambda: number;
  df: number;
  weightedRss: number;
  fitted: number[];
  slope: number[];
  leverage: number[];
}
/** What R chose: by leave-one-out (of the mean at each time) or by GCV, and the value that it minimised. */
export interface RChoice {
  cv: boolean;
  lambda: number;
  df: number;
  crit: number;
}

export const sum = (x: ArrayLike<number>): number => Array.from(x).reduce((a, b) => a + b, 0);

export const rSeries = (): [string, RSeries][] =>
  Object.entries(reference<{ series: Record<string, RSeries> }>('r-smooth-spline.json').series);

/** Points that share a time are one lot; weights are scaled to a mean of 1, as R does. */
export function byTime(x: number[], y: number[], w: number[]): Observations {
  const times = [...new Set(x)];
  return {
    t: Float64Array.from(x),
    y: Float64Array.from(y),
    weight: Float64Array.from(w, (v) => (v * w.length) / sum(w)),
    lot: Int32Array.from(x, (v) => times.indexOf(v)),
    pulls: new Uint8Array(times.length).fill(1),
  };
}
