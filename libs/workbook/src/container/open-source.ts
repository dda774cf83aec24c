import type { WorkbookAnswers } from '../answers';
import type { ReadLimits } from '../limits';
import { openText } from '../text/open-text';
import type { TextFacts } from '../text/text-facts';
import { identify } from './identify';
import { readSheetRows, type SheetFacts, type SheetRow } from './sheet-rows';
import { openWorkbook } from './workbook-parts';

export interface SourceSheet {
  name: string;
  isHidden: boolean;
}

/** A file opened for reading, whether a workbook or a text file. */
export interface Source {
  sheets: readonly SourceSheet[];
  dateSystem: 1900 | 1904;
  /** How a text file is read; null for a workbook. Every cell of a text file is of the kind `text`. */
  text: TextFacts | null;
  /** The rows of one of `sheets` in groups, in the order of the file; empty rows are left out. */
  rows: (sheet: SourceSheet, facts?: SheetFacts) => AsyncIterable<SheetRow[]>;
}

/**
 * Opens a workbook or a text file, whichever the bytes show.
 *
 * @param answers which separator and encoding a person said; absent: recognised
 * @throws WorkbookRefusedError for every file that is neither, or over the limits
 */
export async function openSource(bytes: Buffer, limits: ReadLimits, answers: WorkbookAnswers): Promise<Source> {
  const encoding = identify(bytes);
  if (encoding !== null) return openText(bytes, encoding, limits, answers);
  const { sheets, ...book } = await openWorkbook(bytes, limits);
  const count = { cells: 0 };
  const parts = new Map(sheets.map((part) => [part as SourceSheet, part]));
  return {
    sheets,
    dateSystem: book.dateSystem,
    text: null,
    rows: (sheet, facts) => readSheetRows({ sheets, ...book }, parts.get(sheet)!, limits, count, facts),
  };
}
