import { DateTime } from 'luxon';
import { DomainError } from '@app/contracts';

/** A week of a plant: [from, to) from Monday 00:00 to Monday 00:00 of its own clock. */
export interface PlantWeek {
  /** The Monday as a local date, "2026-03-02". */
  startsOn: string;
  from: Date;
  to: Date;
}

/** When the week that has just ended is told: on the Monday after it, h of the plant's clock. */
const TOLD_AT_HOUR = 6;

const weekOf = (monday: DateTime): PlantWeek => ({
  startsOn: monday.toISODate() as string,
  from: monday.toJSDate(),
  to: monday.plus({ weeks: 1 }).startOf('day').toJSDate(),
});

/** The week that an instant lies in. Across a change of the clocks it is 167 or 169 h long (or as the zone has it). */
export function weekAt(at: Date, timeZone: string): PlantWeek {
  return weekOf(DateTime.fromJSDate(at, { zone: timeZone }).startOf('week'));
}

/** The week that starts on a local date. Throws `invalid` when that is no Monday. */
export function weekStartingOn(startsOn: string, timeZone: string): PlantWeek {
  const day = DateTime.fromFormat(startsOn, 'yyyy-MM-dd', { zone: timeZone });
  if (!day.isValid || day.weekday !== 1)
    throw new DomainError('invalid', 'not-a-monday', 'A week starts on a Monday: give its date as YYYY-MM-DD.', [
      { pointer: '/weekStartsOn', code: 'not-a-monday', detail: 'Give the date of a Monday.' },
    ]);
  return weekOf(day.startOf('day'));
}

/** The week before. */
export function weekBefore(week: PlantWeek, timeZone: string): PlantWeek {
  return weekOf(DateTime.fromISO(week.startsOn, { zone: timeZone }).minus({ weeks: 1 }).startOf('day'));
}

/** The newest week that has ended. */
export function lastCompleteWeek(at: Date, timeZone: string): PlantWeek {
  return weekBefore(weekAt(at, timeZone), timeZone);
}

/** Monday 06:00 after the week, by the plant's clock. */
export function toldAt(week: PlantWeek, timeZone: string): Date {
  return DateTime.fromJSDate(week.to, { zone: timeZone }).set({ hour: TOLD_AT_HOUR, minute: 0 }).toJSDate();
}

/**
 * The weeks whose summary is due at an instant, oldest first, at most `most`: the newest that has ended, and with it every week since the
 * first one that was told which has none; none while the newest is told. Without any told so far only the newest. None before the week
 * of the plant's first reading.
 */
export function dueWeeks(
  at: Date,
  timeZone: string,
  known: { toldStartsOn: string[]; firstReadingAt: Date | null },
  most: number,
): PlantWeek[] {
  const { firstReadingAt, toldStartsOn } = known;
  let week = lastCompleteWeek(at, timeZone);
  if (toldAt(week, timeZone) > at) week = weekBefore(week, timeZone);
  if (firstReadingAt === null || toldStartsOn.includes(week.startsOn)) return [];
  const firstTold = [...toldStartsOn].sort()[0] ?? week.startsOn;
  const due: PlantWeek[] = [];
  while (due.length < most && week.to > firstReadingAt && week.startsOn >= firstTold) {
    if (!toldStartsOn.includes(week.startsOn)) due.unshift(week);
    week = weekBefore(week, timeZone);
  }
  return due;
}
