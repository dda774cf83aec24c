import type { LocalDate, SummaryListItem, SummaryRequested } from '@app/contracts';

/** Whether the list has the version that was asked for, or a later one. */
export const isMade = (items: readonly SummaryListItem[] | undefined, asked: SummaryRequested) =>
  items?.some((item) => item.weekStartsOn === asked.weekStartsOn && item.version >= asked.version) === true;

/** The Sunday of a week that starts on this Monday. */
export function lastDay(startsOn: LocalDate): LocalDate {
  const day = new Date(`${startsOn}T00:00:00Z`);
  day.setUTCDate(day.getUTCDate() + 6);
  return day.toISOString().slice(0, 10);
}
