import type { WorkbookAnswers } from '../answers';

export type Encoding = NonNullable<WorkbookAnswers['encoding']>;
export type Separator = NonNullable<WorkbookAnswers['separator']>;

/** How a text file is read. */
export interface TextFacts {
  encoding: Encoding;
  separator: Separator;
  /** As its first rows show beyond doubt; null where they do not. */
  decimalSign: '.' | ',' | null;
}

/** The name of a text file's only sheet. */
export const TEXT_SHEET = 'Text file';
