import type { ReadLimits } from './limits';
import { WorkbookRefusedError } from './refused';
import type { LineContext, OnReadings, WorkbookReport } from './types';

export interface ReadOptions {
  limits?: Partial<ReadLimits>;
  onProgress?: (rowsRead: number) => void;
}

export function readWorkbook(
  bytes: Uint8Array,
  _context: LineContext,
  _onReadings: OnReadings,
  _options: ReadOptions = {},
): Promise<WorkbookReport> {
  return Promise.reject(new WorkbookRefusedError('corrupt', `The file of ${bytes.length} bytes cannot be read.`));
}
