import { WorkbookRefusedError } from './refused';
import type { Problem } from './types';

export function markWorkbook(bytes: Uint8Array, _problems: readonly Problem[]): Promise<Buffer> {
  return Promise.reject(new WorkbookRefusedError('corrupt', `The file of ${bytes.length} bytes cannot be read.`));
}
