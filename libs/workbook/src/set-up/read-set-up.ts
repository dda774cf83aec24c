import { columnLetters } from '../container/cell-names';
import type { SheetRow } from '../container/sheet-rows';
import { openWorkbook } from '../container/workbook-parts';
import { DEFAULT_LIMITS, type ReadLimits } from '../limits';
import { ZoneClock } from '../reading/zone-clock';
import { WorkbookRefusedError } from '../refused';
import type { CellContext } from './cell-values';
import { checkSetUp } from './check-set-up';
import type { SetUpDocument, SetUpPlaces, SetUpReading, SheetKey } from './document';
import type { LooseDocument, LooseRow } from './loose';
import { ProblemList } from './problem-list';
import { type FoundSheet, readSheets } from './read-sheets';
import { SHEETS } from './sheets';
import { sentencesOf } from './texts';

export interface ReadSetUpOptions {
  /** IANA name of the plant's zone, for times when the workbook's own cannot be read. */
  timeZone: string;
  limits?: Partial<ReadLimits>;
  /** Problems listed of one sheet. */
  maxProblemsPerSheet?: number;
}

/**
 * Reads a set-up workbook: every sheet, every cell, then what the sheets say of each other (names doubled, references to nothing, shifts that
 * overlap, specification limits the wrong way round). All problems are told, each with its cell, at most a number of them a sheet.
 *
 * @param bytes the file as it came
 * @returns the document and where its cells stood, or no document and the problems
 * @throws RangeError when `timeZone` is no IANA zone
 */
export async function readSetUp(bytes: Uint8Array, options: ReadSetUpOptions): Promise<SetUpReading> {
  const problems = new ProblemList(options.maxProblemsPerSheet);
  const notices = new ProblemList(options.maxProblemsPerSheet);
  const fallback = new ZoneClock(options.timeZone);
  const limits = { ...DEFAULT_LIMITS, ...options.limits };
  const places = Object.fromEntries(
    SHEETS.map(({ key }) => [key, { rows: [], columns: {} }]),
  ) as unknown as SetUpPlaces;
  const loose: LooseDocument = {};
  try {
    const book = await openWorkbook(Buffer.from(bytes.buffer, bytes.byteOffset, bytes.byteLength), limits);
    const found = await readSheets(book, limits, problems, notices);
    const context: CellContext = { dateSystem: book.dateSystem, zone: fallback };
    for (const { key } of SHEETS) {
      const sheet = found.find((one) => one.definition.key === key);
      if (!sheet) continue;
      places[key] = placesOf(sheet);
      const isOneRow = key === 'plant';
      loose[key] = sheet.rows.map((row, at) => (isOneRow && at > 0 ? {} : readRow(sheet, row, context, problems)));
      const zone = isOneRow ? loose.plant?.[0]?.timeZone : undefined;
      if (typeof zone === 'string') context.zone = new ZoneClock(zone);
    }
    checkSetUp(loose, places, problems, notices);
  } catch (error) {
    if (!(error instanceof WorkbookRefusedError)) throw error;
    problems.add({
      sheet: null,
      cell: null,
      code: error.code,
      ...sentencesOf(error.detail, 'Begin from a fresh download.'),
    });
  }
  const document = problems.isEmpty ? (loose as unknown as SetUpDocument) : null;
  return { document, places, problems: problems.list(), notices: notices.list() };
}

const placesOf = ({ columns, rows }: FoundSheet): SetUpPlaces[SheetKey] => ({
  rows: rows.map((row) => row.number),
  columns: Object.fromEntries([...columns].map(([key, number]) => [key, columnLetters(number)])),
});

const EMPTY: Partial<Record<string, unknown>> = { unit: '', lines: [] };

function readRow(
  { definition, columns }: FoundSheet,
  row: SheetRow,
  context: CellContext,
  problems: ProblemList,
): LooseRow {
  const values: LooseRow = {};
  for (const column of definition.columns) {
    const number = columns.get(column.key)!;
    const cell = `${columnLetters(number)}${row.number}`;
    const read = column.read(row.cells[number], context);
    const place = { sheet: definition.name, cell };
    if (!read.ok) {
      const { code, what, whatToDo } = read;
      problems.add({ ...place, code, what: `${column.header} ${what}.`, whatToDo });
    } else if (column.isRequired && (read.value === null || (Array.isArray(read.value) && read.value.length === 0)))
      problems.add({
        ...place,
        code: 'missing',
        what: `${column.header} is empty.`,
        whatToDo: `Fill it in. ${column.wants}`,
      });
    else values[column.key] = read.value ?? EMPTY[column.key] ?? null;
  }
  return values;
}
