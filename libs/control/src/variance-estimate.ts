/** A method-of-moments variance. */
export interface VarianceEstimate {
  /** In the unit squared; a negative estimate is returned as 0. */
  variance: number;
  /** True when the estimate itself came out below 0. */
  wasNegative: boolean;
  /** Number of differences or degrees of freedom that it rests on; 0 when nothing could be estimated (variance 0). */
  terms: number;
}
