import type { Instant } from '@app/contracts';

/** How much of an instant is shown. All in 24 h and in the plant's own zone. */
export type TimeForm = 'full' | 'date' | 'short' | 'day' | 'weekday' | 'time' | 'seconds' | 'exact';

const FORMS: Record<TimeForm, Intl.DateTimeFormatOptions> = {
  full: { weekday: 'short', day: 'numeric', month: 'short', year: 'numeric', hour: '2-digit', minute: '2-digit' },
  date: { day: 'numeric', month: 'short', year: 'numeric' },
  short: { day: 'numeric', month: 'short', hour: '2-digit', minute: '2-digit' },
  day: { weekday: 'short', day: 'numeric', month: 'short' },
  weekday: { weekday: 'short', day: 'numeric' },
  time: { hour: '2-digit', minute: '2-digit' },
  seconds: { day: 'numeric', month: 'short', hour: '2-digit', minute: '2-digit', second: '2-digit' },
  exact: {
    day: 'numeric',
    month: 'short',
    year: 'numeric',
    hour: '2-digit',
    minute: '2-digit',
    second: '2-digit',
  },
};

const formatters = new Map<string, Intl.DateTimeFormat>();

/** An instant (ISO text or epoch milliseconds) as the plant's clocks show it: "Tue 1 Dec 2026, 14:05". */
export function formatInstant(at: Instant | number, timeZone: string, form: TimeForm = 'full'): string {
  const key = `${timeZone} ${form}`;
  let formatter = formatters.get(key);
  if (formatter === undefined) {
    formatter = new Intl.DateTimeFormat('en-GB', { ...FORMS[form], timeZone, hourCycle: 'h23' });
    formatters.set(key, formatter);
  }
  const date = new Date(at);
  if (Number.isNaN(date.getTime())) return '–';
  const parts = Object.fromEntries(formatter.formatToParts(date).map((part) => [part.type, part.value]));
  const day = [parts.weekday, parts.day, parts.month, parts.year].filter(Boolean).join(' ');
  const time = [parts.hour, parts.minute, parts.second].filter(Boolean).join(':');
  return [day, time].filter((text) => text !== '').join(form === 'full' ? ', ' : ' ');
}

/** The instant at which the plant's clocks show this local date and time ("2026-12-01", "14:05"), as ISO text in UTC. */
export function plantInstant(date: string, time: string, timeZone: string): Instant {
  const wanted = Date.parse(`${date}T${time}:00Z`);
  let guess = wanted - offsetAt(wanted, timeZone);
  guess = wanted - offsetAt(guess, timeZone);
  return new Date(guess).toISOString();
}

/** The plant's calendar day of an instant, as "2026-12-01". */
export function plantDay(at: Instant | number, timeZone: string): string {
  const date = new Date(at);
  return new Date(date.getTime() + offsetAt(date.getTime(), timeZone)).toISOString().slice(0, 10);
}

/** Local minus universal time in milliseconds. */
function offsetAt(epochMs: number, timeZone: string): number {
  const parts = new Intl.DateTimeFormat('en-GB', {
    timeZone,
    hourCycle: 'h23',
    year: 'numeric',
    month: '2-digit',
    day: '2-digit',
    hour: '2-digit',
    minute: '2-digit',
    second: '2-digit',
  }).formatToParts(new Date(epochMs));
  const part = (type: string) => Number(parts.find((item) => item.type === type)?.value);
  const local = Date.UTC(part('year'), part('month') - 1, part('day'), part('hour'), part('minute'), part('second'));
  return local - Math.floor(epochMs / 1000) * 1000;
}
