import type { Cell } from '../container/sheet-rows';
import { checked, parseStampText, type DateHabits, type ParsedStamp } from './date-texts';
import { isMissing } from './values';

export type { DateHabits, ParsedStamp } from './date-texts';

const DAY = 86_400_000;
/** Days from 1899-12-30 to 1970-01-01. */
const UNIX_DAY = 25_569;
/** Days by which the 1904 system's serial is smaller for the same day. */
const SYSTEM_SHIFT = 1_462;
/** 9999-12-31, the last day Excel knows. */
const LAST_SERIAL = 2_958_465;

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

/**
 * Reads a cell of a time, date or time-of-day column.
 *
 * @param habits what the column has shown, see `parseStampText`
 */
export function parseStamp(cell: Cell | undefined, dateSystem: 1900 | 1904, habits: DateHabits = {}): ParsedStamp {
  if (isMissing(cell)) return { kind: 'missing' };
  const { kind, number, text } = cell!;
  if (kind === 'number') return fromSerial(number, dateSystem);
  if (kind === 'text') return parseStampText(text, habits);
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
