import { decideSmoothness } from '../fit/decide-smoothness';
import { fitDecided } from '../fit/fit-decided';
import { weighingRows } from '../fit/weighing-rows';
import type { FitOptions } from '../options/fit-options';
import { arrange } from '../series/arranged';
import type { Series } from '../series/series';
import type { Answer } from './answer';
import { deletedResiduals } from './deleted-residuals';
import { fitWarnings, timeWarnings, varianceWarnings } from './fit-warnings';
import { lotAnswers } from './lot-answers';
import { project, projectionTimes } from './projection';
import { spacingWarnings } from './spacing-warnings';
import { isRounding, residualVariance } from './residual-variance';

/** Fits a series as the options ask. @throws InputError, BaselineError */
export function answerFit(series: Series, options: FitOptions): Answer {
  const arranged = arrange(series);
  const times = projectionTimes(series, options);
  const decided = decideSmoothness(arranged, weighingRows(arranged), options);
  const { fit, series: pulled, factor, warnings } = fitDecided(arranged, decided.spec, options.isRobust);
  const sigma2 = residualVariance(pulled, fit);
  const isExact = isRounding(pulled, fit);
  const scores = fit.scoreLots();
  const deleted = deletedResiduals(pulled, fit, scores);
  const inRows = (values: Float64Array, factor = 1) => {
    const rows = new Float64Array(values.length);
    for (let i = 0; i < values.length; i++) rows[arranged.rowOf[i]] = values[i] * factor;
    return rows;
  };
  const { spec } = fit;
  return {
    method: options.method,
    smoothness: {
      rule: decided.rule,
      value: decided.value,
      lambda: spec.method === 'smoothing-spline' && spec.lambda < Infinity ? spec.lambda : null,
      edf: fit.edf,
      atFloor: decided.isAtFloor,
    },
    sigma2: Number.isNaN(sigma2) ? null : sigma2,
    criterion: decided.criterion,
    t: series.t,
    fitted: inRows(fit.fitted),
    standardError: inRows(fit.standardError, Math.sqrt(sigma2)),
    leverage: inRows(fit.leverage),
    deletedResidual: inRows(deleted),
    lots: lotAnswers(arranged, scores, deleted, { sigma2, factor, isRounding: isExact }),
    projection: project(fit, times.t, sigma2, options),
    warnings: [
      ...timeWarnings(series, times.isZoneless),
      ...decided.warnings,
      ...warnings,
      ...fitWarnings(arranged, fit, scores),
      ...varianceWarnings(sigma2, isExact),
      ...spacingWarnings(arranged, options),
    ],
  };
}
