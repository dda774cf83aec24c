import type { Cell } from '../container/sheet-rows';
import { isSameUnit } from './names';

export type ParsedValue =
  | { kind: 'value'; value: number; note: 'number-stored-as-text' | 'percent-cell' | 'looks-like-a-code' | null }
  | { kind: 'censored'; censoring: 'below' | 'above' }
  | { kind: 'missing' }
  | { kind: 'bad'; code: string; why: string };

/** What a column has shown so far that decides how its texts are read. */
export interface ColumnHabits {
  sawDecimalComma: boolean;
}

const MISSING = new Set([
  '-',
  '--',
  '---',
  '–',
  '—',
  'n/a',
  'na',
  'n.a.',
  'n. a.',
  'k.a.',
  'k. a.',
  'nan',
  'null',
  'none',
  '.',
  '/',
  '#n/a',
]);
const ABOVE = /^(ol|o\.l\.?|over|overload|over ?range|overflow|high|>\s*max|überlauf|über)$/i;
const BELOW = /^(ul|u\.l\.?|under|underload|under ?range|underflow|low|<\s*(lod|loq|min)|unter|<\s*ng|<\s*bg)$/i;
const CENSORED_NUMBER = /^([<>≤≥])=?\s*[+-]?[\d.,\s]*\d\s*([^\d\s.,+\-−±].*)?$/;
/** Longer texts are no numbers, and not worth matching. */
const MAX_VALUE_TEXT = 60;
const AMBIGUOUS = 'ambiguous';
/** Numbers that instruments write instead of a reading. */
const CODES = new Set([999, 9999, 99999, 999999]);

export const isBlank = (cell: Cell | undefined): boolean =>
  cell === undefined || (cell.kind === 'text' && cell.text.trim() === '');

export const isMissing = (cell: Cell | undefined): boolean =>
  isBlank(cell) || (cell!.kind === 'text' && MISSING.has(cell!.text.trim().toLowerCase()));

/**
 * Reads a cell as a reading in `unit`. Blank, "-", "n/a" are missing and never zero; "<0.05", ">MAX", "OL" are censored;
 * a number in a text is read where its decimal sign is beyond doubt, otherwise it is a problem.
 */
export function parseValue(cell: Cell | undefined, unit: string, habits: ColumnHabits): ParsedValue {
  if (isMissing(cell)) return { kind: 'missing' };
  const { kind, text, number, format } = cell!;
  if (kind === 'number') {
    if (!Number.isFinite(number)) return bad('not-a-number', 'holds a number too large for a computer');
    if (format.isDate)
      return bad('value-is-a-date', 'is a date or time; Excel may have changed a typed number into it');
    if (format.isPercent) return fromPercent(number, unit);
    return { kind: 'value', value: number, note: CODES.has(Math.abs(number)) ? 'looks-like-a-code' : null };
  }
  if (kind === 'error') return bad('error-cell', `shows the Excel error ${text}`);
  if (kind === 'formula-without-result') {
    return bad(
      'formula-without-result',
      'has a formula without a stored result; open the workbook in Excel and save it',
    );
  }
  if (kind === 'boolean') return bad('not-a-number', `says ${text}, which is no number`);
  return fromText(text.trim(), unit, habits);
}

const bad = (code: string, why: string): ParsedValue => ({ kind: 'bad', code, why });

function fromPercent(number: number, unit: string): ParsedValue {
  if (unit.trim() !== '%')
    return bad('percent-cell', `is formatted as a percentage, but the channel is in ${unit || 'no unit'}`);
  return { kind: 'value', value: Number((number * 100).toPrecision(15)), note: 'percent-cell' };
}

function fromText(text: string, unit: string, habits: ColumnHabits): ParsedValue {
  if (text.length > MAX_VALUE_TEXT) return bad('not-a-number', 'holds a long text, which is no number');
  if (ABOVE.test(text)) return { kind: 'censored', censoring: 'above' };
  if (BELOW.test(text)) return { kind: 'censored', censoring: 'below' };
  const censored = CENSORED_NUMBER.exec(text);
  if (censored) {
    if (censored[2] && !isSameUnit(censored[2], unit)) return otherUnit(text, censored[2], unit);
    return { kind: 'censored', censoring: '<≤'.includes(censored[1]) ? 'below' : 'above' };
  }
  const match = /^([+\-−]?[\d.,'’\s]*\d[.,]?(?:[eE][+-]?\d+)?)\s*([^\d\s.,+\-−±].*)?$/.exec(text);
  if (!match) return bad('not-a-number', `says "${text.slice(0, 40)}", which is no number`);
  if (match[2] && !isSameUnit(match[2], unit)) return otherUnit(text, match[2], unit);
  const value = parseNumberText(match[1], habits);
  if (value === 'ambiguous') {
    return bad('ambiguous-number', `holds the text "${text}", which could be read in two ways; store it as a number`);
  }
  if (value === null) return bad('not-a-number', `says "${text.slice(0, 40)}", which is no number`);
  return { kind: 'value', value, note: 'number-stored-as-text' };
}

const otherUnit = (text: string, found: string, unit: string): ParsedValue =>
  bad('unit-differs', `says "${text.slice(0, 40)}" in ${found.trim()}, but the channel is in ${unit || 'no unit'}`);

/**
 * A number written as text, with a decimal point or comma and with groups of thousands.
 *
 * - both signs ("1.234,56", "1,234.56"): the last is the decimal sign
 * - one comma: decimal, unless exactly three digits follow one to three that do not start with 0 ("10,125": ambiguous)
 * - one point: decimal; the same shape as above is ambiguous in a column that has shown decimal commas
 *
 * @returns the number, null when it is none, 'ambiguous' when it could be two
 */
export function parseNumberText(written: string, habits: ColumnHabits): number | 'ambiguous' | null {
  const text = written.replace(/−/g, '-').replace(/(?<=\d)[\s'’](?=\d{3}(?!\d))/gu, '');
  const match = /^([+-]?)(\d[\d.,]*|[.,]\d+)(e[+-]?\d+)?$/i.exec(text);
  if (!match) return null;
  const [, sign, digits, exponent = ''] = match;
  const plain = toPlainDecimal(digits, habits);
  if (plain === null || plain === AMBIGUOUS) return plain === null ? null : AMBIGUOUS;
  const value = Number(`${sign}${plain}${exponent}`);
  return Number.isFinite(value) ? value : null;
}

/** The digits with a decimal point and no groups, AMBIGUOUS, or null. */
function toPlainDecimal(digits: string, habits: ColumnHabits): string | null {
  const points = digits.split('.').length - 1;
  const commas = digits.split(',').length - 1;
  if (points === 0 && commas === 0) return digits;
  if (points > 0 && commas > 0) {
    const decimal = digits.lastIndexOf(',') > digits.lastIndexOf('.') ? ',' : '.';
    const group = decimal === ',' ? '.' : ',';
    const [whole, fraction, more] = digits.split(decimal);
    if (more !== undefined || !isGrouped(whole, group)) return null;
    if (decimal === ',') habits.sawDecimalComma = true;
    return `${whole.split(group).join('')}.${fraction}`;
  }
  const sign = points > 0 ? '.' : ',';
  if (points + commas > 1) return isGrouped(digits, sign) ? digits.split(sign).join('') : null;
  const couldBeGroup = /^[1-9]\d{0,2}[.,]\d{3}$/.test(digits);
  if (couldBeGroup && (sign === ',' || habits.sawDecimalComma)) return AMBIGUOUS;
  if (sign === ',') habits.sawDecimalComma = true;
  return digits.replace(',', '.');
}

const isGrouped = (whole: string, sign: string): boolean => {
  const [first, ...rest] = whole.split(sign);
  return /^\d{1,3}$/.test(first) && rest.length > 0 && rest.every((group) => /^\d{3}$/.test(group));
};
