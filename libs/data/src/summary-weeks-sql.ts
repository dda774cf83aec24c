import type { PlantWeek } from './summary-week';

/** The week told (0) and the one before it (1), to be joined: `with ${WEEKS} select … from weeks w`. */
export const WEEKS = `weeks(week, from_at, to_at) as (values
  (0, cast(:from as timestamptz), cast(:to as timestamptz)), (1, cast(:lastFrom as timestamptz), cast(:from as timestamptz)))`;

export interface TwoWeeks {
  week: PlantWeek;
  last: PlantWeek;
}

export const weekBindings = ({ week, last }: TwoWeeks) => ({ from: week.from, to: week.to, lastFrom: last.from });

/** Rows of the week told, and of the one before it. */
export const ofWeek = <T extends { week: number }>(found: T[], week: 0 | 1): T[] =>
  found.filter((row) => row.week === week);
