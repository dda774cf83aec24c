import type { Cell } from '../container/sheet-rows';
import { isMissing } from './values';

/** Excel keeps 15 digits of a number. */
const MAX_EXACT = 1e15;

/** A cell's content as a label, trimmed; null when there is none. Whole numbers get the leading zeros of their format. */
export function cellText(cell: Cell | undefined): string | null {
  if (isMissing(cell)) return null;
  if (cell!.kind === 'number') {
    const { number, format } = cell!;
    return Number.isInteger(number) && number >= 0 ? String(number).padStart(format.zeroFill, '0') : String(number);
  }
  const text = cell!.text.replace(/\s+/g, ' ').trim();
  return text === '' ? null : text;
}

/** A lot's number: text as written, a number as a whole number. */
export function lotText(cell: Cell | undefined): string | { code: string; why: string } {
  const text = cellText(cell);
  if (cell?.kind === 'error') return { code: 'error-cell', why: `shows the Excel error ${cell.text}` };
  if (cell?.kind === 'formula-without-result') {
    return {
      code: 'formula-without-result',
      why: 'has a formula without a stored result; open the workbook in Excel and save it',
    };
  }
  if (text === null) return { code: 'lot-missing', why: 'names no lot; fill it in' };
  if (text.length > 80) return { code: 'lot-too-long', why: 'names a lot with more than 80 characters' };
  if (cell!.kind !== 'number') return text;
  if (cell!.format.isDate) {
    return { code: 'lot-is-a-date', why: 'has a date as its lot; Excel may have changed a typed number into it' };
  }
  if (!Number.isInteger(cell!.number) || cell!.number < 0) {
    return { code: 'lot-not-whole', why: `has the lot ${cell!.number}, which is no whole number; store it as text` };
  }
  if (cell!.number >= MAX_EXACT) {
    return {
      code: 'lot-too-long',
      why: 'has a lot of more than 15 digits, of which Excel lost the last; store it as text',
    };
  }
  return text;
}
