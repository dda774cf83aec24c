import { Workbook, type Worksheet } from 'exceljs';
import { escapeFormula, writeTable, type TableColumn } from './write-table';

const COLUMNS: TableColumn[] = [
  { header: 'Lot', type: 'text' },
  { header: 'Coat weight', unit: 'g/m²', type: 'number', format: '0.00', width: 14 },
  { header: 'Start', type: 'datetime' },
];

async function sheetOf(rows: Iterable<unknown[]> | AsyncIterable<unknown[]>, sheetName = 'Lots'): Promise<Worksheet> {
  const bytes = await writeTable({ sheetName, columns: COLUMNS, rows, timeZone: 'Europe/Berlin' });
  const book = new Workbook();
  await book.xlsx.load(bytes as unknown as ArrayBuffer);
  return book.worksheets[0];
}

describe('writeTable', () => {
  it('writes numbers as numbers and instants as the plant’s wall clock', async () => {
    const sheet = await sheetOf([
      ['24101', 12.5, Date.parse('2026-01-05T05:00:00Z')],
      ['24102', '13.25', new Date('2026-07-05T05:00:00Z')],
    ]);
    expect(sheet.getRow(2).values).toEqual([undefined, '24101', 12.5, new Date('2026-01-05T06:00:00Z')]);
    expect(sheet.getRow(3).values).toEqual([undefined, '24102', 13.25, new Date('2026-07-05T07:00:00Z')]);
    expect(sheet.getCell('B2').numFmt).toBe('0.00');
  });
  it('names units in the header, freezes it and filters the columns', async () => {
    const sheet = await sheetOf([['a', 1, 0]]);
    expect(sheet.getRow(1).values).toEqual([undefined, 'Lot', 'Coat weight [g/m²]', 'Start']);
    expect(sheet.views[0]).toMatchObject({ state: 'frozen', ySplit: 1 });
    expect(sheet.autoFilter).toBe('A1:C2');
  });
  it('leaves empty what is missing or no number', async () => {
    const sheet = await sheetOf([
      [null, NaN, undefined],
      ['', '', NaN],
    ]);
    for (const cell of ['A2', 'B2', 'C2', 'B3', 'C3']) expect(sheet.getCell(cell).value).toBeNull();
  });
  it('takes rows as they come', async () => {
    const rows = (async function* () {
      for (let index = 0; index < 1_200; index += 1) {
        if (index % 500 === 0) await new Promise((resolve) => setImmediate(resolve));
        yield [`L${index}`, index, 0];
      }
    })();
    const sheet = await sheetOf(rows);
    expect([sheet.rowCount, sheet.getCell('B1201').value]).toEqual([1201, 1199]);
  });
  it('puts an apostrophe before text that a program could take for a formula', async () => {
    const sheet = await sheetOf([['=HYPERLINK("http://evil.example")', 1, 0]]);
    expect(sheet.getCell('A2').value).toBe('\'=HYPERLINK("http://evil.example")');
    for (const text of ['=1', '+1', '-1', '@a', '\tx', '\rx']) expect(escapeFormula(text)).toBe(`'${text}`);
    for (const text of ['L-1', 'a=b', '', '24101']) expect(escapeFormula(text)).toBe(text);
  });
  it('makes any name a sheet’s name', async () => {
    expect((await sheetOf([], 'Lots: Coater 2 [early] / 5 January 2026')).name).toHaveLength(31);
  });
  it('refuses a zone that does not exist', async () => {
    await expect(writeTable({ sheetName: 'S', columns: [], rows: [], timeZone: 'Nowhere' })).rejects.toThrow(
      RangeError,
    );
  });
});
