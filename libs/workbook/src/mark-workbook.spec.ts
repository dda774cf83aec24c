import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { Workbook, type Cell, type FillPattern } from 'exceljs';
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
    const sheet = (await load(await markWorkbook(MESSY, report.problems))).getWorksheet('Problems')!;
    expect(sheet.rowCount).toBe(report.problems.length + 1);
    const ambiguous = report.problems.findIndex((problem) => problem.code === 'ambiguous-number');
    const row = sheet.getRow(ambiguous + 2);
    expect([row.getCell(1).text, row.getCell(2).text, row.getCell(3).text]).toEqual(['Shift', 'E6', 'cell not used']);
    expect(row.getCell(2).hyperlink).toContain("'Shift'!E6");
    expect(row.getCell(4).text).toBe(report.problems[ambiguous].detail);
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
  it('gives the list alone for a workbook too large to be written again', async () => {
    const rows = Array.from({ length: 12_000 }, (_, row) =>
      Array.from({ length: 12 }, (_, column) => row * column + 0.123456789),
    );
    const bytes = makeWorkbook({ sheets: [{ name: 'S', rows }] });
    const book = await load(
      await markWorkbook(bytes, [{ sheet: 'S', row: 5, column: 'B', code: 'x', detail: 'Here.', severity: 'notice' }]),
    );
    expect(book.worksheets.map((sheet) => sheet.name)).toEqual(['Problems']);
    expect(book.worksheets[0].getCell('A1').text).toMatch(/the list alone/);
    expect(book.worksheets[0].getCell('D3').text).toBe('Here.');
  });
  it('refuses what is no workbook', async () => {
    await expect(markWorkbook(Buffer.from('hello'), [])).rejects.toMatchObject({ code: 'not-excel' });
  });
});
