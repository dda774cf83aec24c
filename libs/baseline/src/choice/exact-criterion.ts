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
    return this.lotTerms();
  }

  private criterion(rule: PenaltyRule): number {
    const { edf, rss } = this.spline;
    if (rule.rule === 'lot-cv') return this.lotTerms().value;
    if (rule.rule === 'reml') return this.spline[rule.variance];
    return generalisedCrossValidation(this.series.pullCount, rss, edf, rule.inflation);
  }

  private lotTerms(): LotCriterion {
    const { pull, pointsByLot, lotStart, weightScale } = this.series;
    if (this.terms.length < lotStart.length) this.terms = new Float64Array(lotStart.length);
    const { spline, terms } = this;
    let count = 0;
    for (let lot = 0; lot + 1 < lotStart.length; lot++) {
      const from = lotStart[lot];
      const to = lotStart[lot + 1];
      if (to === from || pull[pointsByLot[from]] === 0) continue;
      let weight = 0;
      for (let s = from; s < to; s++) weight += pull[pointsByLot[s]];
      const mean = spline.meanResidual(lot);
      terms[count++] = weight * weightScale * mean * mean;
    }
    return meanOfTerms(terms, count);
  }
}
