import { BaselineError } from '../baseline-error';
import type { PreparedSeries } from '../prepared-series';
import { LambdaEvaluator } from '../spline/lambda-evaluator';
import { generalisedCrossValidation, meanOfTerms, type Candidate, type LotCriterion } from './criteria';

/** A criterion for the smoothing spline's penalty. */
export type PenaltyRule =
  | { readonly rule: 'lot-cv' }
  /** inflation: gamma, >= 1. */
  | { readonly rule: 'gcv'; readonly inflation: number }
  /** variance 'known': sigma^2 = 1, since the weights are absolute. */
  | { readonly rule: 'reml'; readonly variance: 'known' | 'estimated' };

/** The criteria at a penalty, exactly, O(n) a call (plus, for lots that interleave, the spans they cover), in buffers that are made once. */
export class ExactCriterion {
  private readonly spline: LambdaEvaluator;
  private terms = new Float64Array(0);

  constructor(private readonly series: PreparedSeries) {
    this.spline = new LambdaEvaluator(series);
  }

  /**
   * A penalty whose fit leaves the range of doubles is inadmissible: its value is +Infinity.
   * @throws BaselineError 'insufficient-data' for 'lot-cv' when a lot cannot be left out, whatever the penalty
   */
  evaluate(lambda: number, rule: PenaltyRule): Candidate {
    try {
      this.spline.evaluate(lambda);
      const value = this.criterion(rule);
      if (!Number.isNaN(value)) return { smoothness: lambda, edf: this.spline.edf, value };
    } catch (error) {
      if (!(error instanceof BaselineError && error.code === 'ill-posed')) throw error;
    }
    return { smoothness: lambda, edf: NaN, value: Infinity };
  }

  /** Effective degrees of freedom alone. */
  edfAt(lambda: number): number {
    this.spline.evaluate(lambda);
    return this.spline.edf;
  }

  /** The leave-one-lot-out criterion with its standard error. */
  lotCriterion(lambda: number): LotCriterion {
    this.spline.evaluate(lambda);
    return this.overLots();
  }

  private criterion(rule: PenaltyRule): number {
    const { spline, series } = this;
    if (rule.rule === 'lot-cv') return this.overLots().value;
    if (rule.rule === 'reml') return spline[rule.variance];
    return generalisedCrossValidation(series.pullCount, spline.rss, spline.edf, rule.inflation);
  }

  private overLots(): LotCriterion {
    const { lotStart } = this.series;
    if (this.terms.length < lotStart.length) this.terms = new Float64Array(lotStart.length);
    return meanOfTerms(this.terms, this.spline.lotTerms(this.terms));
  }
}
