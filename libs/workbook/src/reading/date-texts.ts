/** A stamp: a wall clock without zone (`local`, as if it were UTC), an instant, a time of day, or why it is none. */
export type ParsedStamp =
  | { kind: 'local'; ms: number }
  | { kind: 'instant'; ms: number }
  | { kind: 'clock'; ms: number }
  /** A date whose day and month could be swapped. */
  | { kind: 'ambiguous'; dayFirst: number; monthFirst: number }
  | { kind: 'missing' }
  | { kind: 'bad'; code: string; why: string };

/** What a column's dates have shown so far, and what was answered, which decides between 3 April and 4 March. */
export interface DateHabits {
  /** As answered; goes before what the texts show. */
  order?: 'day-month' | 'month-day';
  /** "13/04/2026" was there, or "03/04/2026" when 4 March had not come yet. */
  sawDayFirst?: boolean;
  sawMonthFirst?: boolean;
  /** Wall clocks after it have not come yet. */
  latest?: number;
}

const FIRST_STAMP = Date.UTC(2000, 0, 1);
/** Two-digit years below it are questioned where the text could have the year first. */
const LEAST_SHORT_YEAR = 20;

const WEEKDAY = /^(?:mo|tu|di|we|mi|th|do|fr|sa|su|so)\p{L}*\.?,?\s+(?=[\p{L}\d])/iu;
const YEAR_FIRST = /^(\d{4})([-/.])(\d{1,2})\2(\d{1,2})(?!\d)(.*)$/s;
const COMPACT = /^(20\d{2})(\d{2})(\d{2})(?:[T ]?(\d{2})(\d{2})(\d{2})?)?$/;
const NUMBERS = /^(\d{1,2})([-/.])(\d{1,2})\2(\d{4}|\d{2})(?!\d)(.*)$/s;
const DAY_NAME = /^(\d{1,2})(?:\.|st|nd|rd|th)?[ \-/]*(\p{L}{3,})\.?[ \-/,]*(\d{4}|\d{2})(?!\d)(.*)$/su;
const NAME_DAY = /^(\p{L}{3,})\.? *(\d{1,2})(?:\.|st|nd|rd|th)?,? +(\d{4})(?!\d)(.*)$/su;
const CLOCK = /^(\d{1,2}):(\d{2})(?::(\d{2})(?:[.,](\d{1,9}))?)?\s*(?:([ap])\.?\s?m\.?|uhr|h)?$/i;
const GERMAN_CLOCK = /^(\d{1,2})\.(\d{2}) uhr$/i;
const OFFSET = /\s*(Z|UTC|GMT|CES?T|MES?Z|(?:UTC|GMT)?[+-]\d{2}(?::?\d{2})?)$/i;
/** Minutes east of Greenwich by name: Central European Time and its summer time, in English and German. */
const NAMED_OFFSETS: Record<string, number> = { Z: 0, UTC: 0, GMT: 0, CET: 60, MEZ: 60, CEST: 120, MESZ: 120 };
const MONTHS = [
  'january januar jaenner janner',
  'february februar feber',
  'march marz maerz mrz',
  'april',
  'may mai',
  'june juni',
  'july juli',
  'august',
  'september',
  'october oktober',
  'november',
  'december dezember',
].map((names) => names.split(' '));

const bad = (code: string, why: string): ParsedStamp => ({ kind: 'bad', code, why });
const unreal = (text: string): ParsedStamp =>
  bad('date-does-not-exist', `says "${text}", a date or time that does not exist`);
const noDate = (text: string): ParsedStamp =>
  bad(
    'not-a-date',
    `says "${text.slice(0, 40)}", which is no date or time; store it as a date or write 2025-01-31 14:05`,
  );

/**
 * Reads a date, a date with its time, or a time of day that is written as text: ISO 8601 with and without offset; with
 * dots the day first; with slashes or hyphens in the order that the column shows; months by English and German names;
 * two-digit years as 20yy; a.m. and p.m.
 *
 * @param habits what the column has shown; what this text shows is added
 */
export function parseStampText(written: string, habits: DateHabits): ParsedStamp {
  const text = written.replace(/\s+/g, ' ').trim();
  const clock = clockOf(text);
  if (clock !== undefined) {
    return clock === null ? bad('not-a-date', `says "${text}", which is no time`) : { kind: 'clock', ms: clock };
  }
  const bare = text.replace(WEEKDAY, '');
  const yearFirst = YEAR_FIRST.exec(bare);
  if (yearFirst) return fromParts(text, [yearFirst[1], yearFirst[3], yearFirst[4]], yearFirst[5]);
  const compact = COMPACT.exec(bare);
  if (compact) {
    const [, year, month, day, hour, minute, second = '00'] = compact;
    return fromParts(text, [year, month, day], hour === undefined ? '' : `${hour}:${minute}:${second}`);
  }
  const numbers = NUMBERS.exec(bare);
  if (numbers) return fromNumbers(text, numbers, habits);
  const dayName = DAY_NAME.exec(bare);
  const nameDay = dayName ? null : NAME_DAY.exec(bare);
  const [day, name, year, rest] = dayName
    ? dayName.slice(1)
    : nameDay
      ? [nameDay[2], nameDay[1], nameDay[3], nameDay[4]]
      : [];
  const month = name === undefined ? 0 : monthOf(name);
  return month === 0 ? noDate(text) : fromParts(text, [year, String(month), day], rest);
}

function monthOf(name: string): number {
  const folded = name.normalize('NFKD').replace(/\p{M}/gu, '').toLowerCase();
  return MONTHS.findIndex((names) => names.some((month) => month.startsWith(folded))) + 1;
}

function fromNumbers(text: string, match: RegExpExecArray, habits: DateHabits): ParsedStamp {
  const [, first, sign, second, year, rest] = match;
  const dayFirst = fromParts(text, [year, second, first], rest);
  if (sign === '.') return dayFirst;
  if (year.length === 2 && Number(year) < LEAST_SHORT_YEAR && Number(first) >= LEAST_SHORT_YEAR) {
    return bad('ambiguous-date', `holds the text "${text}", which may have the year first; write it as 2025-01-31`);
  }
  const monthFirst = fromParts(text, [year, first, second], rest);
  if (monthFirst.kind === 'bad' || dayFirst.kind === 'bad') {
    const read = monthFirst.kind === 'bad' ? dayFirst : monthFirst;
    if (read.kind !== 'bad') note(habits, read === dayFirst);
    return read;
  }
  if (first === second) return dayFirst;
  const [one, other] = [dayFirst, monthFirst].map((stamp) => (stamp as { ms: number }).ms);
  const { latest = Infinity } = habits;
  if (one > latest !== other > latest && habits.order === undefined) note(habits, other > latest);
  const order = decide(habits);
  if (order !== null) return order === 'day-month' ? dayFirst : monthFirst;
  return dayFirst.kind === 'local'
    ? { kind: 'ambiguous', dayFirst: one, monthFirst: other }
    : bad('ambiguous-date', `holds "${text}", in which day and month could be swapped; write it as 2025-01-31`);
}

function note(habits: DateHabits, isDayFirst: boolean): void {
  if (isDayFirst) habits.sawDayFirst = true;
  else habits.sawMonthFirst = true;
}

/** The order that was answered, or that the column has shown without contradicting itself. */
export function decide({ order, sawDayFirst, sawMonthFirst }: DateHabits): 'day-month' | 'month-day' | null {
  if (order !== undefined) return order;
  if (sawDayFirst === sawMonthFirst) return null;
  return sawDayFirst ? 'day-month' : 'month-day';
}

/** Milliseconds of a time of day; null for one that does not exist, undefined for what is none. */
function clockOf(text: string): number | null | undefined {
  const match = CLOCK.exec(text) ?? GERMAN_CLOCK.exec(text);
  if (!match) return undefined;
  const [, hours, minutes, seconds = '0', fraction = '0', half] = match;
  let hour = Number(hours);
  if (half !== undefined) {
    if (hour < 1 || hour > 12) return null;
    hour = (hour % 12) + (half.toLowerCase() === 'p' ? 12 : 0);
  }
  const [minute, second] = [Number(minutes), Number(seconds)];
  const ms = (hour * 60 + minute) * 60_000 + second * 1000 + Math.round(Number(`0.${fraction}`) * 1000);
  return minute > 59 || second > 59 || hour > 24 || (hour === 24 && ms > 86_400_000) ? null : ms;
}

function fromParts(text: string, date: string[], rest: string): ParsedStamp {
  const [written, month, day] = date.map(Number);
  const year = date[0].length === 2 ? 2000 + written : written;
  const after = rest.replace(/^[T,\s]+/i, '').trim();
  const offset = OFFSET.exec(after)?.[1];
  const time = offset === undefined ? after : after.slice(0, -offset.length).trim();
  const clock = time === '' ? 0 : clockOf(time);
  if (clock === undefined) return noDate(text);
  const midnight = Date.UTC(year, month - 1, day);
  const isReal = new Date(midnight).getUTCMonth() === month - 1 && new Date(midnight).getUTCDate() === day;
  if (!isReal || clock === null) return unreal(text);
  if (offset === undefined) return checked({ kind: 'local', ms: midnight + clock });
  const minutes = offsetMinutes(offset);
  return minutes === null ? unreal(text) : checked({ kind: 'instant', ms: midnight + clock - minutes * 60_000 });
}

function offsetMinutes(offset: string): number | null {
  const named = NAMED_OFFSETS[offset.toUpperCase()];
  if (named !== undefined) return named;
  const [, sign, hours, minutes = '00'] = /([+-])(\d{2}):?(\d{2})?$/.exec(offset) ?? [];
  if (sign === undefined || Number(hours) > 14 || Number(minutes) > 59) return null;
  return (Number(hours) * 60 + Number(minutes)) * (sign === '-' ? -1 : 1);
}

/** The stamp, unless it lies before the year 2000. */
export function checked(stamp: { kind: 'local' | 'instant'; ms: number }): ParsedStamp {
  if (stamp.ms >= FIRST_STAMP) return stamp;
  const day = new Date(stamp.ms).toISOString().slice(0, 10);
  return bad('stamp-before-2000', `says ${day}; stamps before the year 2000 are not read`);
}
