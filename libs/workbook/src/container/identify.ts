import { WorkbookRefusedError } from '../refused';

const startsWith = (bytes: Buffer, magic: readonly number[]): boolean =>
  bytes.length >= magic.length && magic.every((byte, index) => bytes[index] === byte);

const ZIP = [0x50, 0x4b, 0x03, 0x04];
const EMPTY_ZIP = [0x50, 0x4b, 0x05, 0x06];
/** Compound file (the container of .xls, and of an encrypted .xlsx), MS-CFB 2.2. */
const COMPOUND = [0xd0, 0xcf, 0x11, 0xe0, 0xa1, 0xb1, 0x1a, 0xe1];

const hasStream = (bytes: Buffer, name: string): boolean => bytes.includes(Buffer.from(`${name}\0`, 'utf16le'));

const HOW_TO_SAVE = 'In Excel choose "Save as" and the type "Excel workbook (*.xlsx)", then upload that file.';
export const OLD_FORMAT = `The file is in an older Excel format (.xls or .xlsb), which is not read. ${HOW_TO_SAVE}`;
export const NOT_EXCEL = `The file is not an Excel workbook. ${HOW_TO_SAVE}`;
export const PASSWORD =
  'The workbook is protected by a password, so it cannot be read. Open it in Excel, remove the password (File, Info, Protect workbook), save it and upload it again.';

/**
 * Turns away, by their first bytes, files that are no zip archive: before anything is inflated.
 *
 * @throws WorkbookRefusedError empty-file, password-protected, old-format, not-excel
 */
export function assertLooksLikeWorkbook(bytes: Buffer): void {
  if (bytes.length === 0) {
    throw new WorkbookRefusedError('empty-file', 'The file is empty (0 bytes). Save the workbook again and upload it.');
  }
  if (startsWith(bytes, ZIP)) return;
  if (startsWith(bytes, EMPTY_ZIP)) throw new WorkbookRefusedError('not-excel', NOT_EXCEL);
  if (startsWith(bytes, COMPOUND)) {
    if (hasStream(bytes, 'EncryptedPackage')) throw new WorkbookRefusedError('password-protected', PASSWORD);
    if (hasStream(bytes, 'Workbook') || hasStream(bytes, 'Book')) {
      throw new WorkbookRefusedError('old-format', OLD_FORMAT);
    }
  }
  throw new WorkbookRefusedError('not-excel', NOT_EXCEL);
}
