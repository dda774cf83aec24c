import type { FitOptions } from '../options/fit-options';
import type { ArrangedSeries } from '../series/arranged';

/** With a shorter period a baseline begins to follow single lots: it takes a lot's own shift for a movement. */
const FEWEST_SPACINGS = 22;

/** Warns of a shortest period that is short against the lots' spacing: the median time from one lot's mean time to the next one's. */
export function spacingWarnings(
  { obs, homeCount, lotNames }: ArrangedSeries,
  { shortestPeriod }: FitOptions,
): string[] {
  if (shortestPeriod === undefined) return [];
  const sum = new Float64Array(homeCount);
  const count = new Float64Array(homeCount);
  for (let i = 0; i < obs.t.length; i++) {
    if (obs.lot[i] >= homeCount) continue;
    sum[obs.lot[i]] += obs.t[i] - obs.t[0];
    count[obs.lot[i]]++;
  }
  const means = sum
    .map((total, lot) => total / count[lot])
    .filter(Number.isFinite)
    .sort();
  const spacings = means
    .subarray(1)
    .map((at, i) => at - means[i])
    .sort();
  if (spacings.length === 0) return [];
  const median = 0.5 * (spacings[(spacings.length - 1) >> 1] + spacings[spacings.length >> 1]);
  if (!(shortestPeriod < FEWEST_SPACINGS * median)) return [];
  const words = lotNames.length > 0 ? 'lots' : 'rows';
  return [
    `--shortest-period ${shortestPeriod} is ${Number((shortestPeriod / median).toPrecision(2))} times the median spacing of ${words}: below ${FEWEST_SPACINGS} a baseline follows single ${words}`,
  ];
}
