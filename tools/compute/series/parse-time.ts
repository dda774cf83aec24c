import { parseNumber } from './parse-number';

export interface ParsedTime {
  kind: 'number' | 'iso';
  /** The number as it stands, or seconds since 1970-01-01 UTC. */
  seconds: number;
  /** An ISO time without a zone, which was read as UTC. */
  isZoneless: boolean;
}

const ISO =
  /^(\d{4})-(\d{2})-(\d{2})(?:[Tt ](\d{2}):(\d{2})(?::(\d{2})(?:[.,](\d+))?)?([Zz]|[+-]\d{2}(?::?\d{2})?)?)?$/;

/**
 * A time: a finite number, or date and time of day of ISO 8601 in extended form, with Z, an offset, or neither.
 * @returns undefined for anything else, and for dates and times that do not exist
 */
export function parseTime(text: string): ParsedTime | undefined {
  const number = parseNumber(text);
  if (number !== undefined)
    return Number.isFinite(number) ? { kind: 'number', seconds: number, isZoneless: false } : undefined;
  const match = ISO.exec(text);
  if (!match) return undefined;
  const [year, month, day, hour = 0, minute = 0, second = 0] = match.slice(1, 7).map((part) => Number(part ?? 0));
  const at = Date.UTC(year, month - 1, day, hour, minute, second);
  const date = new Date(at);
  const isReal =
    date.getUTCFullYear() === year &&
    date.getUTCMonth() === month - 1 &&
    date.getUTCDate() === day &&
    hour < 24 &&
    minute < 60 &&
    second < 60;
  const offset = offsetMinutes(match[8]);
  if (!isReal || offset === undefined) return undefined;
  const fraction = match[7] ? Number(`0.${match[7]}`) : 0;
  return { kind: 'iso', seconds: at / 1000 - offset * 60 + fraction, isZoneless: match[8] === undefined };
}

function offsetMinutes(zone: string | undefined): number | undefined {
  if (zone === undefined || zone === 'Z' || zone === 'z') return 0;
  const hours = Number(zone.slice(1, 3));
  const minutes = Number(zone.slice(3).replace(':', '') || 0);
  if (hours > 23 || minutes > 59) return undefined;
  return (zone.startsWith('-') ? -1 : 1) * (60 * hours + minutes);
}
