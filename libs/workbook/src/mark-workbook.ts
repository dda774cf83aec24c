import type { WorkbookAnswers } from './answers';
import { openSource } from './container/open-source';
import { DEFAULT_LIMITS, type ReadLimits } from './limits';
import { openWorkbook, type OpenWorkbook } from './container/workbook-parts';
import { FillStyles } from './marking/fill-styles';
import { markSheet } from './marking/mark-sheet';
import { PackageEditor } from './marking/package-editor';
import { textAsWorkbook } from './marking/text-as-workbook';
import { problemsSheetXml } from './marking/problems-sheet';
import { escapeXml, insertBeforeEnd, prefixOf } from './marking/xml-edit';
import type { Problem } from './types';

const OFFICE = 'http://schemas.openxmlformats.org/officeDocument/2006/relationships';
const SHEET_TYPE = 'application/vnd.openxmlformats-officedocument.spreadsheetml.worksheet+xml';

/**
 * Gives a workbook back with each problem where it lies: a comment and a fill on its cell (the row's first cell when it
 * concerns a whole row), and a sheet "Problems" that lists them with links. The parts of the file are edited in place,
 * so that everything else in it (charts, macros, formats, comments) stays as it was, and the memory it takes is a small
 * multiple of the largest marked sheet's XML. A text file comes back as a workbook with its cells as texts.
 *
 * @param bytes the file as it came
 * @param problems as `readWorkbook` reported them
 * @param answers with which a text file was read
 * @returns the marked file
 * @throws WorkbookRefusedError when the bytes are no readable workbook or text file
 */
export async function markWorkbook(
  bytes: Uint8Array,
  problems: readonly Problem[],
  limits: Partial<ReadLimits> = {},
  answers: WorkbookAnswers = {},
): Promise<Buffer> {
  const file = Buffer.from(bytes.buffer, bytes.byteOffset, bytes.byteLength);
  const source = await openSource(file, { ...DEFAULT_LIMITS, ...limits }, answers);
  const buffer = source.text === null ? file : await textAsWorkbook(source);
  // Opened twice: what is read to open it counts against the limits, and each part is to be read once more.
  const book = await openWorkbook(buffer, { ...DEFAULT_LIMITS, ...limits });
  const { archive } = await openWorkbook(buffer, { ...DEFAULT_LIMITS, ...limits });
  const editor = new PackageEditor(archive);
  const stylesPart = (await editor.relations(book.mainPart)).find((relation) => relation.type === 'styles')?.target;
  const styles = stylesPart && editor.has(stylesPart) ? FillStyles.from(await editor.read(stylesPart)) : null;
  for (const sheet of book.sheets) {
    const here = problems.filter((problem) => problem.sheet === sheet.name && problem.row !== null);
    if (here.length > 0) await markSheet(editor, sheet.part, here, styles);
  }
  if (stylesPart && styles) editor.write(stylesPart, styles.toXml());
  await addProblemsSheet(editor, book, problems);
  return editor.toBytes();
}

async function addProblemsSheet(
  editor: PackageEditor,
  book: OpenWorkbook,
  problems: readonly Problem[],
): Promise<void> {
  const names = new Set(book.sheets.map((sheet) => sheet.name));
  const part = editor.freeName('xl/worksheets/sheet', '.xml');
  editor.write(part, problemsSheetXml(problems, names));
  await editor.declare(part, SHEET_TYPE);
  const id = await editor.relate(book.mainPart, 'worksheet', part);
  const xml = await editor.read(book.mainPart);
  const ids = [...xml.matchAll(/\ssheetId="(\d+)"/g)].map(([, number]) => Number(number));
  const taken = new Set(
    [...xml.matchAll(/<(?:\w+:)?sheet\s[^>]*?name="([^"]*)"/g)].map(([, name]) => name.toLowerCase()),
  );
  let name = 'Problems';
  for (let count = 2; taken.has(name.toLowerCase()); count += 1) name = `Problems ${count}`;
  const sheet = `<${prefixOf(xml, 'sheets')}sheet xmlns:r="${OFFICE}" name="${escapeXml(name)}" sheetId="${Math.max(0, ...ids) + 1}" r:id="${id}"/>`;
  editor.write(book.mainPart, insertBeforeEnd(xml, 'sheets', sheet));
}
