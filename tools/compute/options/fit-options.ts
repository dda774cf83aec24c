export const METHODS = ['smoothing-spline', 'natural-spline', 'b-spline', 'polynomial', 'constant'] as const;
export const CRITERIA = ['lot-cv', 'gcv', 'gcv14', 'reml'] as const;
export const PLACEMENTS = ['even', 'quantile', 'variability'] as const;

export type Method = (typeof METHODS)[number];
export type Criterion = (typeof CRITERIA)[number];
export type Placement = (typeof PLACEMENTS)[number];

/** What fixes the smoothness. */
export type Smoothness =
  | { rule: 'none' }
  | { rule: 'lambda'; lambda: number }
  | { rule: 'edf'; edf: number }
  | { rule: 'knots'; count: number }
  | { rule: 'degree'; degree: number }
  | { rule: Criterion; isOneStandardError: boolean };

/** `fit` as it was asked for, free of contradictions. */
export interface FitOptions {
  method: Method;
  smoothness: Smoothness;
  placement: Placement;
  /** s */
  shortestPeriod?: number;
  isRobust: boolean;
  /** Times as they were written, since only the series says whether they are numbers or ISO times. */
  project: string[];
}

export type Request = { command: 'help' } | { command: 'fit'; options: FitOptions };
