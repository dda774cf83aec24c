import { PassThrough, Readable } from 'node:stream';
import { readSeries } from './read-series';

const read = (text: string, pieceLength = text.length) => {
  const bytes = Buffer.from(text);
  const pieces: Buffer[] = [];
  for (let i = 0; i < bytes.length; i += pieceLength) pieces.push(bytes.subarray(i, i + pieceLength));
  return readSeries(Readable.from(pieces, { objectMode: false }));
};

describe('a series', () => {
  it('has its columns in any order, and rows in the order of the file', async () => {
    const series = await read('lot,y,t,w\nB,1.5,20,2\nA,-2,10,0\nB,3e-3,20,1\n');
    expect(series.t).toEqual(Float64Array.of(20, 10, 20));
    expect(series.y).toEqual(Float64Array.of(1.5, -2, 0.003));
    expect(series.w).toEqual(Float64Array.of(2, 0, 1));
    expect(series.lot).toEqual(Int32Array.of(0, 1, 0));
    expect(series.lotNames).toEqual(['B', 'A']);
    expect(series.timeKind).toBe('number');
  });

  it('weighs every row 1 and has no lots where the file names none', async () => {
    const series = await read('t,y\n1,2\n2,3');
    expect(series.w).toEqual(Float64Array.of(1, 1));
    expect(series.lot).toBeUndefined();
  });

  it('is the same with quotes, spaces, a byte order mark, Windows line ends, blank lines at the end, and in small pieces', async () => {
    const plain = await read('t,y,lot\n1,2,L 1\n2,3,"L,2"\n');
    expect(await read('\ufeff"t", y,lot\r\n"1",2,L 1\r\n2, 3 ,"L,2"\r\n\r\n  \r\n')).toEqual(plain);
    expect(await read('\ufefft,y,lot\r\n1,2,L 1\r\n2,3,"L,2"\r\n', 3)).toEqual(plain);
  });

  it('tells its first problem while more is still to come', async () => {
    const input = new PassThrough();
    const answer = readSeries(input);
    input.write('t;y\n0;1\n');
    await expect(answer).rejects.toThrow('row 1: fields are separated by semicolons');
    expect(input.destroyed).toBe(true);
  });

  it('keeps epoch seconds without loss and counts ISO times without a zone', async () => {
    expect((await read('t,y\n1772323200.0000005,2\n')).t[0]).toBe(1772323200.0000005);
    const series = await read('t,y\n2026-03-01T06:00:00Z,1\n2026-03-01T06:00:01,2\n');
    expect(series.t).toEqual(Float64Array.of(1772344800, 1772344801));
    expect(series).toMatchObject({ timeKind: 'iso', zonelessCount: 1 });
  });

  it('is empty below a header alone', async () => {
    expect((await read('t,y\n')).t).toHaveLength(0);
  });

  it.each([
    ['', 'row 1: there is no header; columns are t,y[,w][,lot]'],
    ['\n\n', 'row 1: there is no header; columns are t,y[,w][,lot]'],
    ['1,2\n2,3\n', "row 1: unknown column '1'; columns are t,y[,w][,lot]"],
    ['t,y,batch\n', "row 1: unknown column 'batch'; columns are t,y[,w][,lot]"],
    ['T,y\n', "row 1: unknown column 'T'; columns are t,y[,w][,lot]"],
    ['t,y,t\n', "row 1: column 't' stands twice"],
    ['t,w\n1,2\n', "row 1: column 'y' is missing"],
    ['y,w\n1,2\n', "row 1: column 't' is missing"],
    ['t;y\n1,5;2\n', 'row 1: fields are separated by semicolons; write commas between them and a point in decimals'],
    ['t\ty\n', 'row 1: fields are separated by tabs; write commas between them and a point in decimals'],
    ['t,y\n1,2\n3,abc\n', "row 3: y is not a number: 'abc'"],
    ['t,y\n1,2\n3,\n', 'row 3: y is empty; leave the row out'],
    ['t,y\n1,2\n3,NaN\n', "row 3: y is not a number: 'NaN'"],
    ['t,y\n1,2\n3,NA\n', "row 3: y is not a number: 'NA'"],
    ['t,y\n1,2\n3,Infinity\n', "row 3: y is not a number: 'Infinity'"],
    ['t,y\n1,2\n3,1e999\n', "row 3: y is too large: '1e999'"],
    ['t,y\n1,2\n3,0x1F\n', "row 3: y is not a number: '0x1F'"],
    ['t,y\n1,"10,125"\n', "row 2: y is not a number: '10,125' (write a point in decimals)"],
    ['t,y\n1,10,125\n', 'row 2 has 3 fields where the header names 2 (a decimal comma? write a point)'],
    ['t,y\n1,2\n3\n', 'row 3 has 1 field where the header names 2'],
    ['t,y\n,2\n', 'row 2: t is empty'],
    ['t,y\nsoon,2\n', "row 2: t is neither a number nor an ISO time that exists: 'soon'"],
    [
      't,y\n2026-02-30T00:00:00Z,2\n',
      "row 2: t is neither a number nor an ISO time that exists: '2026-02-30T00:00:00Z'",
    ],
    ['t,y\n1,2\n2026-03-01T06:00:00Z,2\n', 'row 3: t is an ISO time where row 2 has a number'],
    ['t,y\n2026-03-01T06:00:00Z,2\n5,2\n', 'row 3: t is a number where row 2 has an ISO time'],
    ['t,y,w\n1,2,1\n2,3,-1\n', "row 3: w is negative: '-1'"],
    ['t,y,w\n1,2,1\n2,3,\n', 'row 3: w is empty'],
    ['t,y,w\n1,2,heavy\n', "row 2: w is not a number: 'heavy'"],
    ['t,y,lot\n1,2,A\n2,3,\n', 'row 3: lot is empty'],
    ['t,y\n1,2\n\n3,4\n', 'row 3 is blank; leave it out'],
    ['t,y,lot\n1,2,"A\n2,3,B\n', 'row 2: a quotation mark is opened and not closed'],
    ['t,y,lot\n1,2,A\n2,3,B"4\n', 'row 3: a quotation mark stands inside a field'],
  ])('is refused in words: %p', async (text, message) => {
    await expect(read(text)).rejects.toThrow(message);
  });

  it('does not keep a file in memory because of one quotation mark', async () => {
    const text = `t,y,lot\n1,2,"A\n${'3,4,B\n'.repeat(50_000)}`;
    await expect(read(text, 65_536)).rejects.toThrow('row 2: a quotation mark is opened and not closed');
  });
});
