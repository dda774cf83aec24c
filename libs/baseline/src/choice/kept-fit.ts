import { BaselineError } from '../baseline-error';
import type { PreparedSeries } from '../prepared-series';
import { restrictedDeviance } from '../spline/restricted-likelihood';
import { fitPreparedSpline, type SmoothingSplineFit } from '../spline/smoothing-spline';
import { generalisedCrossValidation, type Candidate } from './criteria';
import type { PenaltyRule } from './exact-criterion';

/**
 * GCV and REML of whole fits, the last of which is kept: a search that evaluates the criterion exactly once has then made the fit of its choice as well. For many
 * penalties ExactCriterion does with less.
 */
export class KeptFit {
  private last: SmoothingSplineFit | undefined;

  constructor(
    private readonly series: PreparedSeries,
    private readonly rule: Exclude<PenaltyRule, { rule: 'lot-cv' }>,
  ) {}

  /** As ExactCriterion.evaluate. */
  evaluate(lambda: number): Candidate {
    try {
      this.last = fitPreparedSpline(this.series, lambda);
      const value = this.criterion(this.last);
      if (!Number.isNaN(value)) return { smoothness: lambda, edf: this.last.edf, value };
    } catch (error) {
      if (!(error instanceof BaselineError && error.code === 'ill-posed')) throw error;
    }
    return { smoothness: lambda, edf: NaN, value: Infinity };
  }

  /** The fit at a penalty: the kept one, if it is that of this penalty. */
  at(lambda: number): SmoothingSplineFit {
    return this.last?.lambda === lambda ? this.last : fitPreparedSpline(this.series, lambda);
  }

  private criterion(fit: SmoothingSplineFit): number {
    const { rule } = this;
    const { edf, pullCount, weightedRss, penalty, lambda } = fit;
    if (rule.rule === 'gcv') return generalisedCrossValidation(pullCount, weightedRss, edf, rule.inflation);
    const prss = weightedRss + (penalty > 0 ? lambda * penalty : 0);
    return restrictedDeviance(pullCount, prss, fit.restrictedDeviance - prss)[rule.variance];
  }
}
