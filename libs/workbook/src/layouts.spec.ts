import { COATER, problemList, readBook, readRows, type Read } from './testing/coater';
import type { CellSpec } from './testing/make-workbook';

/** Excel's serial of 5 January 2026. */
const DAY = 46027;
const at = (clock: string): { date: number } => {
  const [hours, minutes] = clock.split(':').map(Number);
  return { date: DAY + (hours * 60 + minutes) / 1440 };
};
const read = ({ readings }: Read): unknown[] =>
  readings.map(({ column, channelId, position, value }) => [column, channelId, position, value]);
const positions = (...heads: CellSpec[]): CellSpec[][] => [
  ['Time', 'Lot', 'Product', ...heads],
  [at('6:00'), 'A', 'SEP-12', 12.1, 12.2],
];
const TWO: unknown[] = [
  ['D', 11, '1', 12.1],
  ['E', 11, '2', 12.2],
];

describe('a column a position', () => {
  it.each([
    ['Reading 1', 'Reading 2'],
    ['Cavity 1', 'Cavity 2'],
    ['Pos 1', 'Pos 2'],
    ['1', '2'],
    [1, 2],
  ])('reads %p and %p as positions of the sheet’s channel', async (...heads) => {
    const result = await readRows(positions(...heads), 'Coat weight');
    expect(read(result)).toEqual(TWO);
    expect(problemList(result)).toEqual([]);
    expect(result.report.layout).toBe('wide');
  });
  it('reads numbers after a channel’s name as its positions', async () => {
    const result = await readRows(positions('Coat weight 1', 'Coat weight (2)'));
    expect(read(result)).toEqual(TWO);
    expect(problemList(result)).toEqual([]);
  });
  it('does not take a lonely number for a column of values', async () => {
    const result = await readRows([
      ['Time', 'Lot', 'Product', 'Coat weight', 'Lane 3'],
      [at('6:00'), 'A', 'SEP-12', 12.1, 4],
    ]);
    expect(read(result)).toEqual([['D', 11, null, 12.1]]);
    expect(problemList(result)).toEqual(['notice column-not-used E1']);
  });
});

describe('two header rows', () => {
  it('reads a channel’s name over the numbers of its positions', async () => {
    const result = await readRows([
      ['Coater 2, week 2'],
      ['Time', 'Lot', 'Product', 'Coat weight', null, null, 'Web thickness'],
      [null, null, null, 1, 2, 3, 'left', 'right'],
      [null, null, null, 'g/m²', 'g/m²', 'g/m²', 'µm', 'µm'],
      [at('6:00'), 'A', 'SEP-12', 12.1, 12.2, 12.3, 16, 17],
    ]);
    expect(read(result)).toEqual([
      ['D', 11, '1', 12.1],
      ['E', 11, '2', 12.2],
      ['F', 11, '3', 12.3],
      ['G', 12, 'left', 16],
      ['H', 12, 'right', 17],
    ]);
    expect(problemList(result)).toEqual([]);
    expect(result.report).toMatchObject({ rowsRead: 1, sheets: [{ headerRow: 3, rows: 1 }] });
  });
  it('reads places over the names of channels', async () => {
    const result = await readRows([
      [null, null, null, 'Cavity 1', null, 'Cavity 2'],
      ['Time', 'Lot', 'Product', 'Coat weight', 'Web thickness', 'Coat weight', 'Web thickness'],
      [at('6:00'), 'A', 'SEP-12', 12.1, 16, 12.2, 17],
    ]);
    expect(read(result)).toEqual([
      ['D', 11, '1', 12.1],
      ['E', 12, '1', 16],
      ['F', 11, '2', 12.2],
      ['G', 12, '2', 17],
    ]);
  });
  it('reads gauges over the names of channels, and names over both rows', async () => {
    const shared = { ...COATER, channels: COATER.channels.map((one) => ({ ...one, aliases: [`BG-${one.id}`] })) };
    const rows: CellSpec[][] = [
      ['Measured', 'Lot', null, 'BG-11', 'BG-12'],
      ['at', 'number', 'Product', 'Coat weight', 'Web thickness'],
      [at('6:00'), 'A', 'SEP-12', 12.1, 16],
    ];
    const result = await readBook({ sheets: [{ name: 'S', rows }] }, shared);
    expect(read(result)).toEqual([
      ['D', 11, null, 12.1],
      ['E', 12, null, 16],
    ]);
    expect(problemList(result)).toEqual([]);
  });
  it('takes a title straight above the header for no part of it', async () => {
    const result = await readRows([['Coat weight and more of lot A'], ...positions('Coat weight', 'Web thickness')]);
    expect(read(result)).toEqual([
      ['D', 11, null, 12.1],
      ['E', 12, null, 12.2],
    ]);
    expect(problemList(result)).toEqual([]);
  });
  it('finds both rows repeated', async () => {
    const heads: CellSpec[][] = [
      ['Time', 'Lot', 'Product', 'Coat weight', null],
      [null, null, null, 1, 2],
    ];
    const row: CellSpec[] = [at('6:00'), 'A', 'SEP-12', 12.1, 12.2];
    const result = await readRows([...heads, row, ...heads, row]);
    expect(problemList(result)).toEqual(['row_not_used repeated-header 4', 'row_not_used repeated-header 5']);
    expect(result.readings).toHaveLength(4);
  });
});

describe('spacer columns', () => {
  it('are passed over', async () => {
    const result = await readRows([
      [null, 'Time', null, 'Lot', 'Product', null, 'Coat weight'],
      [null, at('6:00'), null, 'A', 'SEP-12', null, 12.1],
    ]);
    expect(read(result)).toEqual([['G', 11, null, 12.1]]);
    expect(problemList(result)).toEqual([]);
  });
});
