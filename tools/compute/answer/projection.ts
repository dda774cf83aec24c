import { BaselineError, type BaselineFit } from '@app/baseline';
import { InputError, quoted } from '../input-error';
import type { FitOptions } from '../options/fit-options';
import { parseTime } from '../series/parse-time';
import type { Series } from '../series/series';
import type { ProjectionAnswer } from './answer';

/**
 * The times of --project in seconds.
 * @throws InputError for what is not a time of the kind that the column t has, and for times further from the record than the shortest period
 */
export function projectionTimes(
  series: Series,
  { project, shortestPeriod = Infinity }: FitOptions,
): { t: number[]; isZoneless: boolean } {
  let [oldest, newest] = [Infinity, -Infinity];
  for (const t of series.t) {
    oldest = Math.min(oldest, t);
    newest = Math.max(newest, t);
  }
  const times = project.map((text) => {
    const time = parseTime(text);
    if (time === undefined)
      throw new InputError(`--project is neither a number nor an ISO time that exists: ${quoted(text)}`);
    if (time.kind !== series.timeKind)
      throw new InputError(
        `--project ${quoted(text)} is not of the kind that column t has: ${series.timeKind === 'iso' ? 'ISO times' : 'numbers'}`,
      );
    if (time.seconds > newest + shortestPeriod || time.seconds < oldest - shortestPeriod)
      throw new InputError(`--project ${text} lies further from the record than --shortest-period ${shortestPeriod}`);
    return time;
  });
  return { t: times.map(({ seconds }) => seconds), isZoneless: times.some(({ isZoneless }) => isZoneless) };
}

/** @throws InputError for a time beyond the record of a method that runs away there */
export function project(
  fit: BaselineFit,
  times: readonly number[],
  sigma2: number,
  { method }: FitOptions,
): ProjectionAnswer[] {
  return times.map((t) => {
    try {
      const { value, standardError } = fit.at(t);
      const scaled = Math.sqrt(sigma2) * standardError;
      return { t, value, standardError: Number.isFinite(scaled) ? scaled : null };
    } catch (error) {
      if (!(error instanceof BaselineError && error.code === 'no-projection')) throw error;
      throw new InputError(
        `--project ${t} lies beyond the record, where --method ${method} runs away: use natural-spline or smoothing-spline`,
      );
    }
  });
}
