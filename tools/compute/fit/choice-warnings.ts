import type { Candidate, ChosenBaseline, SmoothnessBound } from '@app/baseline';
import type { FitOptions } from '../options/fit-options';
import { LINE_BY_PERIOD } from './given-lambda';
import { sizeName } from './size-name';
import type { WeighingRows } from './weighing-rows';

const BOUND: Record<SmoothnessBound, string> = {
  interpolation: 'it is smallest where the baseline passes through nearly every row',
  line: 'it is smallest at the straight line',
  'no-knots': 'it is smallest without interior knots',
  'most-knots': 'it is smallest with as many knots as are tried',
  'highest-degree': 'it is smallest at the highest degree that is tried',
};

/** Four digits are enough to find a place on the curve. */
const short = (value: number): string => String(Number(value.toPrecision(4)));

/** Places that stand in one warning. */
const MOST_PLACES = 4;

/** How the choice came about, where that is worth knowing. */
export function choiceWarnings(
  chosen: ChosenBaseline,
  { shortestPeriod }: FitOptions,
  { window }: WeighingRows,
): string[] {
  const { rule, isAtFloor, isAtBound, minima, oneStandardError, edf } = chosen;
  if (shortestPeriod !== undefined && shortestPeriod > window) return [LINE_BY_PERIOD];
  const warnings: string[] = [];
  if (isAtFloor)
    warnings.push(
      rule === 'edf'
        ? `--edf is faster than --shortest-period ${shortestPeriod} allows: the baseline has ${short(edf)} effective degrees of freedom`
        : `The floor of --shortest-period ${shortestPeriod} decided: ${rule} alone would follow faster movements`,
    );
  if (isAtBound !== null && oneStandardError === undefined)
    warnings.push(`${rule} has no minimum inside the range that is searched: ${BOUND[isAtBound]}`);
  if (minima.length > 1) {
    const places = [...minima].sort((a, b) => a.value - b.value).map((minimum) => place(chosen, minimum));
    const more = places.length > MOST_PLACES ? ` and ${places.length - MOST_PLACES} more` : '';
    warnings.push(
      `${rule} has ${minima.length} minima, from the smallest on at ${places.slice(0, MOST_PLACES).join(', ')}${more}`,
    );
  }
  if (oneStandardError !== undefined)
    warnings.push(
      `The smallest ${rule} is at ${place(chosen, oneStandardError)}, with a standard error of ${short(oneStandardError.standardError)}; the smoothest within that was taken`,
    );
  return warnings;
}

const place = ({ spec }: ChosenBaseline, { smoothness, edf }: Candidate): string =>
  `${sizeName(spec.method)} ${short(smoothness)} (edf ${short(edf)})`;
