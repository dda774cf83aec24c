import { GENERAL } from '../container/formats';
import type { SheetDay } from './sheet-layout';
import { parseStamp } from './stamps';
import type { Titles } from './titles';

const DAY = 86_400_000;
const DATE = /(?<!\d)(\d{4}[-_.]\d{1,2}[-_.]\d{1,2}|\d{1,2}\.\d{1,2}\.\d{4}|20\d{6})(?!\d)/;
const NIGHT = /(?<!\p{L})(night|nights|night ?shift|nacht|nachtschicht|3rd shift|third shift)(?!\p{L})/iu;

/** Whether a sheet's name or a title names the night shift. */
export const isNightName = (text: string): boolean => NIGHT.test(text);

/**
 * The day that a sheet's name carries ("2026-03-02 night", "02.03.2026 Früh"), as its midnight in milliseconds as if it
 * were UTC; null where it carries none or one that does not exist.
 */
export function dayOfName(name: string): number | null {
  const found = DATE.exec(name)?.[1];
  if (!found) return null;
  const [one, two, three] = /^\d{8}$/.test(found)
    ? [found.slice(0, 4), found.slice(4, 6), found.slice(6)]
    : found.split(/[-_.]/);
  const [year, day] = one.length === 4 ? [one, three] : [three, one];
  const text = `${year}-${two.padStart(2, '0')}-${day.padStart(2, '0')}`;
  const stamp = parseStamp({ kind: 'text', number: NaN, text, format: GENERAL }, 1900);
  return stamp.kind === 'local' ? Math.floor(stamp.ms / DAY) * DAY : null;
}

/** The day that titles or the sheet's name give for all rows of a sheet; a title goes first. */
export function dayOfSheet(sheet: string, titles: Titles): SheetDay | null {
  const isShiftDate = titles.isNight || isNightName(sheet);
  if (titles.day) return { localMs: titles.day.value, from: titles.day.from, isShiftDate };
  const localMs = dayOfName(sheet);
  return localMs === null ? null : { localMs, from: "the sheet's name", isShiftDate };
}
