export const INTAKE_STATES = [
  'received',
  'needs_attention',
  'queued',
  'working',
  'scored',
  'refused',
  'withdrawn',
] as const;
export type IntakeState = (typeof INTAKE_STATES)[number];

/** A hold is withdrawn, without anybody's decision, with the intake that alone led to it. */
export const HOLD_STATES = ['open', 'decided', 'withdrawn'] as const;
export type HoldState = (typeof HOLD_STATES)[number];

export const DISPOSITIONS = ['release', 'scrap', 'rework', 'concession', 'regrade'] as const;
export type Disposition = (typeof DISPOSITIONS)[number];

export const PLAN_STATES = ['draft', 'proposed', 'in_force', 'retired'] as const;
export type PlanState = (typeof PLAN_STATES)[number];

export const CONTROL_STATES = ['within_control_limits', 'outside_control_limits', 'not_scored'] as const;
export type ControlState = (typeof CONTROL_STATES)[number];

export const SPECIFICATION_STATES = [
  'inside_specification',
  'inside_within_guard_band',
  'outside_specification',
  'no_specification',
] as const;
export type SpecificationState = (typeof SPECIFICATION_STATES)[number];

export const SIGNALS = [
  'lot_mean',
  'outside_specification',
  'not_scored',
  'censored_readings',
  'baseline_moved',
] as const;
export type SignalName = (typeof SIGNALS)[number];

export const BREAK_KINDS = ['adjustment', 'gauge_change', 'process_change'] as const;
export type BreakKind = (typeof BREAK_KINDS)[number];
