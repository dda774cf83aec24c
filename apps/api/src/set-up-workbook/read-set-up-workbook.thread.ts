import { readSetUp, type SetUpReading } from '@app/workbook';

/** Reads an uploaded set-up; runs in a thread, since the file may be anything. */
export default function read(task: { bytes: Uint8Array; timeZone: string }): Promise<SetUpReading> {
  return readSetUp(task.bytes, { timeZone: task.timeZone });
}
