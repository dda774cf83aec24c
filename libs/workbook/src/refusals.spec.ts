import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { DEFAULT_LIMITS, type ReadLimits } from './limits';
import { COATER, read } from './testing/coater';
import { makeWorkbook, wrapSheets } from './testing/make-workbook';
import { packRepeated, writeZip, type ZipPart } from './testing/zip-writer';

const FOLDER = join(__dirname, '../../../fixtures/workbooks/hostile');
const fixture = (name: string): Buffer => readFileSync(join(FOLDER, name));
const MIB = 1024 * 1024;

const HEAD = '<worksheet><sheetData>';
const oneSheet = (xml: ZipPart['data']): Buffer => writeZip(wrapSheets([{ name: 'S', xml }]));

async function refusal(bytes: Buffer, limits: Partial<ReadLimits> = {}): Promise<{ code: string; detail: string }> {
  const error: unknown = await read(bytes, COATER, { limits }).then(
    () => null,
    (reason: unknown) => reason,
  );
  expect(error).toMatchObject({ name: 'WorkbookRefusedError' });
  return error as { code: string; detail: string };
}

/** The refusal, and by how much the process grew meanwhile, sampled every 5 ms. */
async function refusalWithMemory(
  bytes: Buffer,
  limits: Partial<ReadLimits> = {},
): Promise<{ code: string; grownMib: number }> {
  const before = process.memoryUsage().rss;
  let peak = before;
  const timer = setInterval(() => (peak = Math.max(peak, process.memoryUsage().rss)), 5);
  const { code } = await refusal(bytes, limits);
  clearInterval(timer);
  return { code, grownMib: (Math.max(peak, process.memoryUsage().rss) - before) / MIB };
}

describe('files that are turned away', () => {
  it.each([
    ['corrupt.xlsx', 'corrupt'],
    ['empty.xlsx', 'empty-file'],
    ['password-protected.xlsx', 'password-protected'],
    ['old-format.xls', 'old-format'],
    ['picture.xlsx', 'not-excel'],
    ['text.xlsx', 'not-excel'],
  ])('%s is refused as %s, in a sentence that says what to do', async (name, code) => {
    const refused = await refusal(fixture(name));
    expect(refused.code).toBe(code);
    expect(refused.detail).toMatch(/[A-Z].*(save|upload|remove).*\.$/i);
  });

  const good = makeWorkbook({ sheets: [{ name: 'S', rows: [['a', 1]] }] });
  it.each([
    ['a zip that holds no workbook', writeZip([{ name: 'readme.txt', data: 'hello' }]), 'not-excel'],
    ['an archive without entries', writeZip([]), 'not-excel'],
    ['a binary workbook', writeZip([{ name: 'xl/workbook.bin', data: 'x' }]), 'old-format'],
    ['a text document', writeZip([{ name: 'word/document.xml', data: '<w/>' }]), 'not-excel'],
    ['an encrypted part', writeZip([{ name: 'xl/workbook.xml', data: '<workbook/>', flags: 1 }]), 'password-protected'],
    ['XML that breaks off', writeZip([{ name: 'xl/workbook.xml', data: '<workbook><sheets>' }]), 'corrupt'],
    [
      'a sheet that is missing',
      writeZip(wrapSheets([{ name: 'S', xml: '' }]).filter(({ name }) => !name.includes('sheet1'))),
      'corrupt',
    ],
    ['a cut file', good.subarray(0, good.length - 40), 'corrupt'],
  ])('%s is refused', async (_, bytes, code) => {
    expect((await refusal(bytes)).code).toBe(code);
  });
  it('a file with changed bytes is refused, or read, but never fails otherwise', async () => {
    for (let position = 4; position < good.length; position += 7) {
      const changed = Buffer.from(good);
      changed[position] ^= 0xff;
      const outcome = await read(changed).then(
        () => 'read',
        (error: Error) => error.name,
      );
      expect(['read', 'WorkbookRefusedError']).toContain(outcome);
    }
  });

  it('a file over 30 MB is refused before it is opened', async () => {
    const bytes = Buffer.alloc(30 * MIB + 1);
    good.copy(bytes);
    expect(await refusal(bytes)).toMatchObject({ code: 'too-large', detail: expect.stringContaining('30 MB') });
  });
  it('a cell more than the limit is refused, the limit itself is not', async () => {
    const rows = [
      ['a', 'b', 'c'],
      [1, 2, 3],
    ];
    const bytes = makeWorkbook({
      sheets: [
        { name: 'S', rows },
        { name: 'T', rows },
      ],
    });
    expect((await read(bytes, COATER, { limits: { maxCells: 12 } })).report.sheets).toHaveLength(2);
    expect((await refusal(bytes, { maxCells: 11 })).code).toBe('too-many-cells');
  });
  it('a text over 32,767 characters and more sheets than the limit are refused', async () => {
    const long = makeWorkbook({ sheets: [{ name: 'S', rows: [['x'.repeat(32_768)]] }] });
    expect((await refusal(long)).code).toBe('too-large');
    const many = makeWorkbook({ sheets: ['S', 'T', 'U'].map((name) => ({ name, rows: [] })) });
    expect((await refusal(many, { maxSheets: 2 })).code).toBe('too-large');
  });
  it('the limit of inflated bytes counts all parts that are read', async () => {
    const refused = await refusal(good, { maxInflatedBytes: 800 });
    expect(refused.code).toBe('decompression-bomb');
  });
});

describe('memory', () => {
  it('does not grow with 2,000,001 cells, which are refused where two millions are allowed', async () => {
    const cell = (index: number): string => `<c><v>${((index * 7919) % 99991) / 1000}</v></c>`;
    const rows = Array.from(
      { length: 1_000 },
      (_, row) => `<row>${[1, 2, 3, 4, 5, 6, 7, 8].map((at) => cell(row * 8 + at)).join('')}</row>`,
    );
    // 250 × 1,000 × 8 cells, and one in the head
    const bytes = oneSheet(packRepeated(`${HEAD}<row><c><v>1</v></c></row>`, rows.join(''), 250));
    expect(bytes.length).toBeLessThan(DEFAULT_LIMITS.maxBytes);
    const { code, grownMib } = await refusalWithMemory(bytes, { maxCells: 2_000_000 });
    expect(code).toBe('too-many-cells');
    expect(grownMib).toBeLessThan(200);
  }, 40_000);
  it('does not grow with what a small file unpacks to, whether the file admits it or not', async () => {
    const sheet = packRepeated(HEAD, '<row r="1"></row>'.repeat(60_000), 500);
    expect(sheet.size).toBeGreaterThan(DEFAULT_LIMITS.maxInflatedBytes);
    for (const size of [sheet.size, 300 * MIB, 1000]) {
      const bytes = oneSheet({ ...sheet, size });
      expect(bytes.length).toBeLessThan(5 * MIB);
      const { code, grownMib } = await refusalWithMemory(bytes);
      expect(code).toBe('decompression-bomb');
      expect(grownMib).toBeLessThan(150);
    }
  }, 40_000);
  it('does not grow with a text that never ends', async () => {
    const bytes = oneSheet(`${HEAD}<row><c t="str"><v>${'ab1x9'.repeat(4 * MIB)}`);
    expect((await refusal(bytes, { maxCompressionRatio: 2_000 })).code).toBe('corrupt');
  });
});
