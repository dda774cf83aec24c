import type { LocalDate, SummaryListItem, SummaryRequested } from '@app/contracts';

/** The id of the version that was asked for, or of a later one, once the list has it. */
export const madeId = (items: readonly SummaryListItem[] | undefined, asked: SummaryRequested): number | undefined =>
  items?.find((item) => item.weekStartsOn === asked.weekStartsOn && item.version >= asked.version)?.id;

/** The Sunday of a week that starts on this Monday. */
export function lastDay(startsOn: LocalDate): LocalDate {
  const day = new Date(`${startsOn}T00:00:00Z`);
  day.setUTCDate(day.getUTCDate() + 6);
  return day.toISOString().slice(0, 10);
}
