import { DEFAULT_LIMITS, type ReadLimits } from '../limits';
import type { WorkbookAnswers } from '../answers';
import { COATER, problemList, read } from '../testing/coater';
import { openSource, type Source } from '../container/open-source';
import type { SheetRow } from '../container/sheet-rows';

const open = (bytes: Buffer, answers: WorkbookAnswers = {}, limits: Partial<ReadLimits> = {}): Promise<Source> =>
  openSource(bytes, { ...DEFAULT_LIMITS, ...limits }, answers);

async function rowsOf(source: Source): Promise<SheetRow[]> {
  const rows: SheetRow[] = [];
  for await (const some of source.rows(source.sheets[0])) rows.push(...some);
  return rows;
}
const textsOf = async (source: Source): Promise<(string | number)[][]> =>
  (await rowsOf(source)).map(({ number, cells }) => [
    number,
    ...Array.from(cells.slice(1), (cell) => cell?.text ?? ''),
  ]);
const utf8 = (text: string): Buffer => Buffer.from(text);
const utf16le = (text: string): Buffer => Buffer.from(text, 'utf16le');
const utf16be = (text: string): Buffer => utf16le(text).swap16();

const LINES = 'Zeit;Los;Dicke\n2026-02-02 06:00;L-1;12,5 µm\n';
const BYTES_1252 = Buffer.from(LINES, 'latin1');

describe('encodings', () => {
  it.each([
    ['UTF-8', utf8(LINES), 'utf-8'],
    ['UTF-8 with a mark', utf8(`\ufeff${LINES}`), 'utf-8'],
    ['UTF-16 LE with a mark', utf16le(`\ufeff${LINES}`), 'utf-16le'],
    ['UTF-16 BE with a mark', utf16be(`\ufeff${LINES}`), 'utf-16be'],
    ['UTF-16 LE without', utf16le(LINES), 'utf-16le'],
    ['UTF-16 BE without', utf16be(LINES), 'utf-16be'],
    ['Windows-1252', BYTES_1252, 'windows-1252'],
  ])('%s is recognised', async (_, bytes, encoding) => {
    const source = await open(bytes);
    expect(source.text).toEqual({ encoding, separator: ';', decimalSign: ',' });
    expect(await textsOf(source)).toEqual([
      [1, 'Zeit', 'Los', 'Dicke'],
      [2, '2026-02-02 06:00', 'L-1', '12,5 µm'],
    ]);
  });
  it('the euro sign and quotes of Windows-1252 are read, which Latin-1 lacks', async () => {
    const bytes = Buffer.concat([Buffer.from('a;'), Buffer.from([0x80, 0x93, 0x94]), Buffer.from('\n')]);
    expect(await textsOf(await open(bytes))).toEqual([[1, 'a', '€“”']]);
  });
  it('a first character beyond ASCII at the end of a long file makes it Windows-1252', async () => {
    const bytes = Buffer.concat([utf8('a;b\n'.repeat(50_000)), Buffer.from([0xb5, 0x0a])]);
    expect((await open(bytes)).text!.encoding).toBe('windows-1252');
  });
  it('a character that two pieces share is read whole', async () => {
    const rows = await rowsOf(
      await open(utf8(`${'x'.repeat(30_000)};y\n${'x'.repeat(30_000)};${'µ'.repeat(9_000)}\n`)),
    );
    expect(rows[1].cells[2]!.text).toBe('µ'.repeat(9_000));
  });
  it('an answer goes before what is recognised', async () => {
    const source = await open(utf8(LINES), { encoding: 'windows-1252', separator: ',' });
    expect(source.text).toMatchObject({ encoding: 'windows-1252', separator: ',' });
    expect(await textsOf(source)).toContainEqual([2, '2026-02-02 06:00;L-1;12', '5 Âµm']);
  });
});

describe('separators and decimal signs', () => {
  it.each([
    ['a comma', 'Time,Lot,A\n6:00,1,1.5\n7:00,1,2.25\n', ',', '.'],
    ['a semicolon beside decimal commas', 'Time;Lot;A;B\n6:00;1;1,5;2,5\n7:00;1;1,25;3,5\n', ';', ','],
    ['a semicolon where the header has commas too', 'Time;Lot;A, dry\n6:00;1;1,5\n7:00;1;2,5\n', ';', ','],
    ['a tab beside decimal commas', 'Time\tLot\tA\n6:00\t1\t1,5\n', '\t', ','],
    ['a pipe', 'Time|Lot|A\n6:00|1|1.5\n', '|', '.'],
    ['a comma beside quoted decimal commas', 'Time,Lot,A\n6:00,1,"1,5"\n7:00,1,"2,5"\n', ',', ','],
    ['a comma below titles with semicolons', 'Export; line 2; night\nTime,Lot,A\n6:00,1,1.5\n6:05,1,1.5\n', ',', '.'],
    ['a comma beside dates with points', 'Time,Lot,A\n02.03.2026,1,15\n', ',', null],
    ['none at all', 'Time\n6:00\n', ',', null],
    ['both signs in one file', 'Time;A;B\n6:00;1,5;2.5\n', ';', null],
    ['commas that may be either', 'Time;A\n6:00;10,125\n', ';', null],
  ])('%s', async (_, text, separator, decimalSign) => {
    expect((await open(utf8(text))).text).toMatchObject({ separator, decimalSign });
  });
  it('a first line sep= is honoured, counts as a row and is none of the table', async () => {
    const source = await open(utf8('\ufeffsep=|\r\nTime|A;B;C\r\n6:00|1;2;3\r\n'));
    expect(source.text!.separator).toBe('|');
    expect(await textsOf(source)).toEqual([
      [2, 'Time', 'A;B;C'],
      [3, '6:00', '1;2;3'],
    ]);
  });
});

describe('rows', () => {
  it.each([
    ['LF', '\n'],
    ['CRLF', '\r\n'],
    ['CR', '\r'],
  ])('lines end in %s; empty lines count and give no row', async (_, end) => {
    const lines = ['a;b', '', '1;2', ';', '3;4'];
    expect(await textsOf(await open(utf8(lines.join(end))))).toEqual([
      [1, 'a', 'b'],
      [3, '1', '2'],
      [5, '3', '4'],
    ]);
  });
  it('quotes hold separators, line breaks and quotes; a quote within a text is one', async () => {
    const text = 'a;b\n"x;1";"say ""so""\nhere"\n5" pipe;="007"\n';
    expect(await textsOf(await open(utf8(text)))).toEqual([
      [1, 'a', 'b'],
      [2, 'x;1', 'say "so"\nhere'],
      [3, '5" pipe', '007'],
    ]);
  });
  it('an old end-of-file mark is no row', async () => {
    expect(await textsOf(await open(utf8('a;b\n1;2\n\u001a')))).toHaveLength(2);
  });
  it('quotes that never end are refused with their row', async () => {
    for (const tail of ['', 'x;y\n'.repeat(100_000)]) {
      const source = await open(utf8(`a;b\n1;2\n3;"4\n${tail}`));
      await expect(rowsOf(source)).rejects.toMatchObject({
        code: 'corrupt',
        detail: expect.stringMatching(/^Row 3 of the text file begins a text in quotation marks that does not end\./),
      });
    }
  });
  it('a cell, a file and a number of cells over their limits are refused', async () => {
    await expect(rowsOf(await open(utf8(`a;${'x'.repeat(32_768)}`)))).rejects.toMatchObject({ code: 'too-large' });
    await expect(rowsOf(await open(utf8('a;b;c'), {}, { maxCells: 2 }))).rejects.toMatchObject({
      code: 'too-many-cells',
    });
    await expect(open(utf8('a;b;c'), {}, { maxBytes: 4 })).rejects.toMatchObject({ code: 'too-large' });
  });
});

describe('readings of a text file', () => {
  const TEXT =
    'Time;Lot;Channel;Value\n02.02.2026 06:00;L-1;Coat weight;10,5\n02.02.2026 06:10;L-1;Coat weight;10,125\n02.02.2026 06:20;L-1;Coat weight;oops\n';
  it('say how it was read, name rows and columns, and do not mind numbers as texts', async () => {
    const result = await read(utf8(TEXT), COATER);
    expect(result.report.text).toEqual({ encoding: 'utf-8', separator: ';', decimalSign: ',' });
    expect(result.readings.map(({ value, row, column }) => [value, column, row])).toEqual([
      [10.5, 'D', 2],
      [10.125, 'D', 3],
    ]);
    expect(problemList(result)).toEqual(['notice no-product-column 1', 'row_not_used not-a-number D4']);
    expect(result.report.problems[1].detail).toBe('Row 4, column D says "oops", which is no number.');
  });
});
