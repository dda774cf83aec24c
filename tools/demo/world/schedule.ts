import { DomainError } from '@app/contracts';
import { DateTime } from 'luxon';
import { describePlant } from './plant';
import type { DemoShift } from './types';

/** Six weeks of three shifts a day. */
export const HISTORY_SHIFTS = 126;
/** Shifts that follow the six weeks, for a newcomer to upload. */
export const FURTHER_SHIFTS = 2;

const { timeZone, shifts: HOURS } = describePlant();
const PER_DAY = HOURS.length;

export interface DemoSchedule {
  startsAt: number;
  /** End of the six weeks. */
  endsAt: number;
  /** The six weeks, oldest first; the last one goes through live at the first start. */
  shifts: DemoShift[];
  /** The two that follow. */
  further: DemoShift[];
}

/** The instant of the shift change `slot` places after the first one of `day`, by the plant's own clock. */
function changeAt(day: DateTime, slot: number): number {
  const days = Math.floor(slot / PER_DAY);
  const [hour, minute] = HOURS[slot - days * PER_DAY].startsAt.split(':').map(Number);
  return day.plus({ days }).set({ hour, minute, second: 0, millisecond: 0 }).toSeconds();
}

function localDay(at: number): DateTime {
  return DateTime.fromSeconds(at, { zone: timeZone }).startOf('day');
}

/**
 * The calendar of the demo: 126 shifts that end at `endsAt` and the two that follow. Shifts keep the wall clock of the
 * plant's zone, so the night in which the clocks change has 7 or 9 hours.
 * @throws DomainError when `endsAt` (s) is not a shift change.
 */
export function demoSchedule(endsAt: number): DemoSchedule {
  const day = localDay(endsAt);
  const last = HOURS.findIndex((_, slot) => changeAt(day, slot) === endsAt);
  if (last < 0)
    throw new DomainError('invalid', 'not-a-shift-change', `${endsAt} s is not the end of a shift at Marrowby Works.`);
  const all: DemoShift[] = [];
  for (let index = 0; index < HISTORY_SHIFTS + FURTHER_SHIFTS; index++) {
    const slot = last - HISTORY_SHIFTS + index;
    const { name } = HOURS[((slot % PER_DAY) + PER_DAY) % PER_DAY];
    all.push({ index, name, startsAt: changeAt(day, slot), endsAt: changeAt(day, slot + 1) });
  }
  return {
    startsAt: all[0].startsAt,
    endsAt,
    shifts: all.slice(0, HISTORY_SHIFTS),
    further: all.slice(HISTORY_SHIFTS),
  };
}

/** End of the six weeks (s) for a first start at `now` (s): two shifts before the end of the last full one. */
export function demoEndsAt(now: number): number {
  const day = localDay(now);
  let slot = PER_DAY;
  while (changeAt(day, slot) > now) slot -= 1;
  return changeAt(day, slot - FURTHER_SHIFTS);
}
