import type { BaselineFit } from '@app/baseline';
import type { ArrangedSeries } from '../series/arranged';

/** Fewer degrees of freedom than this share of the rows are the rounding of tr S. */
const DIGITLESS_SHARE = 1e-8;

/**
 * sigma^2 = RSS / (N - edf), RSS = sum w v (y - g)^2 and N = sum v over the rows that weigh, v their lots' factors (1 without --robust: N is then the
 * number of those rows, and rows at one time count one by one).
 * @returns NaN when N - edf has no digits: the baseline passes through every row
 */
export function residualVariance({ obs }: ArrangedSeries, { weightedRss, edf }: BaselineFit): number {
  let count = 0;
  for (const lot of obs.lot) count += obs.pulls[lot];
  const rest = count - edf;
  return rest > DIGITLESS_SHARE * count ? weightedRss / rest : NaN;
}
