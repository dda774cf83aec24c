/**
 * What goes into the judging of a channel and what comes out of it. Times are seconds since 1970-01-01 UTC (fractions allowed),
 * values are in the characteristic's unit as measured; the nominal value is taken off inside.
 */

/** What a plan does with a signal. */
export type SignalAction = 'holds' | 'notice' | 'off';

/** One reason why a lot stands out. */
export type SignalName = 'lot_mean' | 'outside_specification' | 'not_scored' | 'censored_readings' | 'baseline_moved';

/** The mean of the readings of one lot in one time block (METHODS: section 1). */
export interface LotPoint {
  /** Mean time of its readings, s. */
  at: number;
  /** Number of readings with a value, at least 1. */
  count: number;
  /** Mean of the readings, as measured. */
  mean: number;
  /** Sum of squared deviations of the readings from `mean`. */
  sumSquares: number;
}

/** The specification that applies to a lot on a channel. */
export interface LotSpecification {
  nominal: number;
  lower: number | null;
  upper: number | null;
}

/** All that judging needs to know of one lot on one channel. */
export interface LotOnChannel {
  lotId: number;
  firstAt: number;
  lastAt: number;
  /** Readings with a value. */
  count: number;
  /** Readings off the scale's low and high end, without a value. */
  censoredLow: number;
  censoredHigh: number;
  /** Smallest and largest reading with a value; null when there is none. */
  minimum: number | null;
  maximum: number | null;
  /** Readings with a value below the lower and above the upper specification limit. */
  countBelow: number;
  countAbove: number;
  /** In time order; empty when every reading is censored. */
  points: LotPoint[];
  /** Null when the product has no specification for this characteristic: deviations are then from `fallbackNominal`. */
  specification: LotSpecification | null;
  /** False while the lot is held and not yet released, when it was scrapped, and when it was excluded by hand. */
  pulls: boolean;
}

/** Variances, in the unit squared (METHODS: section 1, weights). */
export interface VarianceComponents {
  betweenLots: number;
  betweenPoints: number;
  betweenReadings: number;
}

/** The frozen numbers of a plan revision (METHODS: sections 2 to 4, 7). */
export interface PlanParameters {
  method: 'smoothing_spline';
  /** T, s. */
  shortestPeriodSeconds: number;
  /** T_eff, s: lambda = kappa (T_eff / 2 pi)^4 at each intake. */
  effectivePeriodSeconds: number;
  windowSeconds: number;
  /** Lots pull by bisquare weights of their scores; absent in plans from before there was the choice, which means no. */
  isRobust?: boolean;
  components: VarianceComponents;
  /** Centre and scale of the reference lots' scores. */
  centre: number;
  scale: number;
  /** L: a lot is outside when |(z - centre) / scale| > limit. */
  limit: number;
  referenceLotCount: number;
  /** Nominal used for a product without a specification. */
  fallbackNominal: number;
  /** Movement of the baseline since the segment's start, in the unit: notice, and the cap beyond which lots are not scored. Null: none stated. */
  allowanceNotice: number | null;
  allowanceCap: number | null;
  /** The constant baseline's individuals chart on lot means (deviation from nominal): centre line and half width of its control limits. */
  constant: { centre: number; halfWidth: number };
  signals: Record<SignalName, SignalAction>;
}

export type ControlState = 'within_control_limits' | 'outside_control_limits' | 'not_scored';
export type SpecificationState = 'inside_specification' | 'outside_specification' | 'no_specification';

export type NotScoredReason =
  | 'learning'
  | 'no_plan_in_force'
  | 'beyond_allowance'
  | 'no_values'
  | 'non_finite'
  | 'ill_posed'
  /** The values that are left are within the limits, but readings off the scale are missing from them. */
  | 'censored'
  /** Every point of the segment has the same value: a stuck gauge looks like that. */
  | 'constant_data';

/** A signal that a lot gave, with the figures its sentence needs. */
export interface Signal {
  signal: SignalName;
  action: SignalAction;
  facts: Record<string, number | string | null>;
}

/** Verdict of one lot on one channel. */
export interface LotJudgement {
  lotId: number;
  controlState: ControlState;
  isProvisional: boolean;
  notScoredReason: NotScoredReason | null;
  /** (z - centre) / scale: what the limit is compared with. Null exactly when not scored. */
  score: number | null;
  /** Lot mean minus the baseline fitted without the lot, and its standard deviation (times scale), in the unit. */
  residual: number | null;
  residualSd: number | null;
  /** Count-weighted mean of the readings as measured; null without values. */
  lotMean: number | null;
  /** Baseline without the lot at the lot, as measured (nominal added again). */
  baseline: number | null;
  /** The control limits in the unit for this lot's mean, as measured. */
  controlLow: number | null;
  controlHigh: number | null;
  specificationState: SpecificationState;
  /** The constant baseline's verdict on the same lot mean. */
  constant: { state: ControlState; low: number | null; high: number | null; score: number | null };
  signals: Signal[];
}

/** One segment's judging at one time. */
export interface SegmentJudgement {
  /** What the baseline came to; null when nothing could be fitted. */
  fit: {
    lambda: number;
    kappa: number;
    edf: number;
    pointCount: number;
    lotCount: number;
    /** Largest movement of the baseline since the segment's start, unit. */
    movement: number;
  } | null;
  /** Baseline at the points' times as deviation from nominal, with its standard error: for drawing. */
  curve: { t: Float64Array; value: Float64Array; standardError: Float64Array };
  lots: LotJudgement[];
  /** Set when so many lots in a row are held that the process may have changed for good. */
  askForBreak?: AskForBreak;
  /**
   * Deviation from nominal that movements are counted from; null until the segment's first T_eff (and sixteen lots) is complete.
   * Keep it and hand it in again once the segment's first lots are no longer loaded.
   */
  startLevel?: number | null;
}

/** A run of lots that do not pull the baseline or are outside their control limits, longer than half of T. */
export interface AskForBreak {
  fromLotId: number;
  toLotId: number;
  lotCount: number;
  /** Weight of the run's points, and the weight kappa T / 2 that it exceeds. */
  weight: number;
  threshold: number;
}
