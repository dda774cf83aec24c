import { posix } from 'node:path';
import type { ReadLimits } from '../limits';
import { WorkbookRefusedError } from '../refused';
import { Archive, corrupt } from './archive';
import { readFormats, type CellFormat } from './formats';
import {
  ARCHIVE_OF_WORKBOOKS,
  assertLooksLikeWorkbook,
  NOT_EXCEL,
  notExcel,
  NUMBERS,
  OFFICE_DOCUMENT,
  OLD_FORMAT,
  OPEN_DOCUMENT,
} from './identify';
import { readSharedTexts } from './texts';
import { isTrue, parseWholeXml } from './xml';

export interface SheetPart {
  name: string;
  part: string;
  isHidden: boolean;
}

/** A workbook opened for reading: everything but the sheets' cells. */
export interface OpenWorkbook {
  archive: Archive;
  /** Name of the part that lists the sheets, as a rule xl/workbook.xml. */
  mainPart: string;
  sheets: SheetPart[];
  dateSystem: 1900 | 1904;
  formats: CellFormat[];
  texts: string[];
}

interface Relation {
  type: string;
  target: string;
}

/**
 * Opens a workbook by its bytes.
 *
 * @throws WorkbookRefusedError for every file that is no readable .xlsx or .xlsm
 */
export async function openWorkbook(bytes: Buffer, limits: ReadLimits): Promise<OpenWorkbook> {
  assertLooksLikeWorkbook(bytes);
  const archive = await Archive.open(bytes, limits);
  const main = await findMainPart(archive);
  const relations = await readRelations(archive, main);
  const book = await readBook(archive, main, relations);
  if (book.sheets.length > limits.maxSheets) {
    throw new WorkbookRefusedError(
      'too-large',
      `The workbook has ${book.sheets.length} sheets; at most ${limits.maxSheets} can be read. Split it.`,
    );
  }
  const partOf = (kind: string): string | undefined =>
    [...relations.values()].find((relation) => relation.type === kind && archive.has(relation.target))?.target;
  const styles = partOf('styles');
  const shared = partOf('sharedStrings');
  return {
    archive,
    mainPart: main,
    ...book,
    formats: styles ? await readFormats(archive, styles) : [],
    texts: shared ? await readSharedTexts(archive, shared, limits) : [],
  };
}

async function findMainPart(archive: Archive): Promise<string> {
  if (archive.names().some((name) => name.endsWith('workbook.bin'))) {
    throw new WorkbookRefusedError('old-format', OLD_FORMAT);
  }
  const roots = archive.has('_rels/.rels') ? [...(await readRelations(archive, '')).values()] : [];
  const main = roots.find((relation) => relation.type === 'officeDocument')?.target ?? 'xl/workbook.xml';
  if (!archive.has(main) || /^\/?(word|ppt)\//.test(main)) throw notExcel(whatElse(archive.names()));
  return main;
}

/** What an archive is that is no workbook, by the names in it. */
function whatElse(names: readonly string[]): string {
  const has = (pattern: RegExp): boolean => names.some((name) => pattern.test(name));
  if (has(/^(word|ppt)\//)) return OFFICE_DOCUMENT;
  if (has(/^content\.xml$/) && has(/^(mimetype|meta-inf\/manifest\.xml)$/)) return OPEN_DOCUMENT;
  if (has(/^index\/document\.iwa$|^index\.zip$/)) return NUMBERS;
  return has(/\.(xls[xmb]?|csv|txt|tsv)$/) ? ARCHIVE_OF_WORKBOOKS : NOT_EXCEL;
}

async function readRelations(archive: Archive, owner: string): Promise<Map<string, Relation>> {
  const folder = posix.dirname(owner);
  const part = posix.join(folder, '_rels', `${posix.basename(owner)}.rels`);
  const relations = new Map<string, Relation>();
  if (!archive.has(part)) return relations;
  await parseWholeXml(archive.read(part), {
    open: (name, { Id, Type = '', Target = '', TargetMode }) => {
      if (name !== 'Relationship' || !Id || TargetMode === 'External') return;
      const target = Target.startsWith('/') ? Target.slice(1) : posix.join(folder, Target);
      relations.set(Id, { type: Type.slice(Type.lastIndexOf('/') + 1), target });
    },
  });
  return relations;
}

async function readBook(
  archive: Archive,
  main: string,
  relations: Map<string, Relation>,
): Promise<Pick<OpenWorkbook, 'sheets' | 'dateSystem'>> {
  const sheets: SheetPart[] = [];
  let dateSystem: 1900 | 1904 = 1900;
  let root = '';
  await parseWholeXml(archive.read(main), {
    open: (name, attributes) => {
      root ||= name;
      if (name === 'workbookPr' && isTrue(attributes.date1904)) dateSystem = 1904;
      if (name !== 'sheet') return;
      const id = Object.keys(attributes).find((key) => /(^|:)id$/.test(key) && key !== 'sheetId');
      const relation = relations.get(attributes[id ?? ''] ?? '');
      if (relation === undefined) throw corrupt(new Error(`sheet ${attributes.name} without a part`));
      if (relation.type !== 'worksheet') return; // a sheet of a chart or a macro
      const isHidden = attributes.state === 'hidden' || attributes.state === 'veryHidden';
      sheets.push({ name: attributes.name ?? `Sheet ${sheets.length + 1}`, part: relation.target, isHidden });
    },
  });
  if (root !== 'workbook') throw notExcel(NOT_EXCEL);
  if (sheets.some((sheet) => !archive.has(sheet.part))) throw corrupt(new Error('a sheet is missing'));
  return { sheets, dateSystem };
}
