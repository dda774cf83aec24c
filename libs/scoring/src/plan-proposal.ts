import type { LotOnChannel, PlanParameters } from './types';

/** What a plan is proposed from. */
export interface PlanInput {
  /** Lots of one segment in time order of `firstAt`, points formed for the period that is asked for. */
  lots: LotOnChannel[];
  /** T, s. Default: see `defaultShortestPeriod`. */
  shortestPeriodSeconds?: number;
  /** Default 30 days. */
  windowSeconds?: number;
  /** L; default 3. */
  limitMultiple?: number;
  /** Upper minus lower specification limit, in the unit. Null or absent: no allowance is stated. */
  tolerance?: number | null;
  /** Shares of the tolerance: a movement that is told, default 0.1; one beyond which lots are not scored, default 0.25. */
  allowance?: { noticeShare: number; capShare: number };
  /** Lots of the reference period; default all that pull and end within the window before the newest. */
  referenceLotIds?: number[];
  /** Whether outlying lots are reweighted (see `PlanParameters.isRobust`); default no. */
  isRobust?: boolean;
  /** Nominal for lots without a specification; default the median of their means, else the median of the nominals. */
  fallbackNominal?: number;
}

export type PlanCautionCode =
  | 'few_reference_lots'
  | 'short_period'
  | 'period_exceeds_window'
  | 'smoothness_at_floor'
  | 'smoothness_at_bound'
  | 'between_lots_negative'
  | 'between_points_negative'
  | 'correlated_scores'
  | 'lots_left_out';

export interface PlanCaution {
  code: PlanCautionCode;
  /** A sentence with the numbers in it. */
  detail: string;
}

/** What the people who approve a plan should see. */
export interface PlanReport {
  /** Reference lots that stayed, after the leaving out. */
  referenceLots: number;
  /** Beyond 4 in the robust passes. */
  leftOutLotIds: number[];
  /** Named or in the window, but without a value or not pulling. */
  unusableLotIds: number[];
  /** Cross-validated error against the smoothness tried, in order of lambda. */
  cvCurve: { lambda: number; effectivePeriodSeconds: number; criterion: number }[];
  isAtFloor: boolean;
  /** Lag-1 correlation of the reference scores, and what the fit alone would give. Null when it cannot be computed. */
  lag1Correlation: number | null;
  lag1Expected: number | null;
  medianLotSpacingSeconds: number;
  kappa: number;
  lambda: number;
  edf: number;
  /** Share of good lots that one look holds at the limit, with the uncertainty of the scale (Student t). */
  falseHoldShare: number;
  cautions: PlanCaution[];
}

export type PlanInsufficientReason = 'too_few_lots' | 'period_too_short' | 'non_finite' | 'constant_data' | 'ill_posed';

export type PlanProposal =
  | { status: 'proposed'; plan: PlanParameters; report: PlanReport }
  | { status: 'insufficient'; reason: PlanInsufficientReason; detail: string };
