import ExcelJS from 'exceljs';
import { markWorkbook } from './mark-workbook';
import { COATER, read } from './testing/coater';

const TEXT = Buffer.from(
  'Time;Lot;Channel;Value\n\n02.02.2026 06:00;007;Coat weight;10,5\n02.02.2026 06:10;=1+1;Coat weight;a < "b"\n',
);

describe('a marked text file', () => {
  it('is a workbook with the texts where they stood, the problem at its cell, and the list of problems', async () => {
    const { report } = await read(TEXT, COATER);
    const book = new ExcelJS.Workbook();
    await book.xlsx.load((await markWorkbook(TEXT, report.problems)) as unknown as ArrayBuffer);
    expect(book.worksheets.map(({ name }) => name)).toEqual(['Text file', 'Problems']);
    const [sheet] = book.worksheets;
    expect([sheet.getCell('B3').value, sheet.getCell('D3').value]).toEqual(['007', '10,5']);
    expect([sheet.getCell('B4').value, sheet.getCell('D4').value]).toEqual(['=1+1', 'a < "b"']);
    expect(JSON.stringify(sheet.getCell('D4').note)).toContain('which is no number');
    expect(sheet.getCell('D4').fill).toMatchObject({ type: 'pattern' });
  });
});
