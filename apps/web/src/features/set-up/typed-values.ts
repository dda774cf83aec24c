import { plantInstant } from '../../shared/time/plant-time';

const NUMBER = /^[-+]?(\d+(\.\d*)?|\.\d+)$/;
const DAY = /^\d{4}-\d{2}-\d{2}$/;
const TIME = /^([01]\d|2[0-3]):[0-5]\d$/;

export const NOT_A_NUMBER = 'Write a number with a decimal point, such as 12.5.';
export const NOT_A_DAY = 'Give the day as 2026-12-01.';
export const NOT_A_TIME = 'Give the time as 14:05.';

/** A typed number; null for an empty field, NaN for anything else: a comma is never guessed at. */
export function readNumber(text: string): number | null {
  const plain = text.trim().replace(/^\u2212/, '-');
  if (plain === '') return null;
  return NUMBER.test(plain) ? Number(plain) : Number.NaN;
}

/** How a number that is there already stands in a field. */
export const numberText = (value: number | null): string => (value === null ? '' : String(value));

/** A share as per cent and back, without the binary tail: 0.07 → "7". */
export const percentText = (share: number): string => String(Number((share * 100).toPrecision(12)));
export const shareOf = (percent: string): number => Number(((readNumber(percent) ?? Number.NaN) / 100).toPrecision(12));

export function isDay(text: string): boolean {
  if (!DAY.test(text)) return false;
  const at = new Date(`${text}T00:00:00Z`);
  return !Number.isNaN(at.getTime()) && at.toISOString().slice(0, 10) === text;
}

export const isTime = (text: string): boolean => TIME.test(text);

/** The day after or before a day of the calendar. */
export function dayPlus(day: string, days: number): string {
  return new Date(Date.parse(`${day}T00:00:00Z`) + days * 86_400_000).toISOString().slice(0, 10);
}

/** A typed day and time as the plant's clocks show them, as an instant. */
export const instantOf = (day: string, time: string, timeZone: string): string =>
  plantInstant(day.trim(), time.trim(), timeZone);
