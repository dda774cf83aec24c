/** What a column's texts have shown so far, and what was answered, which decides how its texts are read. */
export interface NumberHabits {
  /** As answered; goes before what the texts show. */
  decimalSign?: '.' | ',';
  /** "12,5" or "1.234,5" was there. */
  sawDecimalComma?: boolean;
  /** "12.5" or "1,234.5" was there. */
  sawDecimalPoint?: boolean;
  /** "1.234,5" or "1.234.567" was there. */
  sawGroupPoint?: boolean;
  /** "1,234.5" or "1,234,567" was there. */
  sawGroupComma?: boolean;
  /** How many texts such as "10.125" were taken as decimal before anything else told. */
  assumedPoints?: number;
}

export const newHabits = (decimalSign?: '.' | ','): NumberHabits => ({ decimalSign });

const AMBIGUOUS = 'ambiguous';
const SPACES = /(?<=\d)[\s'’‘ʼ´`](?=\d{3}(?!\d))/gu;
const NUMBER = /^([+-]?)(\d[\d.,]*|[.,]\d+)(e[+-]?\d+)?$/i;

/**
 * A number written as text, with a decimal point or comma and with groups of thousands (blank, thin or no-break space,
 * apostrophe, point or comma).
 *
 * - both signs ("1.234,56", "1,234.56"): the last is the decimal sign
 * - a sign that stands twice ("1,234,567") makes groups
 * - one sign before other than three digits, or after more than three or a 0 ("12,5", "0,125"): decimal
 * - one comma before three digits ("10,125"): decimal in a column that has shown decimal commas and no decimal points, a
 *   group in one that has shown groups by commas, ambiguous in others
 * - one point before three digits ("10.125"): a group in a column that has shown groups by points, ambiguous in one that
 *   has shown decimal commas, decimal in others
 *
 * @param habits what the column has shown; what this text shows is added
 * @returns the number, null when it is none, 'ambiguous' when it could be two
 */
export function parseNumberText(written: string, habits: NumberHabits): number | 'ambiguous' | null {
  const text = written.trim().replace(/[−–]/g, '-').replace(SPACES, '').replace(/^'/, '');
  const match = NUMBER.exec(text.replace(/^([^-]+)-$/, '-$1'));
  if (!match) return null;
  const [, sign, digits, exponent = ''] = match;
  const plain = toPlainDecimal(digits, exponent === '' ? habits : newHabits(lastSign(digits)));
  if (plain === null || plain === AMBIGUOUS) return plain;
  const value = Number(`${sign}${plain}${exponent}`);
  return Number.isFinite(value) ? value : null;
}

/** Both readings of a text that is ambiguous, as the decimal number and as the number with groups. */
export function bothReadings(written: string): { decimal: number; grouped: number; sign: '.' | ',' } {
  const sign = written.includes(',') ? ',' : '.';
  const read = (decimalSign: '.' | ','): number => parseNumberText(written, newHabits(decimalSign)) as number;
  return { decimal: read(sign), grouped: read(sign === ',' ? '.' : ','), sign };
}

/** The digits with a decimal point and no groups, `AMBIGUOUS`, or null. */
function toPlainDecimal(digits: string, habits: NumberHabits): string | null {
  const points = digits.split('.').length - 1;
  const commas = digits.split(',').length - 1;
  if (points + commas === 0) return digits;
  if (habits.decimalSign !== undefined) return byDecimalSign(digits, habits.decimalSign);
  if (points > 0 && commas > 0) return byDecimalSign(digits, note(habits, lastSign(digits), true));
  const sign = points > 0 ? '.' : ',';
  if (points + commas > 1) {
    const plain = byDecimalSign(digits, other(sign));
    if (plain !== null) note(habits, other(sign), true, false);
    return plain;
  }
  if (!/^[1-9]\d{0,2}[.,]\d{3}$/.test(digits)) return byDecimalSign(digits, note(habits, sign, false));
  const decimal = decideBetween(sign, habits);
  return decimal === null ? AMBIGUOUS : byDecimalSign(digits, decimal);
}

/** Which sign is the decimal one in a text such as "10,125" or "10.125"; null where that is not sure. */
function decideBetween(sign: '.' | ',', habits: NumberHabits): '.' | ',' | null {
  const { sawDecimalComma, sawDecimalPoint, sawGroupComma, sawGroupPoint } = habits;
  if (sign === ',') {
    if (sawGroupComma) return sawDecimalComma ? null : '.';
    return sawDecimalComma && !sawDecimalPoint ? ',' : null;
  }
  if (sawGroupPoint) return sawDecimalPoint ? null : ',';
  if (sawDecimalComma) return null;
  if (!sawDecimalPoint) habits.assumedPoints = (habits.assumedPoints ?? 0) + 1;
  return '.';
}

const other = (sign: '.' | ','): '.' | ',' => (sign === '.' ? ',' : '.');
const lastSign = (digits: string): '.' | ',' => (digits.lastIndexOf(',') > digits.lastIndexOf('.') ? ',' : '.');

function note(habits: NumberHabits, decimal: '.' | ',', hasGroups: boolean, hasDecimal = true): '.' | ',' {
  if (decimal === ',') {
    habits.sawDecimalComma ||= hasDecimal;
    habits.sawGroupPoint ||= hasGroups;
  } else {
    habits.sawDecimalPoint ||= hasDecimal;
    habits.sawGroupComma ||= hasGroups;
  }
  return decimal;
}

/** The digits as a plain decimal where `decimal` is the decimal sign and the other one makes groups; null when they do not fit. */
function byDecimalSign(digits: string, decimal: '.' | ','): string | null {
  const [whole, fraction, more] = digits.split(decimal);
  const group = other(decimal);
  if (more !== undefined || fraction?.includes(group)) return null;
  if (whole.includes(group) && !isGrouped(whole, group)) return null;
  const plain = whole.split(group).join('');
  return fraction === undefined ? plain : `${plain}.${fraction}`;
}

const isGrouped = (whole: string, sign: string): boolean => {
  const [first, ...rest] = whole.split(sign);
  return /^\d{1,3}$/.test(first) && rest.every((group) => /^\d{3}$/.test(group));
};
