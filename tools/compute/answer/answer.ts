import type { Method } from '../options/fit-options';

export type SmoothnessRule = 'lot-cv' | 'gcv' | 'gcv14' | 'reml' | 'edf' | 'lambda' | 'knots' | 'degree' | 'none';

export interface SmoothnessAnswer {
  rule: SmoothnessRule;
  /** lambda, number of interior knots or degree; for the rule edf the degrees of freedom asked for; null for a constant. */
  value: number | null;
  lambda: number | null;
  edf: number;
  atFloor: boolean;
}

export interface CriterionAnswer {
  name: string | null;
  value: number | null;
  curve: Record<string, number | null>[];
}

export interface LotAnswer {
  lot: string;
  residual: number | null;
  variance: number | null;
  score: number | null;
  /** With --robust: the factor on the lot's weights, 0 to 1. */
  weight?: number;
}

export interface ProjectionAnswer {
  t: number;
  value: number;
  standardError: number | null;
}

/** The JSON object that is written, in this order of keys. NaN in its arrays stands for what cannot be said and is written as null. */
export interface Answer {
  method: Method;
  smoothness: SmoothnessAnswer;
  sigma2: number | null;
  criterion: CriterionAnswer;
  t: Float64Array;
  fitted: Float64Array;
  standardError: Float64Array;
  leverage: Float64Array;
  deletedResidual: Float64Array;
  lots: LotAnswer[];
  projection: ProjectionAnswer[];
  warnings: string[];
}
