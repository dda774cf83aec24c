import { BaselineError, chooseBaseline, type ChooseBaselineOptions, type ChosenBaseline } from '@app/baseline';
import { InputError } from '../input-error';
import type { FitOptions, Smoothness } from '../options/fit-options';
import type { ArrangedSeries } from '../series/arranged';
import { choiceWarnings } from './choice-warnings';
import { NOTHING_CHOSEN, type DecidedSmoothness } from './decided-smoothness';
import { floorLambda } from './given-lambda';
import { sizeName } from './size-name';
import type { WeighingRows } from './weighing-rows';

type Chooser = Extract<Smoothness, { rule: 'edf' } | { isOneStandardError: boolean }>;

/** Chosen by a criterion, or found for degrees of freedom. @throws InputError naming --edf, BaselineError */
export function chooseSmoothness(
  series: ArrangedSeries,
  rows: WeighingRows,
  options: FitOptions,
  chooser: Chooser,
): DecidedSmoothness {
  const chosen = choose(series, engineOptions(rows, options, chooser), chooser);
  const { spec, smoothness, criterion, isAtFloor } = chosen;
  const isEdf = chooser.rule === 'edf';
  const size = sizeName(spec.method);
  return {
    spec,
    rule: chooser.rule,
    value: isEdf ? chooser.edf : finite(smoothness),
    isAtFloor,
    criterion: isEdf
      ? NOTHING_CHOSEN
      : {
          name: criterion.name,
          value: criterion.value,
          curve: criterion.curve.map(({ smoothness: at, edf, value }) => ({ [size]: at, edf, value })),
        },
    warnings: choiceWarnings(chosen, options, rows),
  };
}

/**
 * The engine counts the weight of every point for the density of weight; rows of weight 0, which stand there with a weight of 1 in lots that do not pull, take no part
 * in ours: the floor of lambda is computed here.
 */
function engineOptions(rows: WeighingRows, options: FitOptions, chooser: Chooser): ChooseBaselineOptions {
  const { method, placement, shortestPeriod } = options;
  const isSpline = method === 'smoothing-spline';
  const hasFloor = isSpline && shortestPeriod !== undefined && shortestPeriod <= rows.window;
  return {
    method,
    rule: chooser.rule,
    ...(chooser.rule === 'edf' ? { edf: chooser.edf } : { hasOneStandardError: chooser.isOneStandardError }),
    ...(hasFloor
      ? { floorLambda: floorLambda(rows, shortestPeriod) }
      : shortestPeriod === undefined
        ? {}
        : { shortestPeriodSeconds: shortestPeriod }),
    placement,
    remlVariance: 'estimated',
  };
}

function choose({ obs }: ArrangedSeries, options: ChooseBaselineOptions, chooser: Chooser): ChosenBaseline {
  try {
    return chooseBaseline(obs, options);
  } catch (error) {
    if (chooser.rule !== 'edf' || !(error instanceof BaselineError && error.code === 'bad-argument')) throw error;
    throw new InputError(`--edf ${chooser.edf}: ${error.message}`);
  }
}

const finite = (value: number): number | null => (Number.isFinite(value) ? value : null);
