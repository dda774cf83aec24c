import { DEFAULT_LIMITS } from '../limits';
import { makeWorkbook, wrapSheets } from '../testing/make-workbook';
import { writeZip, type ZipPart } from '../testing/zip-writer';
import { columnLetters, columnOf } from './cell-names';
import { readFormatCode } from './formats';
import { readSheetRows, type SheetRow } from './sheet-rows';
import { openWorkbook } from './workbook-parts';

async function rowsOf(bytes: Buffer): Promise<SheetRow[]> {
  const book = await openWorkbook(bytes, DEFAULT_LIMITS);
  const rows: SheetRow[] = [];
  for await (const some of readSheetRows(book, book.sheets[0], DEFAULT_LIMITS, { cells: 0 })) rows.push(...some);
  return rows;
}
const contents = (row: SheetRow): (string | number | undefined)[] =>
  Array.from(row.cells.slice(1), (cell) => (cell ? (cell.kind === 'number' ? cell.number : cell.text) : undefined));
const fromXml = (xml: string, more: ZipPart[] = []): Promise<SheetRow[]> =>
  rowsOf(writeZip([...wrapSheets([{ name: 'S', xml }]), ...more]));

describe('readSheetRows', () => {
  it('reads cells whose names are left out', async () => {
    const rows = [
      ['a', 'b'],
      [1, 2],
    ];
    const read = await rowsOf(makeWorkbook({ sheets: [{ name: 'S', rows, isWithoutNames: true }] }));
    expect(read.map((row) => [row.number, ...contents(row)])).toEqual([
      [1, 'a', 'b'],
      [2, 1, 2],
    ]);
  });
  it('reads a formula whose stored result is zero, and tells one without a result', async () => {
    const rows = [[{ formula: 'A2-A2', result: 0 }, { formula: 'A2' }]];
    const [row] = await rowsOf(makeWorkbook({ sheets: [{ name: 'S', rows }] }));
    expect(row.cells[1]).toMatchObject({ kind: 'number', number: 0 });
    expect(row.cells[2]).toMatchObject({ kind: 'formula-without-result' });
  });
  it('reads names with a prefix, rich text, escapes and skips phonetic hints', async () => {
    const [row] = await fromXml(
      '<x:worksheet xmlns:x="http://schemas.openxmlformats.org/spreadsheetml/2006/main"><x:sheetData><x:row r="3">' +
        '<x:c r="B3" t="inlineStr"><x:is><x:r><x:t>Coat </x:t></x:r><x:r><x:t>weight_x000A_&amp;</x:t></x:r><x:rPh><x:t>no</x:t></x:rPh></x:is></x:c>' +
        '</x:row></x:sheetData></x:worksheet>',
    );
    expect([row.number, ...contents(row)]).toEqual([3, undefined, 'Coat weight\n&']);
  });
  it('finds shared texts wherever their part lies in the archive', async () => {
    const parts = wrapSheets([
      { name: 'S', xml: '<worksheet><sheetData><row><c t="s"><v>1</v></c></row></sheetData></worksheet>' },
    ]);
    const relations = parts.find((part) => part.name.endsWith('workbook.xml.rels'))!;
    relations.data = (relations.data as string).replace(
      '</Relationships>',
      '<Relationship Id="t" Type="x/sharedStrings" Target="/xl/sharedStrings.xml"/></Relationships>',
    );
    const shared = { name: 'xl/sharedStrings.xml', data: '<sst><si><t>no</t></si><si><t>yes</t></si></sst>' };
    const [first] = await rowsOf(writeZip([...parts, shared]));
    const [last] = await rowsOf(writeZip([shared, ...parts.reverse()]));
    expect([contents(first), contents(last)]).toEqual([['yes'], ['yes']]);
  });
  it('leaves out rows and cells that hold nothing', async () => {
    const rows = await fromXml(
      '<worksheet><sheetData><row r="1"><c r="A1" s="1"/></row><row r="2"><c r="C2"><v> </v></c><c r="D2"><v>4</v></c></row></sheetData></worksheet>',
    );
    expect(rows.map((row) => [row.number, ...contents(row)])).toEqual([[2, undefined, undefined, undefined, 4]]);
  });
  it.each([
    ['a column beyond the last', '<c r="XFE1"><v>1</v></c>'],
    ['a number that is none', '<c r="A1"><v>1x</v></c>'],
    ['a shared text that is not there', '<c r="A1" t="s"><v>7</v></c>'],
    ['an entity of its own', '<c r="A1" t="str"><v>&bomb;</v></c>'],
    ['a tag that is not closed', '<c r="A1"><v>1</v>'],
    ['nesting without end', '<a>'.repeat(80) + '</a>'.repeat(80)],
  ])('refuses %s as damaged', async (_, cell) => {
    const xml = `<worksheet><sheetData><row r="1">${cell}</row></sheetData></worksheet>`;
    await expect(fromXml(xml)).rejects.toMatchObject({ code: 'corrupt' });
  });
});

describe('column names', () => {
  it.each([
    [1, 'A'],
    [26, 'Z'],
    [27, 'AA'],
    [702, 'ZZ'],
    [703, 'AAA'],
    [16384, 'XFD'],
  ])('names column %i %s and back', (number, letters) => {
    expect(columnLetters(number)).toBe(letters);
    expect(columnOf(`${letters}17`)).toBe(number);
  });
  it.each(['', '12', 'a1', 'ABCDE1', 'A'])('finds no column in %p', (name) => {
    expect(columnOf(name)).toBe(0);
  });
});

describe('readFormatCode', () => {
  it.each(['yyyy\\-mm\\-dd', 'dd.mm.yyyy hh:mm', '[h]:mm:ss', '[$-407]d. mmm yyyy', '[mm]:ss.0'])(
    'knows %p as a date',
    (code) => {
      expect(readFormatCode(code).isDate).toBe(true);
    },
  );
  it.each(['General', '0.00', '#,##0.00 "g/m² dry"', '[Red]0.0', '0.00E+00', '@', '0.0\\ \\m'])(
    'knows %p as none',
    (code) => {
      expect(readFormatCode(code).isDate).toBe(false);
    },
  );
  it('knows percentages and leading zeros', () => {
    expect(readFormatCode('0.0%').isPercent).toBe(true);
    expect(readFormatCode('00000').zeroFill).toBe(5);
  });
});
