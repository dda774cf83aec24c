import { columnLetters } from '../container/cell-names';
import type { Problem, ProblemCount, Severity } from '../types';

const MAX_LISTED = 1_000;
const MAX_NOTICES_PER_CODE = 100;

export interface Place {
  sheet: string;
  row?: number;
  /** Column number from 1. */
  column?: number;
}

/** "Sheet "Readings", cell F12"; of a text file, which has no sheets, "Row 12, column F". */
export const placeText = ({ sheet, row, column }: Place, isTextFile = false): string => {
  if (isTextFile) return textPlace(row, column);
  const where =
    row === undefined
      ? column === undefined
        ? ''
        : `, column ${columnLetters(column)}`
      : column === undefined
        ? `, row ${row}`
        : `, cell ${columnLetters(column)}${row}`;
  return `Sheet "${sheet}"${where}`;
};

function textPlace(row: number | undefined, column: number | undefined): string {
  const letters = column === undefined ? '' : columnLetters(column);
  if (row === undefined) return letters === '' ? 'The text file' : `Column ${letters}`;
  return letters === '' ? `Row ${row}` : `Row ${row}, column ${letters}`;
}

/** A copy that keeps no larger text alive: texts cut from a file's pieces do. */
export const ownText = (text: string): string => Buffer.from(text).toString();

/** Collects problems: counts all of them, lists the first thousand. */
export class Findings {
  readonly problems: Problem[] = [];
  private readonly counts = new Map<string, ProblemCount>();

  constructor(private readonly isTextFile = false) {}

  /** `say` gives what follows the place: a verb phrase, and what to do. It is called only when the problem is listed. */
  add(severity: Severity, code: string, place: Place, say: () => string): void {
    const key = `${severity} ${code}`;
    const count = this.counts.get(key);
    const row = place.row ?? null;
    if (count) count.count += 1;
    else this.counts.set(key, { code, severity, count: 1, firstSheet: place.sheet, firstRow: row });
    const isListed = severity !== 'notice' || (count?.count ?? 1) <= MAX_NOTICES_PER_CODE;
    if (!isListed || !this.makeRoom(severity)) return;
    const column = place.column === undefined ? null : columnLetters(place.column);
    const sentence = `${this.placeText(place)} ${say()}`;
    const detail = ownText(/[.?!]$/.test(sentence) ? sentence : `${sentence}.`);
    this.problems.push({ sheet: place.sheet, row, column, code, detail, severity });
  }

  placeText(place: Place): string {
    return placeText(place, this.isTextFile);
  }

  /** What stops the whole workbook is listed even when the list is full. */
  private makeRoom(severity: Severity): boolean {
    if (this.problems.length < MAX_LISTED) return true;
    const last = severity === 'blocking' ? this.problems.findLastIndex((one) => one.severity !== 'blocking') : -1;
    if (last >= 0) this.problems.splice(last, 1);
    return last >= 0;
  }

  countOf(severity: Severity): number {
    return [...this.counts.values()].reduce((sum, one) => sum + (one.severity === severity ? one.count : 0), 0);
  }

  /** By weight, then by number. */
  list(): ProblemCount[] {
    const weight: Severity[] = ['blocking', 'row_not_used', 'cell_not_used', 'notice'];
    return [...this.counts.values()].sort(
      (a, b) => weight.indexOf(a.severity) - weight.indexOf(b.severity) || b.count - a.count,
    );
  }
}
