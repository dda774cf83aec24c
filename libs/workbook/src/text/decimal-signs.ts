import { newHabits, parseNumberText } from '../reading/number-texts';

/** A number by itself, after < or >, or before a unit; no date, no time. */
const NUMBER = /^[<>]?\s*([+-]?[\d.,]*\d)(?:\s*[^\d.,\s:/-].*)?$/;
const MAX_LENGTH = 40;

/** The decimal sign that the fields show beyond doubt ("12,5", "1.234,5"); null where they show none, or both. */
export function recogniseDecimalSign(records: readonly string[][]): '.' | ',' | null {
  const habits = newHabits();
  for (const field of records.flat()) {
    const written = field.length <= MAX_LENGTH ? NUMBER.exec(field.trim())?.[1] : undefined;
    if (written !== undefined && /[.,]/.test(written)) parseNumberText(written, habits);
  }
  const { sawDecimalComma = false, sawDecimalPoint = false, assumedPoints = 0 } = habits;
  if (sawDecimalComma) return sawDecimalPoint ? null : ',';
  return sawDecimalPoint || assumedPoints > 0 ? '.' : null;
}
