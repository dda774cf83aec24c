import type { BaselineFit } from '@app/baseline';
import type { ArrangedSeries } from '../series/arranged';

/** Residuals that are smaller than this share of the readings, in squares, are their rounding. */
const ROUNDING_SHARE = 1e-28;
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

/** Whether the residuals are only the rounding of the readings: their ratio to a standard error says nothing. */
export function isRounding({ obs }: ArrangedSeries, { weightedRss }: BaselineFit): boolean {
  let squares = 0;
  for (let i = 0; i < obs.y.length; i++) squares += obs.weight[i] * obs.pulls[obs.lot[i]] * obs.y[i] ** 2;
  return weightedRss <= ROUNDING_SHARE * squares;
}
