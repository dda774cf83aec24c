import type { LooseRow, Say } from './loose';
import { quoted } from './texts';

const DAY_MINUTES = 1440;

interface Span {
  index: number;
  name: string;
  /** Minutes of the day; beyond 1440 on the next. */
  from: number;
  to: number;
}

/** One calendar: the same first day in all rows, and spans of the day that do not overlap. Row numbers are those of the sheet. */
export function checkShifts(shifts: LooseRow[], rows: readonly number[], say: Say): void {
  const first = shifts.findIndex(({ validFrom }) => typeof validFrom === 'string');
  shifts.forEach(({ validFrom }, index) => {
    if (typeof validFrom !== 'string' || validFrom === shifts[first].validFrom) return;
    say(
      'shifts',
      index,
      'validFrom',
      'other-calendar',
      `Row ${rows[first]} begins on ${String(shifts[first].validFrom)} and this one on ${validFrom}.`,
      'Write the same first day into every row: the sheet holds one calendar.',
    );
  });
  const spans = shifts.flatMap(toSpan);
  spans.forEach((span, at) => {
    const other = spans.slice(0, at).find((one) => overlap(one, span));
    if (other)
      say(
        'shifts',
        span.index,
        'startsAt',
        'shifts-overlap',
        `The shift ${quoted(span.name)} overlaps ${quoted(other.name)} of row ${rows[other.index]}.`,
        'Change when one of both starts or ends.',
      );
  });
}

function toSpan({ name, startsAt, endsAt }: LooseRow, index: number): Span[] {
  if (typeof startsAt !== 'string' || typeof endsAt !== 'string') return [];
  const [from, end] = [minutesOf(startsAt), minutesOf(endsAt)];
  return [{ index, name: typeof name === 'string' ? name : '', from, to: end > from ? end : end + DAY_MINUTES }];
}

const minutesOf = (clock: string): number => Number(clock.slice(0, 2)) * 60 + Number(clock.slice(3, 5));

/** On a clock face: also where one of both runs over midnight. */
const overlap = (one: Span, other: Span): boolean =>
  [-DAY_MINUTES, 0, DAY_MINUTES].some((shift) => one.from + shift < other.to && other.from < one.to + shift);
