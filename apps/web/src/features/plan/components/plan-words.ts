import { decimalsOf, formatNumber, type PlanState, type PlanView } from '@app/contracts';

export const STATE_WORDS: Record<PlanState, string> = {
  draft: 'draft',
  proposed: 'proposed',
  in_force: 'in force',
  retired: 'retired',
};

/** One number of a plan: its name, what it is for, and how it reads. */
export interface ParameterRow {
  name: string;
  meaning: string;
  text: (plan: PlanView) => string;
}

type Parameters = NonNullable<PlanView['parameters']>;

const row = (
  name: string,
  meaning: string,
  text: (parameters: Parameters, plan: PlanView) => string,
): ParameterRow => ({
  name,
  meaning,
  text: (plan) => (plan.parameters === null ? '–' : text(plan.parameters, plan)),
});

/** A span in days, or in hours below two days. */
export function spanText(seconds: number): string {
  const days = seconds / 86_400;
  return days < 2 ? `${formatNumber(seconds / 3_600, 1)}\u202fh` : `${formatNumber(days, 1)}\u202fd`;
}

/** Standard deviations show two decimals more than a reading: they are compared with its resolution. */
const sd = (value: number, { unit, resolution }: PlanView) =>
  `${formatNumber(value, decimalsOf(resolution) + 2)}\u202f${unit}`;

const allowance = (value: number | null, { unit, resolution }: PlanView) =>
  value === null ? 'none stated' : `${formatNumber(value, decimalsOf(resolution))}\u202f${unit}`;

export const PARAMETER_ROWS: readonly ParameterRow[] = [
  row('Baseline', 'The curve fitted to the slow movement.', () => 'smoothing spline'),
  row('Shortest drift period', 'Nothing faster counts as drift.', (p) => spanText(p.shortestPeriodSeconds)),
  row('Effective period', 'How smooth the baseline is: frozen with the plan.', (p) =>
    spanText(p.effectivePeriodSeconds),
  ),
  row('Outlying lots', 'How much they pull the baseline.', (p) => (p.isRobust ? 'reweighted' : 'as all others')),
  row('Window', 'How far back readings count, at most to the last break.', (p) => spanText(p.windowSeconds)),
  row('SD between lots', 'How lots differ that the slow movement does not move.', (p, plan) =>
    sd(p.betweenLotsSd, plan),
  ),
  row('SD between points of a lot', 'Within a lot, from time to time.', (p, plan) => sd(p.betweenPointsSd, plan)),
  row('SD between readings', 'From reading to reading.', (p, plan) => sd(p.betweenReadingsSd, plan)),
  row('Centre of the scores', 'Mean score of the reference lots.', (p) => formatNumber(p.centre, 2)),
  row('Scale of the scores', 'Their standard deviation; 1 is as expected.', (p) => formatNumber(p.scale, 2)),
  row('Control limits', 'Lots beyond them are held.', (p) => `±${formatNumber(p.limit, 1)}\u202fσ`),
  row('Reference lots', 'Lots that scale and centre come from.', (p) => String(p.referenceLotCount)),
  row('Allowance, notice', 'Movement since the baseline’s start that is told.', (p, plan) =>
    allowance(p.allowanceNotice, plan),
  ),
  row('Allowance, cap', 'Movement beyond which lots are not scored.', (p, plan) => allowance(p.allowanceCap, plan)),
];

/** The revision in force, the one that waits (a draft or a proposal), and the others, newest first. */
export function sortPlans(plans: readonly PlanView[]) {
  const newestFirst = [...plans].sort((a, b) => b.revision - a.revision);
  const inForce = newestFirst.find((plan) => plan.state === 'in_force') ?? null;
  const pending = newestFirst.find((plan) => plan.state === 'draft' || plan.state === 'proposed') ?? null;
  return { inForce, pending, others: newestFirst.filter((plan) => plan !== inForce && plan !== pending) };
}
