import type { FitOptions } from '../options/fit-options';
import type { ArrangedSeries } from '../series/arranged';
import { chooseSmoothness } from './choose-smoothness';
import { NOTHING_CHOSEN, type DecidedSmoothness } from './decided-smoothness';
import { givenDegree } from './given-degree';
import { givenKnots } from './given-knots';
import { givenLambda } from './given-lambda';
import type { WeighingRows } from './weighing-rows';

/** What is fitted: as given, or as chosen by a criterion. @throws InputError, BaselineError */
export function decideSmoothness(series: ArrangedSeries, rows: WeighingRows, options: FitOptions): DecidedSmoothness {
  const { smoothness } = options;
  switch (smoothness.rule) {
    case 'none':
      return {
        spec: { method: 'constant' },
        rule: 'none',
        value: null,
        isAtFloor: false,
        criterion: NOTHING_CHOSEN,
        warnings: [],
      };
    case 'lambda':
      return givenLambda(rows, smoothness.lambda, options.shortestPeriod);
    case 'knots':
      return givenKnots(series, rows, smoothness.count, options);
    case 'degree':
      return givenDegree(rows, smoothness.degree, options.shortestPeriod);
    default:
      return chooseSmoothness(series, rows, options, smoothness);
  }
}
