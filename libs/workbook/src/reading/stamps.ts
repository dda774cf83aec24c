import type { Cell } from '../container/sheet-rows';
import { isMissing } from './values';

const DAY = 86_400_000;
/** Days from 1899-12-30 to 1970-01-01. */
const UNIX_DAY = 25_569;
/** Days by which the 1904 system's serial is smaller for the same day. */
const SYSTEM_SHIFT = 1_462;
/** 9999-12-31, the last day Excel knows. */
const LAST_SERIAL = 2_958_465;
const FIRST_STAMP = Date.UTC(2000, 0, 1);

/** A stamp cell: a wall clock without zone (`local`, as if it were UTC), an instant, a time of day, or why it is none. */
export type ParsedStamp =
  | { kind: 'local'; ms: number }
  | { kind: 'instant'; ms: number }
  | { kind: 'clock'; ms: number }
  | { kind: 'missing' }
  | { kind: 'bad'; code: string; why: string };

/**
 * Excel's serial day number as a wall clock in milliseconds, as if it were UTC, to the nearest millisecond.
 * 1900 system: 1899-12-30 + serial from 61 on, one day later below 60; serial 60 is 1900-02-29, which never was.
 * 1904 system: 1904-01-01 + serial.
 *
 * @param serial days, with the time of day as their fraction
 * @param dateSystem the workbook's, 1900 or 1904
 * @returns milliseconds, or null for serial 60 of the 1900 system and for a serial that Excel has no date for
 */
export function serialToLocal(serial: number, dateSystem: 1900 | 1904): number | null {
  const days = dateSystem === 1904 ? serial + SYSTEM_SHIFT : serial;
  if (!(serial >= 0 && days < LAST_SERIAL + 1)) return null;
  const whole = Math.floor(days);
  if (dateSystem === 1900 && whole === 60) return null;
  const shift = dateSystem === 1900 && whole < 60 ? 1 : 0;
  return (whole + shift - UNIX_DAY) * DAY + Math.round((days - whole) * DAY);
}

const bad = (code: string, why: string): ParsedStamp => ({ kind: 'bad', code, why });

/** Reads a cell of a time, date or time-of-day column. */
export function parseStamp(cell: Cell | undefined, dateSystem: 1900 | 1904): ParsedStamp {
  if (isMissing(cell)) return { kind: 'missing' };
  const { kind, number, text } = cell!;
  if (kind === 'number') return fromSerial(number, dateSystem);
  if (kind === 'text') return fromText(text.trim());
  if (kind === 'error') return bad('error-cell', `shows the Excel error ${text}`);
  if (kind === 'boolean') return bad('not-a-date', `says ${text}, which is no date or time`);
  return bad('formula-without-result', 'has a formula without a stored result; open the workbook in Excel and save it');
}

function fromSerial(serial: number, dateSystem: 1900 | 1904): ParsedStamp {
  if (serial >= 0 && serial < 1) return { kind: 'clock', ms: Math.round(serial * DAY) };
  const ms = serialToLocal(serial, dateSystem);
  if (ms !== null) return checked({ kind: 'local', ms });
  if (serial >= 60 && serial < 61)
    return bad('date-does-not-exist', "is Excel's day 60, 29 February 1900, which never was");
  return bad('not-a-date', `holds the number ${serial}, which is no Excel date; store it as a date with its time`);
}

function checked(stamp: { kind: 'local' | 'instant'; ms: number }): ParsedStamp {
  if (stamp.ms >= FIRST_STAMP) return stamp;
  const day = new Date(stamp.ms).toISOString().slice(0, 10);
  return bad('stamp-before-2000', `says ${day}; stamps before the year 2000 are not read`);
}

const TIME = String.raw`(\d{1,2}):(\d{2})(?::(\d{2})(?:[.,](\d{1,9}))?)?`;
const ISO = new RegExp(String.raw`^(\d{4})-(\d{2})-(\d{2})(?:[T ]+${TIME})?\s*(Z|UTC|[+-]\d{2}:?\d{2})?$`, 'i');
const DOTTED = new RegExp(String.raw`^(\d{1,2})\.(\d{1,2})\.(\d{4})(?:,?[T ]+${TIME})?(?: Uhr)?$`, 'i');
const CLOCK = new RegExp(String.raw`^${TIME}(?: ?([ap])\.?m\.?| Uhr)?$`, 'i');

function fromText(text: string): ParsedStamp {
  const clock = CLOCK.exec(text);
  if (clock) return fromClockText(clock, text);
  const iso = ISO.exec(text);
  if (iso) return fromParts(text, iso.slice(1, 4).map(Number), iso.slice(4, 8), iso[8]);
  const dotted = DOTTED.exec(text);
  if (dotted) return fromParts(text, [Number(dotted[3]), Number(dotted[2]), Number(dotted[1])], dotted.slice(4, 8));
  if (/^\d{1,2}[/-]\d{1,2}[/-]\d{2,4}\b/.test(text) || /^\d{1,2}\.\d{1,2}\.\d{2}\b/.test(text)) {
    return bad(
      'ambiguous-date',
      `holds the text "${text}", in which day, month or year could be confused; store it as a date or write 2025-01-31`,
    );
  }
  return bad(
    'not-a-date',
    `says "${text.slice(0, 40)}", which is no date or time; store it as a date or write 2025-01-31 14:05`,
  );
}

function fromClockText(match: RegExpExecArray, text: string): ParsedStamp {
  const half = match[5]?.toLowerCase();
  let hour = Number(match[1]);
  if (half && (hour < 1 || hour > 12)) return bad('not-a-date', `says "${text}", which is no time`);
  if (half) hour = (hour % 12) + (half === 'p' ? 12 : 0);
  const ms = clockMs([String(hour), match[2], match[3], match[4]]);
  return ms === null ? bad('not-a-date', `says "${text}", which is no time`) : { kind: 'clock', ms };
}

function clockMs([hour, minute, second = '0', fraction = '0']: (string | undefined)[]): number | null {
  if (hour === undefined) return 0;
  const [h, m, s] = [Number(hour), Number(minute), Number(second)];
  if (h > 23 || m > 59 || s > 59) return null;
  return (h * 60 + m) * 60_000 + s * 1000 + Math.round(Number(`0.${fraction}`) * 1000);
}

function fromParts(text: string, date: number[], clock: (string | undefined)[], offset?: string): ParsedStamp {
  const [year, month, day] = date;
  const midnight = Date.UTC(year, month - 1, day);
  const isReal = new Date(midnight).getUTCMonth() === month - 1 && new Date(midnight).getUTCDate() === day;
  const ms = clockMs(clock);
  if (!isReal || ms === null) return bad('date-does-not-exist', `says "${text}", a date or time that does not exist`);
  if (!offset) return checked({ kind: 'local', ms: midnight + ms });
  const [, sign, hours, minutes] = /^([+-])(\d{2}):?(\d{2})$/.exec(offset) ?? ['', '+', '0', '0'];
  const shift = (Number(hours) * 60 + Number(minutes)) * 60_000 * (sign === '-' ? -1 : 1);
  return checked({ kind: 'instant', ms: midnight + ms - shift });
}
