import { WorkbookRefusedError } from '../refused';
import { recogniseEncoding } from '../text/encodings';
import type { Encoding } from '../text/text-facts';

const startsWith = (bytes: Buffer, magic: readonly number[]): boolean =>
  bytes.length >= magic.length && magic.every((byte, index) => bytes[index] === byte);

const ZIP = [0x50, 0x4b, 0x03, 0x04];
const EMPTY_ZIP = [0x50, 0x4b, 0x05, 0x06];
/** Compound file (the container of .xls, and of an encrypted .xlsx), MS-CFB 2.2. */
const COMPOUND = [0xd0, 0xcf, 0x11, 0xe0, 0xa1, 0xb1, 0x1a, 0xe1];
/** BOF records of .xls files without a container: BIFF2, 3, 4 ([MS-XLS] 2.4.21 and before it). */
const BARE_XLS = [
  [0x09, 0x00, 0x04, 0x00],
  [0x09, 0x02, 0x06, 0x00],
  [0x09, 0x04, 0x06, 0x00],
];

const hasStream = (bytes: Buffer, name: string): boolean => bytes.includes(Buffer.from(`${name}\0`, 'utf16le'));

const HOW_TO_SAVE = 'In Excel choose "Save as" and the type "Excel workbook (*.xlsx)", then upload that file.';
const HOW_TO_UNPACK = 'Unpack it and upload each workbook by itself.';
export const OLD_FORMAT = `The file is in an older Excel format (.xls or .xlsb), which is not read. ${HOW_TO_SAVE}`;
export const NOT_EXCEL = `The file is not an Excel workbook. ${HOW_TO_SAVE}`;
export const OPEN_DOCUMENT =
  'The file is an OpenDocument spreadsheet (.ods), which is not read. Open it, choose "Save as" and the type "Excel 2007–365 (.xlsx)", then upload that file.';
export const NUMBERS =
  'The file is a Numbers spreadsheet, which is not read. In Numbers choose File, "Export to", "Excel", then upload that file.';
export const OFFICE_DOCUMENT = `The file is a text document or a presentation, not a workbook. Copy its table into a workbook. ${HOW_TO_SAVE}`;
export const ARCHIVE_OF_WORKBOOKS = `The file is an archive (.zip) of workbooks or text files. ${HOW_TO_UNPACK}`;
const ARCHIVE = `The file is a compressed archive, not a workbook. ${HOW_TO_UNPACK}`;
const PDF =
  'The file is a PDF, from which readings cannot be read safely. Upload the workbook or the text file (.csv) from which it was made.';
const PICTURE =
  'The file is a picture, from which readings cannot be read safely. Upload the workbook or the text file (.csv) that it shows.';
const MARKUP = `The file is a web page or an XML table under the name of an Excel workbook, as some programs export it. Open it in Excel. ${HOW_TO_SAVE}`;
const FORMATTED_TEXT = `The file is a formatted text (RTF), not a workbook. ${HOW_TO_SAVE}`;
export const PASSWORD =
  'The workbook is protected by a password, so it cannot be read. Open it in Excel, remove the password (File, Info, Protect workbook), save it and upload it again.';

/** First bytes of files that people take for a workbook, and what is said of them. */
const OTHERS: readonly (readonly [string, string])[] = [
  ['%PDF', PDF],
  ['\x89PNG', PICTURE],
  ['\xff\xd8\xff', PICTURE],
  ['GIF8', PICTURE],
  ['BM', PICTURE],
  ['II*\0', PICTURE],
  ['MM\0*', PICTURE],
  ['RIFF', PICTURE],
  ['{\\rtf', FORMATTED_TEXT],
  ['\x1f\x8b', ARCHIVE],
  ['7z\xbc\xaf', ARCHIVE],
  ['Rar!', ARCHIVE],
];
const MARKUP_START = /^\s*(?:<(?:[a-z!?/])|MIME-Version:)/i;

/**
 * Tells by its first bytes whether a file is a workbook's archive or a text file, before anything is inflated.
 *
 * @returns the encoding of a text file, null for an archive
 * @throws WorkbookRefusedError empty-file, password-protected, old-format, not-excel
 */
export function identify(bytes: Buffer): Encoding | null {
  if (bytes.length === 0) {
    throw new WorkbookRefusedError('empty-file', 'The file is empty (0 bytes). Save the workbook again and upload it.');
  }
  if (startsWith(bytes, ZIP)) return null;
  if (startsWith(bytes, EMPTY_ZIP)) throw notExcel(NOT_EXCEL);
  if (startsWith(bytes, COMPOUND)) throw ofCompound(bytes);
  if (BARE_XLS.some((magic) => startsWith(bytes, magic))) throw new WorkbookRefusedError('old-format', OLD_FORMAT);
  const encoding = recogniseEncoding(bytes);
  const head = bytes.subarray(0, 512);
  const other = OTHERS.find(([magic]) => head.toString('latin1').startsWith(magic));
  const isText = encoding !== null && other?.[1] !== PDF && other?.[1] !== FORMATTED_TEXT;
  if (!isText) throw notExcel(other?.[1] ?? NOT_EXCEL);
  if (MARKUP_START.test(new TextDecoder(encoding).decode(head))) throw notExcel(MARKUP);
  return encoding;
}

/**
 * Turns away what cannot be a workbook's archive.
 *
 * @throws WorkbookRefusedError as `identify` does, and not-excel for text files
 */
export function assertLooksLikeWorkbook(bytes: Buffer): void {
  if (identify(bytes) !== null) throw notExcel(NOT_EXCEL);
}

export const notExcel = (detail: string): WorkbookRefusedError => new WorkbookRefusedError('not-excel', detail);

function ofCompound(bytes: Buffer): WorkbookRefusedError {
  if (hasStream(bytes, 'EncryptedPackage')) return new WorkbookRefusedError('password-protected', PASSWORD);
  const isOld = hasStream(bytes, 'Workbook') || hasStream(bytes, 'Book');
  return isOld ? new WorkbookRefusedError('old-format', OLD_FORMAT) : notExcel(NOT_EXCEL);
}
