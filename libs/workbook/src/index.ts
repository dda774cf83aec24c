export type * from './answers';
export { DEFAULT_LIMITS, type ReadLimits } from './limits';
export { markWorkbook } from './mark-workbook';
export { readWorkbook, type ReadOptions } from './read-workbook';
export { WorkbookRefusedError, type RefusalCode } from './refused';
export type {
  ChannelContext,
  LineContext,
  LotSummary,
  OnReadings,
  ParsedReading,
  Problem,
  ProblemCount,
  RecognisedColumn,
  Severity,
  WorkbookReport,
} from './types';
export { sheetSentences, sheetSummary, titleOf } from './set-up/change-words';
export { compareSetUps, identityOf, type RowComparison, type SheetComparison } from './set-up/compare-set-up';
export type * from './set-up/document';
export { cellOf } from './set-up/loose';
export { ProblemList } from './set-up/problem-list';
export { readSetUp, type ReadSetUpOptions } from './set-up/read-set-up';
export { sheetOf } from './set-up/sheets';
export { sentencesOf } from './set-up/texts';
export { writeSetUp } from './set-up/write-set-up';
export { escapeFormula, writeTable, type TableColumn, type TableOptions } from './write-table';
export { writeTemplate, type TemplateContext } from './write-template';
export { writeSummary } from './write-summary';
