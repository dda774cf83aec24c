import { Workbook, type Cell, type FillPattern } from 'exceljs';
import { Archive } from './container/archive';
import { assertLooksLikeWorkbook } from './container/identify';
import { DEFAULT_LIMITS, type ReadLimits } from './limits';
import { addProblemsSheet } from './problems-sheet';
import { WorkbookRefusedError } from './refused';
import type { Problem } from './types';

/** exceljs needs some 50 times the inflated parts to rewrite a workbook (measured: 900 MB for 15 MB): beyond this, too much. */
const MAX_REWRITTEN_BYTES = 5 * 1024 * 1024;

const solid = (argb: string): FillPattern => ({ type: 'pattern', pattern: 'solid', fgColor: { argb } });
const FILL_NOT_USED = solid('FFF3D3C4');
const FILL_NOTICE = solid('FFF6EBC8');

/**
 * Gives a workbook back with each problem where it lies: a comment and a fill on its cell (the row's first cell when it
 * concerns a whole row), and a sheet "Problems" that lists them with links. Macros, charts and pivot tables do not
 * survive. A workbook too large to be rewritten in memory, or that cannot be rewritten, gives the list alone, and it
 * says so.
 *
 * @param bytes the file as it came
 * @param problems as `readWorkbook` reported them
 * @returns an .xlsx file
 * @throws WorkbookRefusedError when the bytes are no readable workbook at all
 */
export async function markWorkbook(
  bytes: Uint8Array,
  problems: readonly Problem[],
  limits: Partial<ReadLimits> = {},
): Promise<Buffer> {
  const buffer = Buffer.from(bytes.buffer, bytes.byteOffset, bytes.byteLength);
  assertLooksLikeWorkbook(buffer);
  const inflated = await inflatedSize(await Archive.open(buffer, { ...DEFAULT_LIMITS, ...limits }));
  if (inflated <= MAX_REWRITTEN_BYTES) {
    const marked = await rewrite(buffer, problems);
    if (marked) return marked;
  }
  const list = new Workbook();
  addProblemsSheet(
    list,
    problems,
    'Your workbook could not be written again with its marks, so this is the list alone.',
  );
  return Buffer.from(await list.xlsx.writeBuffer());
}

/** Inflates every part once, counted, before a library that counts nothing does. */
async function inflatedSize(archive: Archive): Promise<number> {
  let size = 0;
  for (const name of archive.names()) {
    if (name.endsWith('/')) continue;
    for await (const piece of archive.read(name)) size += piece.length;
  }
  return size;
}

async function rewrite(bytes: Buffer, problems: readonly Problem[]): Promise<Buffer | null> {
  const book = new Workbook();
  try {
    await book.xlsx.load(bytes as unknown as ArrayBuffer);
    for (const [place, here] of groupByCell(problems)) {
      const cell = book.getWorksheet(place.sheet)?.getCell(place.cell);
      if (cell) mark(cell, here);
    }
    addProblemsSheet(book, problems);
    return Buffer.from(await book.xlsx.writeBuffer());
  } catch (error) {
    if (error instanceof WorkbookRefusedError) throw error;
    return null;
  }
}

function groupByCell(problems: readonly Problem[]): Map<{ sheet: string; cell: string }, Problem[]> {
  const places = new Map<string, { sheet: string; cell: string }>();
  const groups = new Map<{ sheet: string; cell: string }, Problem[]>();
  for (const problem of problems) {
    if (problem.row === null) continue;
    const cell = `${problem.column ?? 'A'}${problem.row}`;
    const key = `${cell} ${problem.sheet}`;
    const place = places.get(key) ?? { sheet: problem.sheet, cell };
    places.set(key, place);
    groups.set(place, [...(groups.get(place) ?? []), problem]);
  }
  return groups;
}

function mark(cell: Cell, problems: Problem[]): void {
  const before = typeof cell.note === 'string' ? cell.note : (cell.note?.texts ?? []).map(({ text }) => text).join('');
  const text = [before, ...problems.map((problem) => problem.detail)].filter((part) => part !== '').join('\n');
  cell.note = { texts: [{ text }], margins: { insetmode: 'auto' } };
  const isNotice = problems.every((problem) => problem.severity === 'notice');
  // exceljs shares one style object among all cells of a style: change a copy.
  cell.style = { ...cell.style, fill: isNotice ? FILL_NOTICE : FILL_NOT_USED };
}
