import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { text as textOf } from 'node:stream/consumers';
import { Readable } from 'node:stream';
import { Workbook, type Cell, type FillPattern } from 'exceljs';
import { Archive } from './container/archive';
import { parseWholeXml } from './container/xml';
import { DEFAULT_LIMITS } from './limits';
import { markWorkbook } from './mark-workbook';
import { read } from './testing/coater';
import { makeWorkbook } from './testing/make-workbook';
import type { Problem } from './types';

const MESSY = readFileSync(join(__dirname, '../../../fixtures/workbooks/hostile/messy.xlsx'));

async function load(bytes: Buffer): Promise<Workbook> {
  const book = new Workbook();
  await book.xlsx.load(bytes as unknown as ArrayBuffer);
  return book;
}
const partText = (archive: Archive, name: string): Promise<string> => textOf(Readable.from(archive.read(name)));
const noteOf = ({ note }: Cell): string =>
  typeof note === 'string' ? note : (note?.texts ?? []).map(({ text }) => text).join('');
const fillOf = ({ fill }: Cell): string | undefined => (fill as FillPattern | undefined)?.fgColor?.argb;

describe('markWorkbook', () => {
  it('puts each problem on its cell as a comment and a fill, and leaves the others as they were', async () => {
    const { report } = await read(MESSY);
    const before = await load(MESSY);
    const after = await load(await markWorkbook(MESSY, report.problems));
    const placed = report.problems.filter((problem) => problem.row !== null);
    expect(placed.length).toBeGreaterThan(15);
    for (const { sheet, row, column, detail } of placed) {
      const cell = after.getWorksheet(sheet)!.getCell(`${column ?? 'A'}${row}`);
      expect(noteOf(cell)).toContain(detail);
      expect(fillOf(cell)).toBeDefined();
    }
    const marked = new Set(placed.map(({ sheet, row, column }) => `${sheet} ${column ?? 'A'}${row}`));
    before.eachSheet((sheet) => {
      sheet.eachRow((row) =>
        row.eachCell((cell) => {
          const same = after.getWorksheet(sheet.name)!.getCell(cell.address);
          expect(same.text).toBe(cell.text);
          expect(same.numFmt).toBe(cell.numFmt);
          if (!marked.has(`${sheet.name} ${cell.address}`))
            expect([fillOf(same), noteOf(same)]).toEqual([undefined, '']);
        }),
      );
    });
  });
  it('lists the problems on a sheet of their own, with links to the cells', async () => {
    const { report } = await read(MESSY);
    const bytes = await markWorkbook(MESSY, report.problems);
    const sheet = (await load(bytes)).getWorksheet('Problems')!;
    expect(sheet.rowCount).toBe(report.problems.length + 1);
    const ambiguous = report.problems.findIndex((problem) => problem.code === 'ambiguous-number');
    const row = sheet.getRow(ambiguous + 2);
    expect([row.getCell(1).text, row.getCell(2).text, row.getCell(3).text]).toEqual(['Shift', 'E6', 'cell not used']);
    // exceljs does not read links within a workbook.
    const archive = await Archive.open(bytes, DEFAULT_LIMITS);
    const xml = await partText(archive, 'xl/worksheets/sheet4.xml');
    expect(xml).toContain(`<hyperlink ref="B${ambiguous + 2}" location="'Shift'!E6"/>`);
    expect(row.getCell(4).text).toBe(report.problems[ambiguous].detail);
  });
  it('writes well-formed parts, each of which is declared', async () => {
    const { report } = await read(MESSY);
    const archive = await Archive.open(await markWorkbook(MESSY, report.problems), DEFAULT_LIMITS);
    const types = (await partText(archive, '[Content_Types].xml')).toLowerCase();
    for (const name of archive.names().filter((one) => /\.(xml|vml|rels)$/.test(one) && !one.startsWith('['))) {
      await parseWholeXml(archive.read(name), {});
      expect(name.endsWith('.rels') || types.includes(`"/${name}"`)).toBe(true);
    }
  });
  it('gives a workbook that is read again with the same result', async () => {
    const first = await read(MESSY);
    const again = await read(await markWorkbook(MESSY, first.report.problems));
    expect(again.readings).toEqual(first.readings);
    expect(again.report.rowsNotUsed).toBe(first.report.rowsNotUsed);
  });
  it('joins several problems of one cell, and bears a sheet that is called Problems already', async () => {
    const bytes = makeWorkbook({ sheets: [{ name: 'Problems', rows: [['a'], ['b']] }] });
    const problem = (detail: string): Problem => ({
      sheet: 'Problems',
      row: 2,
      column: 'A',
      code: 'x',
      detail,
      severity: 'notice',
    });
    const gone: Problem = { ...problem('nowhere'), sheet: 'Gone' };
    const book = await load(await markWorkbook(bytes, [problem('one'), problem('=two'), gone]));
    expect(noteOf(book.getWorksheet('Problems')!.getCell('A2'))).toBe('one\n=two');
    expect(book.getWorksheet('Problems 2')!.getCell('D3').value).toBe("'=two");
  });
  it('keeps comments and formats that were there, and marks the same workbook twice', async () => {
    const own = new Workbook();
    const sheet = own.addWorksheet('S');
    sheet.getCell('A1').value = 7;
    sheet.getCell('A1').numFmt = '0.000';
    sheet.getCell('A1').font = { bold: true };
    sheet.getCell('A1').note = 'mine';
    sheet.getCell('C1').value = 'untouched';
    sheet.getCell('C1').note = 'mine too';
    const problem = (column: string): Problem => ({
      sheet: 'S',
      row: 1,
      column,
      code: 'x',
      detail: 'Yours.',
      severity: 'row_not_used',
    });
    const once = await markWorkbook(Buffer.from(await own.xlsx.writeBuffer()), [problem('A'), problem('B')]);
    const twice = await markWorkbook(once, [problem('B')]);
    const after = (await load(twice)).getWorksheet('S')!;
    expect(noteOf(after.getCell('A1'))).toBe('mine\nYours.');
    expect(noteOf(after.getCell('B1'))).toBe('Yours.\nYours.');
    expect(noteOf(after.getCell('C1'))).toBe('mine too');
    expect(after.getCell('A1')).toMatchObject({ value: 7, numFmt: '0.000', font: { bold: true } });
    expect([fillOf(after.getCell('A1')), fillOf(after.getCell('B1')), fillOf(after.getCell('C1'))]).toEqual([
      'FFF3D3C4',
      'FFF3D3C4',
      undefined,
    ]);
    expect((await load(twice)).worksheets.map(({ name }) => name)).toEqual(['S', 'Problems', 'Problems 2']);
  });
  it('marks cells that are not there, in sheets whose cells have no names', async () => {
    const rows = [['a', null, 'c'], [1]];
    const problem = (row: number, column: string): Problem => ({
      sheet: 'S',
      row,
      column,
      code: 'x',
      detail: `${column}${row}`,
      severity: 'notice',
    });
    const bytes = makeWorkbook({ sheets: [{ name: 'S', rows }] });
    const book = await load(await markWorkbook(bytes, [problem(1, 'B'), problem(1, 'E'), problem(2, 'A')]));
    const sheet = book.getWorksheet('S')!;
    for (const cell of ['B1', 'E1', 'A2']) {
      expect([noteOf(sheet.getCell(cell)), fillOf(sheet.getCell(cell))]).toEqual([cell, 'FFF6EBC8']);
    }
    expect([sheet.getCell('A1').value, sheet.getCell('C1').value, sheet.getCell('A2').value]).toEqual(['a', 'c', 1]);
    const nameless = makeWorkbook({
      sheets: [
        {
          name: 'S',
          rows: [
            ['a', 'b'],
            [1, 2],
          ],
          isWithoutNames: true,
        },
      ],
    });
    const marked = await markWorkbook(nameless, [problem(2, 'B')]);
    expect((await read(marked)).report.sheets.map(({ name }) => name)).toEqual(['S', 'Problems']);
  });
  it('refuses what is neither a workbook nor a text file', async () => {
    await expect(markWorkbook(Buffer.from('%PDF-1.7'), [])).rejects.toMatchObject({ code: 'not-excel' });
  });
});
