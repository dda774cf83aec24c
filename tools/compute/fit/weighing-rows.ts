import type { ArrangedSeries } from '../series/arranged';

/** The rows that weigh, as the shortest drift period sees them. */
export interface WeighingRows {
  t: Float64Array;
  weight: Float64Array;
  /** From the first to the last, s. */
  window: number;
  distinctTimes: number;
}

export function weighingRows({ obs }: ArrangedSeries): WeighingRows {
  const isWeighing = (_: number, i: number) => obs.pulls[obs.lot[i]] > 0;
  const t = obs.t.filter(isWeighing);
  return {
    t,
    weight: obs.weight.filter(isWeighing),
    window: t[t.length - 1] - t[0],
    distinctTimes: t.reduce((count, at, i) => count + (i === 0 || at > t[i - 1] ? 1 : 0), 0),
  };
}
