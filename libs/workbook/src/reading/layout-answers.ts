import type { LayoutAnswers, RememberedLayout, WorkbookAnswers } from '../answers';

/** What is in force for a sheet apart from what is recognised. */
export interface SheetAnswers {
  answers: LayoutAnswers;
  /** Something of it was remembered for the header's fingerprint. */
  isRemembered: boolean;
  /** Something of it was said about this workbook. */
  isAnswered: boolean;
}

/**
 * The answers for a sheet whose header has a fingerprint. What is said about this workbook goes field by field, and
 * column by column, before what is remembered.
 */
export function answersFor(
  sheet: string,
  fingerprint: string | null,
  said: WorkbookAnswers,
  remembered: readonly RememberedLayout[],
): SheetAnswers {
  const own = said.sheets?.[sheet];
  const known = fingerprint === null ? undefined : remembered.find((one) => one.fingerprint === fingerprint)?.answers;
  const columns = { ...known?.columns, ...own?.columns };
  const answers: LayoutAnswers = { ...known, ...own };
  if (known?.columns || own?.columns) answers.columns = columns;
  // The row in which a remembered header stood says nothing about this file; that nothing is to be read does.
  if (own?.headerRow === undefined && typeof known?.headerRow === 'number') delete answers.headerRow;
  return { answers, isRemembered: known !== undefined, isAnswered: own !== undefined };
}

/** The layout that was remembered under a sheet's name, where none has the sheet's fingerprint. */
export const changedFrom = (
  sheet: string,
  fingerprint: string | null,
  remembered: readonly RememberedLayout[],
): RememberedLayout | null =>
  remembered.some((one) => one.fingerprint === fingerprint)
    ? null
    : (remembered.findLast((one) => one.sheetName === sheet) ?? null);
