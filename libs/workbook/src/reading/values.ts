import type { Cell } from '../container/sheet-rows';
import { parseNumberText, type NumberHabits } from './number-texts';

export { parseNumberText } from './number-texts';
export type ColumnHabits = NumberHabits;

/** A cell of values by itself; what its number means in the channel's unit is settled by its column. */
export type ParsedValue =
  | {
      kind: 'value';
      value: number;
      /** Stated in the cell, "%" for a percentage written as text. */
      unit: string | null;
      /** A number formatted as a percentage: 0.057 shows as 5.7 %. */
      isPercent: boolean;
      isText: boolean;
      /** What follows a ± in the cell. */
      uncertainty: string | null;
    }
  | { kind: 'censored'; censoring: 'below' | 'above'; unit: string | null }
  | { kind: 'missing' }
  | { kind: 'ambiguous'; text: string }
  | { kind: 'bad'; code: string; why: string };

const MISSING = new Set(
  '-|--|---|----|-----|–|—|n/a|na|n.a.|n. a.|k.a.|k. a.|nan|null|none|.|/|#n/a|n.b.|nicht gemessen|not measured|missing|fehlt|entfällt|entf.|?'.split(
    '|',
  ),
);
/** Words of instruments and laboratories for "beyond what can be shown", in English and German. */
const ABOVE =
  /^(?:[+>]?\s*(?:ol|o\.l\.?|ovl|ovld|ovr|over|overload|over[ -]?range|overflow|ofl|inf|high|hi|sat|saturated|überlauf|über|max)|1\.#inf|>+|\+{2,}|>\s*(?:lod|loq|uloq|ul|hoch))$/i;
const BELOW =
  /^(?:-\s*(?:ol|o\.l\.?|ovl|ovld|inf)|<?\s*(?:ul|u\.l\.?|under|underload|under[ -]?range|underflow|ufl|low|lo|unter|min)|-1\.#inf|<+|<\s*(?:lod|loq|lloq|mdl|rl|ng|bg|nwg)|n\.\s?n\.|nicht nachweisbar|not detected)$/i;
const CENSORED_NUMBER = /^([<>≤≥])=?\s*[+\-−]?[\d.,'’\s]*\d(?:e[+-]?\d+)?\s*([^\d\s.,+\-−±].*)?$/i;
const NUMBER_AND_UNIT =
  /^(['+\-−–]?[\d.,'’‘ʼ´`\s]*\d[.,]?(?:[eE][+-]?\d+)?-?)\s*(?:(?:±|\+\/-|\+-)\s*([\d.,]+)\s*)?([^\d\s.,+\-−±].*)?$/;
/** Longer texts are no numbers, and not worth matching. */
const MAX_VALUE_TEXT = 60;

export const isBlank = (cell: Cell | undefined): boolean =>
  cell === undefined || (cell.kind === 'text' && cell.text.trim() === '');

export const isMissing = (cell: Cell | undefined): boolean =>
  isBlank(cell) || (cell!.kind === 'text' && MISSING.has(cell!.text.trim().toLowerCase()));

/** What a person said stands for a missing value: texts in any case, and numbers however they are written. */
export class Tokens {
  private readonly texts = new Set<string>();
  private readonly numbers = new Set<number>();

  constructor(tokens: readonly string[] = []) {
    for (const token of tokens) {
      this.texts.add(token.trim().toLowerCase());
      const number = parseNumberText(token, { sawDecimalComma: !token.includes('.') });
      if (typeof number === 'number') this.numbers.add(number);
    }
  }

  get isEmpty(): boolean {
    return this.texts.size === 0;
  }

  has(cell: Cell): boolean {
    return cell.kind === 'number' ? this.numbers.has(cell.number) : this.texts.has(cell.text.trim().toLowerCase());
  }

  hasNumber(value: number): boolean {
    return this.numbers.has(value);
  }
}

/**
 * Reads a cell of values. Blank, "-", "n/a" and what `missing` holds are missing and never zero; "<0.05", ">MAX", "OL"
 * are censored; a number in a text is read where its decimal sign is beyond doubt, otherwise it is ambiguous.
 *
 * @param habits what the column's texts have shown, see `parseNumberText`
 */
export function parseValue(cell: Cell | undefined, habits: NumberHabits, missing: Tokens): ParsedValue {
  if (isMissing(cell) || (!missing.isEmpty && missing.has(cell!))) return { kind: 'missing' };
  const { kind, text, number, format } = cell!;
  if (kind === 'number') {
    if (!Number.isFinite(number)) return bad('not-a-number', 'holds a number too large for a computer');
    if (format.isDate)
      return bad('value-is-a-date', 'is a date or time; Excel may have changed a typed number into it');
    return { kind: 'value', value: number, unit: null, isPercent: format.isPercent, isText: false, uncertainty: null };
  }
  if (kind === 'error') return bad('error-cell', `shows the Excel error ${text}`);
  if (kind === 'formula-without-result') {
    return bad(
      'formula-without-result',
      'has a formula without a stored result; open the workbook in Excel and save it',
    );
  }
  if (kind === 'boolean') return bad('not-a-number', `says ${text}, which is no number`);
  return fromText(text.trim(), habits, missing);
}

const bad = (code: string, why: string): ParsedValue => ({ kind: 'bad', code, why });
const noNumber = (text: string): ParsedValue => bad('not-a-number', `says "${text.slice(0, 40)}", which is no number`);

function fromText(text: string, habits: NumberHabits, missing: Tokens): ParsedValue {
  if (text.length > MAX_VALUE_TEXT) return bad('not-a-number', 'holds a long text, which is no number');
  if (ABOVE.test(text)) return { kind: 'censored', censoring: 'above', unit: null };
  if (BELOW.test(text)) return { kind: 'censored', censoring: 'below', unit: null };
  const censored = CENSORED_NUMBER.exec(text);
  if (censored) {
    const censoring = '<≤'.includes(censored[1]) ? 'below' : 'above';
    return { kind: 'censored', censoring, unit: censored[2]?.trim() ?? null };
  }
  const match = NUMBER_AND_UNIT.exec(text);
  if (!match) return noNumber(text);
  const [, written, uncertainty = null, unit] = match;
  const value = parseNumberText(written, habits);
  if (value === 'ambiguous') return { kind: 'ambiguous', text: written.trim() };
  if (value === null) return noNumber(text);
  if (missing.hasNumber(value)) return { kind: 'missing' };
  return { kind: 'value', value, unit: unit?.trim() ?? null, isPercent: false, isText: true, uncertainty };
}
