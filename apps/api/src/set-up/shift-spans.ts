import type { FieldError, ShiftSpan } from '@app/contracts';

const DAY_MINUTES = 1_440;
const minuteOf = (time: string) => Number(time.slice(0, 2)) * 60 + Number(time.slice(3, 5));

/** Pieces [from, to) of the day in minutes; a span that ends at or before its start runs over midnight. */
function piecesOf({ startsAt, endsAt }: ShiftSpan): [number, number][] {
  const [from, to] = [minuteOf(startsAt), minuteOf(endsAt)];
  if (to > from) return [[from, to]];
  return to === 0
    ? [[from, DAY_MINUTES]]
    : [
        [from, DAY_MINUTES],
        [0, to],
      ];
}

/** The span as the database keeps it: an int4multirange of minutes of the day. */
export function minutesOf(span: ShiftSpan): string {
  return `{${piecesOf(span)
    .map(([from, to]) => `[${from},${to})`)
    .join(',')}}`;
}

/** What is wrong with a day's shifts: names used twice, spans that overlap; each said at the later of the two. */
export function shiftErrors(shifts: readonly ShiftSpan[]): FieldError[] {
  const errors: FieldError[] = [];
  for (const [index, shift] of shifts.entries()) {
    const before = shifts.slice(0, index);
    if (before.some((other) => other.name.toLowerCase() === shift.name.toLowerCase()))
      errors.push({
        pointer: `/shifts/${index}/name`,
        code: 'name-taken',
        detail: 'Another shift of the day has this name.',
      });
    const other = before.find((earlier) => doOverlap(earlier, shift));
    if (other)
      errors.push({
        pointer: `/shifts/${index}/startsAt`,
        code: 'shifts-overlap',
        detail: `This overlaps ${other.name}, ${other.startsAt} to ${other.endsAt}.`,
      });
  }
  return errors;
}

function doOverlap(a: ShiftSpan, b: ShiftSpan): boolean {
  return piecesOf(a).some(([from, to]) => piecesOf(b).some(([start, end]) => from < end && start < to));
}
