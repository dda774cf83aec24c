import type { LocalDate, SummaryListItem, SummaryListView, SummaryRequested, SummaryUnderWay } from '@app/contracts';

/** The id of the version that was asked for, or of a later one, once the list has it. */
export const madeId = (items: readonly SummaryListItem[] | undefined, asked: SummaryRequested): number | undefined =>
  items?.find((item) => item.weekStartsOn === asked.weekStartsOn && item.version >= asked.version)?.id;

/** The version of a week that is being made or could not be made. */
export function underWayOf(
  list: Pick<SummaryListView, 'underWay'> | undefined,
  weekStartsOn: LocalDate,
): SummaryUnderWay | undefined {
  return list?.underWay.find((item) => item.weekStartsOn === weekStartsOn);
}

/** Whether the version asked for is still awaited: neither made nor given up. */
export function isAwaited(list: SummaryListView | undefined, asked: SummaryRequested | null): boolean {
  if (asked === null || madeId(list?.items, asked) !== undefined) return false;
  return !list?.underWay.some(({ jobId, state }) => jobId === asked.jobId && state === 'failed');
}

/** The Sunday of a week that starts on this Monday. */
export function lastDay(startsOn: LocalDate): LocalDate {
  const day = new Date(`${startsOn}T00:00:00Z`);
  day.setUTCDate(day.getUTCDate() + 6);
  return day.toISOString().slice(0, 10);
}
