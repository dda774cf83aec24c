export { DEFAULT_LIMITS, type ReadLimits } from './limits';
export { markWorkbook } from './mark-workbook';
export { readWorkbook, type ReadOptions } from './read-workbook';
export { WorkbookRefusedError, type RefusalCode } from './refused';
export type {
  ChannelContext,
  ColumnRole,
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
export { escapeFormula, writeTable, type TableColumn, type TableOptions } from './write-table';
