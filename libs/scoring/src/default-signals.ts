import type { SignalAction, SignalName } from './types';

/** What a new plan does with each signal, and what applies while no plan is in force. */
export const DEFAULT_SIGNALS: Readonly<Record<SignalName, SignalAction>> = {
  lot_mean: 'holds',
  outside_specification: 'holds',
  not_scored: 'holds',
  censored_readings: 'notice',
  baseline_moved: 'notice',
};
