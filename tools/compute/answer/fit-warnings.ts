import type { BaselineFit, LotScores } from '@app/baseline';
import type { ArrangedSeries } from '../series/arranged';
import type { Series } from '../series/series';
import { lotWords } from './lot-words';

/** With fewer lots, or fewer a degree of freedom, leaving one out says little. */
const FEWEST_LOTS = 8;
const LOTS_PER_DEGREE = 3;

/** What should be known about the times and about the fit as it came out. */
export function fitWarnings(series: ArrangedSeries, fit: BaselineFit, scores: LotScores): string[] {
  const warnings: string[] = [];
  const { homeCount, lotNames } = series;
  const pullingLots = new Set(series.obs.lot.filter((lot) => lot < homeCount)).size;
  const word = lotNames.length > 0 ? 'lots' : 'rows';
  const least = Math.max(FEWEST_LOTS, LOTS_PER_DEGREE * fit.edf);
  if (pullingLots < least)
    warnings.push(
      `${pullingLots} ${word} are few for ${Number(fit.edf.toPrecision(4))} effective degrees of freedom: with fewer than ${FEWEST_LOTS}, or than three for each, scores say little`,
    );
  const undetermined = scores.undetermined.filter((lot) => lot < homeCount);
  if (undetermined.length > 0)
    warnings.push(
      `Without ${lotWords(series, undetermined)} the others determine no baseline: deletedResidual is null there`,
    );
  return warnings;
}

export function varianceWarnings(sigma2: number, isRounding: boolean): string[] {
  if (Number.isNaN(sigma2))
    return ['The baseline passes through every row: sigma2, standardError and whatever is made from them are null'];
  return isRounding ? ['The rows lie on the baseline but for rounding: scores are null'] : [];
}

export function timeWarnings({ zonelessCount }: Series, isProjectionZoneless: boolean): string[] {
  const warnings: string[] = [];
  if (zonelessCount > 0)
    warnings.push(`${zonelessCount} ${zonelessCount === 1 ? 'time has' : 'times have'} no zone: read as UTC`);
  if (isProjectionZoneless) warnings.push('A time of --project has no zone: read as UTC');
  return warnings;
}
