import type { ShiftCalendarView, ShiftSpan } from '@app/contracts';

const DAY_MINUTES = 1440;

export const minuteOf = (time: string): number => Number(time.slice(0, 2)) * 60 + Number(time.slice(3, 5));
const timeOf = (minute: number): string => {
  const ofDay = minute % DAY_MINUTES;
  return `${String(Math.floor(ofDay / 60)).padStart(2, '0')}:${String(ofDay % 60).padStart(2, '0')}`;
};

/** Minutes of a span; one that ends at or before its start runs over midnight. */
export function lengthOf({ startsAt, endsAt }: ShiftSpan): number {
  const length = minuteOf(endsAt) - minuteOf(startsAt);
  return length > 0 ? length : length + DAY_MINUTES;
}

export function lengthWords(minutes: number): string {
  const [hours, rest] = [Math.floor(minutes / 60), minutes % 60];
  return [hours > 0 && `${hours}\u202fh`, rest > 0 && `${rest}\u202fmin`].filter(Boolean).join(' ') || '0\u202fmin';
}

/** Spans of the day that no shift covers, as "04:00 to 06:00". */
export function gapsOf(shifts: readonly ShiftSpan[]): string[] {
  if (shifts.length === 0) return [];
  const spans = [...shifts].sort((a, b) => minuteOf(a.startsAt) - minuteOf(b.startsAt));
  return spans.flatMap((span, index) => {
    const end = minuteOf(span.startsAt) + lengthOf(span);
    const isLast = index === spans.length - 1;
    const next = minuteOf(spans[isLast ? 0 : index + 1].startsAt) + (isLast ? DAY_MINUTES : 0);
    return next > end ? [`${timeOf(end)} to ${timeOf(next)}`] : [];
  });
}

/** What a calendar covers, in a sentence. */
export function coverageWords(shifts: readonly ShiftSpan[]): string {
  if (shifts.length === 0) return 'No shift is stated.';
  const gaps = gapsOf(shifts);
  if (gaps.length === 0) return 'The shifts cover the whole day.';
  return `No shift covers ${gaps.join(' and ')}: readings from then belong to no shift.`;
}

/** The calendar that a day of the plant falls into. */
export function calendarOn(calendars: readonly ShiftCalendarView[], day: string): ShiftCalendarView | undefined {
  return calendars.find(({ validFrom, until }) => validFrom <= day && (until === null || day < until));
}

/** Where a form for a plant without a calendar begins; people change it to theirs. */
export const THREE_SHIFTS: ShiftSpan[] = [
  { name: 'early', startsAt: '06:00', endsAt: '14:00' },
  { name: 'late', startsAt: '14:00', endsAt: '22:00' },
  { name: 'night', startsAt: '22:00', endsAt: '06:00' },
];
