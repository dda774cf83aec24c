import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import ExcelJS from 'exceljs';
import { WorkbookRefusedError } from './refused';
import { COATER, read } from './testing/coater';
import { mutant, seedFile, type SeedFile } from './testing/mutants';
import type { WorkbookReport } from './types';

const MUTANTS = 2_000;
const BATCHES = 20;
/** Processor time of one file; ordinary ones take some milliseconds. */
const MAX_SECONDS = 2;
/** By how much the process may grow over all of them. */
const MAX_GROWTH_MIB = 250;
const MIB = 1024 * 1024;

const corpus = (name: string): Buffer => readFileSync(join(__dirname, '../../../fixtures/workbooks/corpus', name));
const TEXT = `Time;Lot;Product;Coat weight;Web thickness\n${Array.from(
  { length: 25 },
  (_, at) => `02.02.2026 06:${10 + at};L-1${at % 3};SEP-12;"${10 + at / 8}";${at % 5 === 0 ? '<0,05' : '12,5'}\n`,
).join('')}`;

async function byExceljs(): Promise<Buffer> {
  const book = new ExcelJS.Workbook();
  const sheet = book.addWorksheet('Readings');
  sheet.addRow(['Time', 'Lot', 'Product', 'Coat weight', 'Oven exit temperature']);
  for (let at = 0; at < 20; at += 1) {
    const time = new Date(Date.UTC(2026, 1, 2, 6, at));
    sheet.addRow([time, `L-${at % 3}`, 'SEP-12', { formula: 'A1', result: 10 + at / 8 }, 120.5]);
  }
  return Buffer.from(await book.xlsx.writeBuffer());
}

/** What is wrong with how a file ended: nothing, when it is refused in a sentence or gives a report that adds up. */
async function complaint(bytes: Buffer): Promise<string | null> {
  const used = process.cpuUsage();
  try {
    const wrong = inconsistency((await read(bytes, COATER)).report);
    if (wrong !== null) return wrong;
  } catch (error) {
    if (!(error instanceof WorkbookRefusedError))
      return error instanceof Error ? (error.stack ?? error.message) : String(error);
    if (!/^[A-Z].*\.$/s.test(error.detail)) return `no sentence: ${error.detail}`;
  }
  const { user, system } = process.cpuUsage(used);
  const seconds = (user + system) / 1e6;
  return seconds > MAX_SECONDS ? `took ${seconds} s` : null;
}

function inconsistency({ problems, problemCounts, rowsRead, rowsNotUsed, isBlocked }: WorkbookReport): string | null {
  const saidNotUsed = problemCounts
    .filter(({ severity }) => severity === 'row_not_used')
    .reduce((sum, { count }) => sum + count, 0);
  if (saidNotUsed !== rowsNotUsed || rowsNotUsed > rowsRead) {
    return `${rowsRead} rows read, ${rowsNotUsed} not used, ${saidNotUsed} said as not used`;
  }
  if (rowsRead === rowsNotUsed && !isBlocked) return 'gives no reading and can be confirmed';
  const odd = problems.find(({ detail }) => !/^[A-Z].*[.?!]$/s.test(detail));
  return odd ? `no sentence: ${odd.detail}` : null;
}

/** A complaint tells its seed; `mutant(seed, files)` makes the same bytes again. */
describe('files with something wrong in them', () => {
  let files: SeedFile[];
  let before: number;
  beforeAll(async () => {
    const xlsx = [
      'no-cell-names.xlsx',
      'iso-date-cells.xlsx',
      'shared-formulas.xlsx',
      'serials.xlsx',
      'constant-memory.xlsx',
    ];
    files = await Promise.all([
      ...xlsx.map((name) => seedFile(name, corpus(name))),
      seedFile('exceljs', await byExceljs()),
      seedFile('text', Buffer.from(TEXT)),
      seedFile('utf-16', Buffer.from(`\ufeff${TEXT}`, 'utf16le')),
    ]);
    for (const { bytes } of files) await read(bytes, COATER);
    before = process.memoryUsage.rss();
  });

  it.each(Array.from({ length: BATCHES }, (_, batch) => batch))(
    'end in a report that adds up or in a sentence (batch %i)',
    async (batch) => {
      const complaints: string[] = [];
      for (let index = 0; index < MUTANTS / BATCHES; index += 1) {
        const seed = (batch * MUTANTS) / BATCHES + index;
        const { from, bytes } = mutant(seed, files);
        const wrong = await complaint(bytes);
        if (wrong !== null) complaints.push(`seed ${seed} (${from}): ${wrong}`);
      }
      expect(complaints).toEqual([]);
      expect((process.memoryUsage.rss() - before) / MIB).toBeLessThan(MAX_GROWTH_MIB);
    },
    60_000,
  );
});
