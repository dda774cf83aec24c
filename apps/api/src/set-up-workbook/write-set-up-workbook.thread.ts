import { type SetUpDocument, writeSetUp } from '@app/workbook';

/** Writes a plant's set-up as a workbook; runs in a thread, since a large plant's takes a second. */
export default function write(document: SetUpDocument): Promise<Uint8Array> {
  return writeSetUp(document);
}
