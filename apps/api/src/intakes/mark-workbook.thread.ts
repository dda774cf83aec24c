import type { WorkbookAnswers } from '@app/contracts';
import { markWorkbook, type Problem } from '@app/workbook';

/** Marks the problem cells of a workbook; runs in a thread, since the whole file is rewritten. */
export default async function mark(task: {
  bytes: Uint8Array;
  problems: Problem[];
  answers: WorkbookAnswers;
}): Promise<Uint8Array> {
  return markWorkbook(Buffer.from(task.bytes), task.problems, {}, task.answers);
}
