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

describe('hidden columns', () => {
  it('are read, and those that are used are said', async () => {
    const rows: CellSpec[][] = [
      ['Time', 'Lot', 'Product', 'CW', 'Operator'],
      [at('6:00'), 'A', 'SEP-12', 12.1, 'M. K.'],
    ];
    const result = await readBook({ sheets: [{ name: 'S', rows, hiddenColumns: [2, 4, 5] }] });
    expect(read(result)).toEqual([['D', 11, null, 12.1]]);
    expect(result.report.problems.map((one) => one.detail)).toEqual([
      'Sheet "S" has hidden columns that are read like the others (B, D).',
    ]);
  });
});

describe('shapes that are not read', () => {
  const good: CellSpec[][] = [
    ['Time', 'Lot', 'Product', 'CW'],
    [at('6:00'), 'A', 'SEP-12', 12.1],
  ];
  const transposed: CellSpec[][] = [
    ['Hour', at('6:00'), at('7:00'), at('8:00')],
    ['Lot', 'A', 'A', 'A'],
    ['Coat weight', 12.1, 12.2, 12.3],
  ];
  const cross: CellSpec[][] = [
    ['Coat weight, lot A'],
    ['Sample', { clock: 0.25 }, { clock: 0.5 }, { clock: 0.75 }],
    [1, 12.1, 12.2, 12.3],
    [2, 12.4, 12.5, 12.6],
  ];
  it.each([
    ['transposed-table', transposed, /"Transpose"/],
    ['cross-table', cross, /a row for each time/],
  ])('names a %s and says what to do', async (code, rows, sentence) => {
    const alone = await readRows(rows);
    expect(problemList(alone)).toEqual([`blocking ${code}`]);
    expect(alone.report.problems[0].detail).toMatch(sentence);
    const beside = await readBook({
      sheets: [
        { name: 'Good', rows: good },
        { name: 'S', rows },
      ],
    });
    expect(problemList(beside)).toEqual([`blocking ${code}`]);
    expect(beside.report.questions[0].choices).toEqual([
      { label: 'Nothing on this sheet is read', answers: { sheets: { S: { headerRow: null } } } },
    ]);
  });
});

describe('titles above the header', () => {
  it('give lot, product, channel and unit for the rows without their own, and it is said', async () => {
    const result = await readRows([
      ['Coater 2'],
      ['Lot:', null, 24117, 'Product: SEP-16'],
      ['Characteristic: Coat weight', null, 'Unit', 'g/m2'],
      ['Time', 'Lot', 'Reading 1', 'Reading 2'],
      [at('6:00'), null, 12.1, 12.2],
      [at('6:10'), '24118', 12.3, null],
    ]);
    expect(result.readings.map(({ lot, product, channelId, value }) => [lot, product, channelId, value])).toEqual([
      ['24117', 'SEP-16', 11, 12.1],
      ['24117', 'SEP-16', 11, 12.2],
      ['24118', 'SEP-16', 11, 12.3],
    ]);
    expect(result.report.problems.map((one) => one.detail)).toEqual([
      'Sheet "Readings" gives the lot "24117" in cell C2: it counts for every row without its own.',
      'Sheet "Readings" gives the product "SEP-16" in cell D2: it counts for every row without its own.',
      'Sheet "Readings" gives the unit "g/m2" in cell D3: it counts for every row without its own.',
      'Sheet "Readings", cell D6 has no value, which is not taken as zero.',
    ]);
  });
  it('are not used where they contradict each other', async () => {
    const result = await readRows([['Lot: A'], ['Lot: B'], ['Time', 'Product', 'CW'], [at('6:00'), 'SEP-12', 12.1]]);
    expect(problemList(result)).toEqual([
      'notice titles-disagree',
      'blocking no-lot-column 3',
      'row_not_used lot-missing 4',
    ]);
  });
  it('are asked about where they name another channel than the sheet', async () => {
    const rows: CellSpec[][] = [
      ['Gauge', 'BG-201'],
      ['Time', 'Lot', 'Product', 'Value'],
      [at('6:00'), 'A', 'SEP-12', 12.1],
    ];
    const result = await readRows(rows, 'Web thickness');
    expect(result.report.questions.map(({ code, choices }) => [code, choices.map((one) => one.label)])).toEqual([
      ['no-channel-column', ['Coat weight', 'Web thickness']],
    ]);
  });
});

describe('a sheet a gauge', () => {
  it.each(['LS-305', 'LS-305 night', 'Web thickness, week 2', '2026-01-05 LS-305'])('is found by %p', async (name) => {
    const rows: CellSpec[][] = [
      ['Time', 'Lot', 'Product', 'Value'],
      [at('6:00'), 'A', 'SEP-12', 16],
    ];
    expect(read(await readRows(rows, name))).toEqual([['D', 12, null, 16]]);
  });
});

describe('several tables on a sheet', () => {
  const first: CellSpec[][] = [
    ['Time', 'Lot', 'Product', 'Coat weight'],
    [at('6:00'), 'A', 'SEP-12', 12.1],
  ];
  it('are read one below the other, each by its header and titles', async () => {
    const filler = Array.from({ length: 50 }, () => first[1]);
    const result = await readRows([
      ...first,
      ...filler,
      [],
      ['Web thickness'],
      ['Lot', 'Time', 'Product', 1, 2],
      [null, null, null, 'µm', 'µm'],
      ['A', at('7:00'), 'SEP-12', 16, 17],
    ]);
    expect(read(result).slice(-2)).toEqual([
      ['D', 12, '1', 16],
      ['E', 12, '2', 17],
    ]);
    expect(result.readings).toHaveLength(53);
    expect(problemList(result)).toEqual([
      'row_not_used row-without-reading 54',
      'row_not_used table-header 55',
      'row_not_used table-header 56',
    ]);
    expect(result.report).toMatchObject({ rowsRead: 55, rowsNotUsed: 3, sheets: [{ headerRow: 1, rows: 55 }] });
  });
  it('are read side by side where each is whole', async () => {
    const result = await readRows([
      ['Time', 'Lot', 'Product', 'CW', null, 'Time', 'Lot', 'Product', 'Dicke'],
      [at('6:00'), 'A', 'SEP-12', 12.1, null, at('6:30'), 'B', 'SEP-16', 16],
      [at('6:10'), 'A', 'SEP-12', 12.2],
      [null, null, null, null, null, at('6:40'), 'B', 'SEP-16', 17],
      [at('6:20'), 'A', 'SEP-12', 12.3, null, at('6:50'), null, 'SEP-16', 18],
      [at('6:20'), null, 'SEP-12', 12.3, null, at('6:50'), null, 'SEP-16', 18],
    ]);
    expect(result.readings.map(({ row, lot, channelId, value }) => [row, lot, channelId, value])).toEqual([
      [2, 'A', 11, 12.1],
      [2, 'B', 12, 16],
      [3, 'A', 11, 12.2],
      [4, 'B', 12, 17],
      [5, 'A', 11, 12.3],
    ]);
    expect(problemList(result)).toEqual(['cell_not_used lot-missing G5', 'row_not_used lot-missing B6']);
    expect(result.report).toMatchObject({ rowsRead: 5, rowsNotUsed: 1 });
  });
  it('are named where the right one has no lots', async () => {
    const result = await readRows([
      ['Time', 'Lot', 'Product', 'CW', null, 'Time', 'Dicke'],
      [at('6:00'), 'A', 'SEP-12', 12.1, null, at('6:30'), 16],
    ]);
    expect(read(result)).toEqual([['D', 11, null, 12.1]]);
    expect(problemList(result)).toEqual(['notice side-table-not-used F1']);
  });
});
