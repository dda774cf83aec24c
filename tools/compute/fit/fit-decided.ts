import { fitBaseline, fitRobust, type BaselineFit, type BaselineSpec } from '@app/baseline';
import { lotWords } from '../answer/lot-words';
import type { ArrangedSeries } from '../series/arranged';

export interface FittedSeries {
  fit: BaselineFit;
  /** The series with its lots' factors, as the fit saw it. */
  series: ArrangedSeries;
  /** By engine lot, with --robust. */
  factor?: Float64Array;
  warnings: string[];
}

/** Fits what was decided; with --robust reweights lots at that smoothness. @throws BaselineError */
export function fitDecided(series: ArrangedSeries, spec: BaselineSpec, isRobust: boolean): FittedSeries {
  if (!isRobust) return { fit: fitBaseline(series.obs, spec), series, warnings: [] };
  const { fit, factor, setDown, kept, passes, hasConverged, scale } = fitRobust(series.obs, spec);
  const pulls = Float64Array.from(series.obs.pulls, (pull, lot) => pull * factor[lot]);
  const warnings: string[] = [];
  if (setDown.length > 0)
    warnings.push(`--robust set down ${lotWords(series, setDown)}: they do not pull the baseline`);
  if (kept.length > 0)
    warnings.push(`--robust kept ${lotWords(series, kept)} in full: without them the others determine no baseline`);
  if (!hasConverged) warnings.push(`--robust had not come to rest after ${passes} refits; the last one is answered`);
  if (scale === 0) warnings.push('--robust reweighted nothing: more than half of the lots lie on the baseline');
  return { fit, series: { ...series, obs: { ...series.obs, pulls } }, factor, warnings };
}
