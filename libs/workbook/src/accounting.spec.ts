import fc from 'fast-check';
import { readWorkbook } from './read-workbook';
import { COATER, readBook } from './testing/coater';
import { makeWorkbook, type CellSpec } from './testing/make-workbook';

const pick = (...specs: CellSpec[]) => fc.constantFrom<CellSpec>(...specs);
const STAMP = { date: 46027.25 };
const time = fc.oneof(
  { weight: 4, arbitrary: fc.double({ min: 46020, max: 46060, noNaN: true }).map((date): CellSpec => ({ date })) },
  {
    weight: 1,
    arbitrary: pick(
      null,
      '2026-01-05 06:00',
      '05/01/2026',
      'Average',
      '2031-01-01',
      60,
      1e9,
      { error: '#REF!' },
      'Time',
    ),
  },
);
const lot = fc.oneof(
  { weight: 3, arbitrary: pick('A', 'B', 24101) },
  { weight: 1, arbitrary: pick(null, '  ', 1.5, 'MASTER', { formula: 'A1' }, 'Lot') },
);
const product = fc.oneof(
  { weight: 4, arbitrary: pick('SEP-12') },
  { weight: 1, arbitrary: pick(null, 'SEP-16', 'other', 7, 'Product') },
);
const channel = fc.oneof(
  { weight: 4, arbitrary: pick('Coat weight', 'LS-305', 'TC-118') },
  { weight: 1, arbitrary: pick(null, 'Gloss', 3) },
);
const value = fc.oneof(
  { weight: 3, arbitrary: fc.double({ min: -50, max: 50, noNaN: true }) },
  { weight: 1, arbitrary: fc.string({ maxLength: 8 }) },
  {
    weight: 2,
    arbitrary: pick(
      null,
      '-',
      '10,125',
      '12,5',
      '<0.05',
      'OL',
      { error: '#DIV/0!' },
      { formula: 'A1' },
      { day: 46027 },
      'Value',
      9999,
    ),
  },
);
const isBlank = (cell: CellSpec): boolean => cell === null || (typeof cell === 'string' && cell.trim() === '');

const long = {
  header: ['Time', 'Lot', 'Product', 'Characteristic', 'Value', 'Remark'],
  first: [STAMP, 'A', 'SEP-12', 'CW', 1] as CellSpec[],
  row: fc.tuple(time, lot, product, channel, value, pick(null, 'seen')),
};
const wide = {
  header: ['Time', 'Lot', 'Product', 'Coat weight', 'Web thickness', 'Gloss'],
  first: [STAMP, 'A', 'SEP-12', 1, 2] as CellSpec[],
  row: fc.tuple(time, lot, product, value, value, value),
};

describe('every row is accounted for', () => {
  it.each([
    ['long', long],
    ['wide', wide],
  ])('in the %s layout, whatever the cells hold', async (_, { header, first, row }) => {
    const blank = fc.constant<CellSpec[]>([null, ' ', null]);
    const rows = fc.array(fc.oneof({ weight: 9, arbitrary: row }, { weight: 1, arbitrary: blank }), {
      maxLength: 40,
    });
    await fc.assert(
      fc.asyncProperty(rows, async (body) => {
        const all = [first, ...body];
        const { report, readings } = await readBook({ sheets: [{ name: 'S', rows: [header, ...all] }] });
        const filled = all.flatMap((cells, index) => (cells.every(isBlank) ? [] : [index + 2]));
        const used = new Set(readings.map((reading) => reading.row));
        const notUsed = report.problems.filter((problem) => problem.severity === 'row_not_used');
        expect(report.rowsRead).toBe(filled.length);
        expect(report.rowsNotUsed).toBe(filled.length - used.size);
        expect(notUsed.map((problem) => problem.row)).toEqual(filled.filter((number) => !used.has(number)));
        expect(report.readingsParsed).toBe(readings.length);
        expect(report.lots.reduce((sum, one) => sum + one.readings, 0)).toBe(readings.length);
        for (const { value: read, censoring, at } of readings) {
          expect(censoring === null ? Number.isFinite(read) : read === null).toBe(true);
          expect(Number.isFinite(at)).toBe(true);
        }
        for (const problem of report.problems) expect(problem.detail).toMatch(/^Sheet "S".*[.?!]$/s);
      }),
      { numRuns: 120 },
    );
  });

  it('names every filled cell of the wide layout that gives no reading', async () => {
    await fc.assert(
      fc.asyncProperty(fc.array(fc.tuple(value, value), { minLength: 1, maxLength: 20 }), async (pairs) => {
        const rows: CellSpec[][] = [
          wide.header,
          wide.first,
          ...pairs.map((pair): CellSpec[] => [STAMP, 'A', 'SEP-12', ...pair]),
        ];
        const { report, readings } = await readBook({ sheets: [{ name: 'S', rows }] });
        const named = new Set([...readings, ...report.problems].map(({ row, column }) => `${column}${row}`));
        pairs.forEach((_, index) => {
          expect(named).toContain(`D${index + 3}`);
          expect(named).toContain(`E${index + 3}`);
        });
      }),
      { numRuns: 60 },
    );
  });

  it('where tables of any kind follow each other on a sheet', async () => {
    const over: CellSpec[] = ['Time', 'Lot', 'Product', 'Web thickness', null];
    const beside: CellSpec[] = ['Time', 'Lot', 'CW', null, 'Time', 'Lot', 'Dicke'];
    const piece = fc.oneof(
      long.row.map((row) => [row]),
      wide.row.map((row) => [row]),
      fc.constantFrom<CellSpec[][]>(
        [long.header],
        [wide.header],
        [over, [null, null, null, 1, 2]],
        [beside],
        [['Lot: C']],
        [['Web thickness']],
        [['a word', 'and more']],
      ),
    );
    await fc.assert(
      fc.asyncProperty(fc.array(piece, { maxLength: 25 }), async (pieces) => {
        const body: CellSpec[][] = [long.first, ...pieces.flat()];
        const { report, readings } = await readBook({ sheets: [{ name: 'S', rows: [long.header, ...body] }] });
        const filled = body.flatMap((cells, index) => (cells.every(isBlank) ? [] : [index + 2]));
        const used = new Set(readings.map((reading) => reading.row));
        const notUsed = report.problems.filter((problem) => problem.severity === 'row_not_used');
        expect(report.rowsRead).toBe(filled.length);
        expect(notUsed.map((problem) => problem.row)).toEqual(filled.filter((number) => !used.has(number)));
        expect(report.rowsNotUsed).toBe(notUsed.length);
      }),
      { numRuns: 80 },
    );
  });

  it('hands readings over in batches, waits for each, and counts them all', async () => {
    const body = Array.from({ length: 4_500 }, (_, index): CellSpec[] => [
      { date: 46027 + index / 86_400 },
      'A',
      'SEP-12',
      'CW',
      index,
    ]);
    const sizes: number[] = [];
    const progress: number[] = [];
    let isBusy = false;
    const report = await readWorkbook(
      makeWorkbook({ sheets: [{ name: 'S', rows: [long.header, ...body] }] }),
      COATER,
      async (batch) => {
        expect(isBusy).toBe(false);
        isBusy = true;
        await new Promise((resolve) => setImmediate(resolve));
        sizes.push(batch.length);
        isBusy = false;
      },
      { onProgress: (rows) => progress.push(rows) },
    );
    expect(sizes).toEqual([2_000, 2_000, 500]);
    expect(report).toMatchObject({ rowsRead: 4_500, rowsNotUsed: 0, readingsParsed: 4_500 });
    expect(progress.at(-1)).toBe(4_500);
    expect(progress).toEqual([...progress].sort((a, b) => a - b));
  });
});
