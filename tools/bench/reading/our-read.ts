import { readFile } from 'node:fs/promises';
import { readWorkbook } from '@app/workbook';
import { LINE } from './files';

/** Reads a workbook to readings, which are counted and let go. */
export async function ourRead(path: string, readings: number): Promise<void> {
  let count = 0;
  const report = await readWorkbook(await readFile(path), LINE, (batch) => void (count += batch.length));
  if (count !== readings || report.isBlocked)
    throw new Error(`${count} readings of ${readings}: ${JSON.stringify(report.problemCounts)}`);
}
