import { IANAZone } from 'luxon';
import { ROLE_NAMES, ROLES, type Role } from '@app/contracts';
import type { Cell } from '../container/sheet-rows';
import { cellText } from '../reading/texts';
import { parseStamp, serialToLocal } from '../reading/stamps';
import { isBlank, parseNumberText } from '../reading/values';
import type { ZoneClock } from '../reading/zone-clock';
import { quoted, unescapeText } from './texts';

/** What a cell holds, or why it cannot be taken. */
export type CellRead = { ok: true; value: unknown } | { ok: false; code: string; what: string; whatToDo: string };

export interface CellContext {
  dateSystem: 1900 | 1904;
  /** Of the plant. */
  zone: ZoneClock;
}

export type CellReader = (cell: Cell | undefined, context: CellContext) => CellRead;

const took = (value: unknown): CellRead => ({ ok: true, value });
/** `what` follows "Cell B4 ". */
const fault = (code: string, what: string, whatToDo: string): CellRead => ({ ok: false, code, what, whatToDo });

const DAY = 86_400_000;

/** Turns away what no reader takes; an empty cell gives null. */
function guarded(read: (cell: Cell, context: CellContext) => CellRead): CellReader {
  return (cell, context) => {
    if (isBlank(cell)) return took(null);
    if (cell!.kind === 'error')
      return fault('error-cell', `shows the Excel error ${cell!.text}`, 'Write the value itself.');
    if (cell!.kind === 'formula-without-result')
      return fault(
        'formula-without-result',
        'has a formula without a stored result',
        'Write the value itself, or open the workbook in Excel and save it.',
      );
    return read(cell!, context);
  };
}

/** The cell as a text without blanks around it; a number as it is written out. */
function textOf(cell: Cell): string {
  return cell.kind === 'number' ? (cellText(cell) ?? '') : unescapeText(cell.text).trim();
}

export const text = (maxLength: number): CellReader =>
  guarded((cell) => {
    if (cell.kind === 'number' && cell.format.isDate)
      return fault(
        'text-is-a-date',
        'holds a date; Excel may have changed a typed text into it',
        'Format the cell as text and write it again.',
      );
    const value = textOf(cell);
    if (value.length > maxLength)
      return fault(
        'too-long',
        `holds ${value.length} characters, and at most ${maxLength} fit`,
        'Write a shorter text.',
      );
    if (/[\u0000-\u001f\u007f]/.test(value))
      return fault('control-character', 'holds a line break or another control character', 'Write it in one line.');
    return took(value);
  });

/** A number; `isPercent` ones are per cent, however Excel formats them. */
export const number = ({ isPositive = false, isPercent = false } = {}): CellReader =>
  guarded((cell) => {
    const value = numberOf(cell, isPercent);
    if (value === null || value === 'ambiguous')
      return fault(
        'not-a-number',
        value === null
          ? `says ${quoted(textOf(cell) || cell.text)}, which is no number`
          : `says ${quoted(cell.text)}, which could be read in two ways`,
        'Write a number without its unit.',
      );
    if (isPositive && !(value > 0))
      return fault('not-positive', `holds ${value}, which is not above zero`, 'Write a number above zero.');
    return took(value);
  });

function numberOf(cell: Cell, isPercent: boolean): number | 'ambiguous' | null {
  if (cell.kind === 'text') return parseNumberText(unescapeText(cell.text).trim(), { sawDecimalComma: false });
  if (cell.kind !== 'number' || cell.format.isDate || !Number.isFinite(cell.number)) return null;
  if (!cell.format.isPercent) return cell.number;
  return isPercent ? Number((cell.number * 100).toPrecision(15)) : null;
}

export const yesNo: CellReader = guarded((cell) => {
  const value = cell.kind === 'boolean' ? cell.text : textOf(cell);
  if (/^(yes|true|1)$/i.test(value)) return took(true);
  if (/^(no|false|0)$/i.test(value)) return took(false);
  return fault('not-yes-or-no', `says ${quoted(value)}`, 'Write yes or no.');
});

/** A time of day as HH:MM. */
export const clock: CellReader = guarded((cell, { dateSystem }) => {
  const read = parseStamp({ ...cell, text: unescapeText(cell.text) }, dateSystem);
  if (read.kind !== 'clock' || read.ms % 60_000 !== 0)
    return fault('not-a-time', `says ${quoted(textOf(cell))}, which is no time of day`, 'Write it as 06:00.');
  return took(new Date(read.ms).toISOString().slice(11, 16));
});

/** A day as YYYY-MM-DD. */
export const day: CellReader = guarded((cell, { dateSystem }) => {
  const local = localOf(cell, dateSystem);
  if (typeof local !== 'number' || local % DAY !== 0)
    return fault('not-a-day', `says ${quoted(textOf(cell))}, which is no day`, 'Write it as 2026-01-31.');
  return took(new Date(local).toISOString().slice(0, 10));
});

/** An instant in epoch ms: a wall clock of the plant's zone, or a text with an offset. */
export const stamp: CellReader = guarded((cell, { dateSystem, zone }) => {
  const local = localOf(cell, dateSystem);
  if (local === null)
    return fault(
      'not-a-date',
      `says ${quoted(textOf(cell))}, which is no date or time`,
      'Write it as 2026-01-31 14:05.',
    );
  if (typeof local !== 'number') return took(local.instant);
  const instants = zone.instantsOf(local);
  if (instants.length === 1) return took(instants[0]);
  const shown = new Date(local).toISOString().slice(0, 16).replace('T', ' ');
  return instants.length === 0
    ? fault('time-skipped', `says ${shown}, which the clocks of the plant jump over`, 'Write another time.')
    : fault(
        'time-twice',
        `says ${shown}, which the clocks of the plant show twice`,
        `Write it as a text with its offset, such as ${new Date(instants[0]).toISOString().replace('.000', '')}.`,
      );
});

function localOf(cell: Cell, dateSystem: 1900 | 1904): number | { instant: number } | null {
  if (cell.kind === 'number') return cell.number < 1 ? null : serialToLocal(cell.number, dateSystem);
  const read = parseStamp({ ...cell, text: unescapeText(cell.text) }, dateSystem);
  if (read.kind === 'local') return read.ms;
  return read.kind === 'instant' ? { instant: read.ms } : null;
}

export const timeZone: CellReader = guarded((cell) => {
  const value = textOf(cell);
  if (/^[A-Za-z]+\/|^UTC$/.test(value) && IANAZone.isValidZone(value)) return took(value);
  return fault(
    'unknown-zone',
    `says ${quoted(value)}, which is no time zone that is known`,
    'Write the zone by its IANA name, such as Europe/London.',
  );
});

export const currency: CellReader = guarded((cell) => {
  const value = textOf(cell);
  if (/^[A-Z]{3}$/.test(value)) return took(value);
  return fault(
    'not-a-currency',
    `says ${quoted(value)}, which is no currency code`,
    'Write three capital letters, such as EUR, or leave the cell empty.',
  );
});

export const email: CellReader = guarded((cell) => {
  const value = textOf(cell).toLowerCase();
  if (value.length <= 254 && /^[^\s@,;<>"]+@[^\s@,;<>".]+(\.[^\s@,;<>".]+)+$/.test(value)) return took(value);
  return fault(
    'bad-address',
    `says ${quoted(value)}, which is no mail address`,
    'Write one address, such as name@plant.example.',
  );
});

/** A semicolon parts names, two of them are one in a name. */
const splitList = (value: string): string[] =>
  value
    .split(/(?<!;);(?!;)/)
    .map((part) => part.replace(/;;/g, ';').trim())
    .filter((part) => part !== '');

export const joinList = (names: readonly string[]): string => names.map((name) => name.replace(/;/g, ';;')).join('; ');

/** Names between semicolons, since a name may have a comma in it. */
export const list: CellReader = guarded((cell) => took([...new Set(splitList(textOf(cell)))]));

export const roles: CellReader = guarded((cell) => {
  const found: Role[] = [];
  for (const part of splitList(textOf(cell).replace(/,/g, ';'))) {
    const role = ROLES.find((one) => one === part.toLowerCase() || ROLE_NAMES[one] === part.toLowerCase());
    if (!role)
      return fault(
        'unknown-role',
        `says ${quoted(part)}, which is no role`,
        `Write one or more of these, with a semicolon between: ${ROLES.map((one) => ROLE_NAMES[one]).join('; ')}.`,
      );
    if (!found.includes(role)) found.push(role);
  }
  return took(found);
});
