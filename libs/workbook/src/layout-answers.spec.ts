import type { LayoutAnswers, RememberedLayout, WorkbookAnswers } from './answers';
import { COATER, problemList, read, type Read } from './testing/coater';
import { makeWorkbook, type CellSpec, type SheetSpec } from './testing/make-workbook';

const DAY = 46027;
const at = (clock: string): { date: number } => {
  const [hours, minutes] = clock.split(':').map(Number);
  return { date: DAY + (hours * 60 + minutes) / 1440 };
};
const HEADER: CellSpec[] = ['Begin', 'Run', 'Product', 'Reading', 'Other'];
const ROWS: CellSpec[][] = [HEADER, [at('6:00'), 'A', 'SEP-12', 12.1, 13.1]];
const readSheets = (
  sheets: SheetSpec[],
  answers?: WorkbookAnswers,
  remembered: RememberedLayout[] = [],
): Promise<Read> => read(makeWorkbook({ sheets }), { ...COATER, remembered }, { answers });
const readRows = (rows: CellSpec[][], layout?: LayoutAnswers, remembered: RememberedLayout[] = []): Promise<Read> =>
  readSheets([{ name: 'S', rows }], layout && { sheets: { S: layout } }, remembered);
const values = ({ readings }: Read): unknown[] =>
  readings.map(({ row, column, channelId, value }) => [`${column}${row}`, channelId, value]);

const ANSWER: LayoutAnswers = {
  headerRow: 1,
  columns: {
    A: { role: 'time' },
    B: { role: 'lot' },
    D: { role: 'channel_values', channelId: 11 },
    E: { role: 'channel_values', channelId: 12 },
  },
};
const READ: unknown[] = [
  ['D2', 11, 12.1],
  ['E2', 12, 13.1],
];

describe('what a person says about a sheet', () => {
  it('makes a sheet readable whose columns cannot be told', async () => {
    const before = await readRows(ROWS);
    expect(before.report.isBlocked).toBe(true);
    expect(before.report.questions.map((one) => one.code)).toEqual(['no-header']);
    const after = await readRows(ROWS, ANSWER);
    expect(values(after)).toEqual(READ);
    expect(problemList(after)).toEqual([]);
    expect(after.report.grids[0].inForce).toEqual({
      headerRow: 1,
      columns: { ...ANSWER.columns, C: { role: 'product' } },
    });
  });
  it('offers the rows that may be the header, and leaving the sheet out', async () => {
    const { report } = await readRows([['Weights of the week'], ...ROWS]);
    expect(report.questions[0].choices).toEqual([
      {
        label: 'Row 2 is the header: Begin, Run, Product, Reading',
        answers: { sheets: { S: { headerRow: 2 } } },
      },
      {
        label: 'Row 3 is the header: A, SEP-12',
        answers: { sheets: { S: { headerRow: 3 } } },
      },
      { label: 'Nothing on this sheet is read', answers: { sheets: { S: { headerRow: null } } } },
    ]);
  });
  it('asks for the lot, the time and the channel where the header is the one said', async () => {
    const { report } = await readRows(ROWS, { headerRow: 1 });
    expect(report.questions.map(({ code, choices }) => [code, choices.map((one) => one.label)])).toEqual([
      ['no-channel-column', ['Coat weight', 'Web thickness', 'Oven exit temperature']],
      [
        'no-time-column',
        ['Column A, "Begin"', 'Column B, "Run"', 'Column E, "Other"', 'Nothing on this sheet is read'],
      ],
      ['no-lot-column', ['Column A, "Begin"', 'Column B, "Run"', 'Column E, "Other"', 'Nothing on this sheet is read']],
    ]);
    expect(report.questions[0].choices[1].answers).toEqual({
      sheets: { S: { columns: { D: { role: 'channel_values', channelId: 12 } } } },
    });
  });
  it('reads nothing on a sheet that is left out, and says so', async () => {
    const good: SheetSpec = {
      name: 'Good',
      rows: [
        ['Time', 'Lot', 'Product', 'CW'],
        [at('6:00'), 'A', 'SEP-12', 1],
      ],
    };
    const result = await readSheets([good, { ...good, name: 'S' }], { sheets: { S: { headerRow: null } } });
    expect(values(result)).toEqual([['D2', 11, 1]]);
    expect(problemList(result)).toEqual(['notice sheet-left-out']);
    expect(result.report.grids[1]).toMatchObject({ headerRow: null, inForce: { headerRow: null } });
    expect(result.report.rowsRead).toBe(1);
  });
  it('takes a role that is said from the column that had it, and a unit and position from what is said', async () => {
    const rows: CellSpec[][] = [
      ['Time', 'Lot', 'Product', 'Left', 'Right', 'Order'],
      [at('6:00'), 'wrong', 'SEP-12', 12.1, 13.1, 'A'],
    ];
    const result = await readRows(rows, {
      columns: {
        F: { role: 'lot' },
        D: { role: 'channel_values', channelId: 11, unit: 'g/m²' },
        E: { role: 'channel_values', channelId: 11, unit: 'g/m²' },
      },
    });
    expect(result.readings.map(({ lot, channelId, position }) => [lot, channelId, position])).toEqual([
      ['A', 11, 'Left'],
      ['A', 11, 'Right'],
    ]);
    expect(result.report.columns[1]).toMatchObject({ column: 'B', role: 'ignored' });
  });
  it('finds a header that is said far down, with its titles', async () => {
    const filler = Array.from({ length: 60 }, (): CellSpec[] => ['line', 'of text']);
    const rows = [...filler, ['Lot: 24117'], ['Time', 'Product', 'CW'], [at('6:00'), 'SEP-12', 12.1]];
    const result = await readRows(rows, { headerRow: 62 });
    expect(result.readings).toMatchObject([{ row: 63, lot: '24117', value: 12.1 }]);
  });
  it.each<[string, LayoutAnswers, RegExp]>([
    ['a row that is empty', { headerRow: 30 }, /its header in row 30, which is empty/],
    ['an empty column', { columns: { Q: { role: 'lot' } } }, /its lot in column Q, which is empty/],
    ['a channel of another line', { columns: { D: { role: 'channel_values', channelId: 99 } } }, /this line does not/],
    ['a channel left open', { columns: { D: { role: 'channel_values' } } }, /this line does not have/],
    ['two lots', { columns: { A: { role: 'lot' }, B: { role: 'lot' } } }, /its lot in two columns \(columns A and B\)/],
  ])('stops at %s', async (_, layout, sentence) => {
    const rows: CellSpec[][] = [
      ['Time', 'Lot', 'Product', 'CW'],
      [at('6:00'), 'A', 'SEP-12', 12.1],
    ];
    const { report } = await readRows(rows, layout);
    expect(report.isBlocked).toBe(true);
    const misfit = report.problems.find(({ code }) => code === 'answers-do-not-fit');
    expect(misfit).toMatchObject({ severity: 'blocking', detail: expect.stringMatching(sentence) as string });
  });
});

describe('what is remembered of a layout', () => {
  const fingerprintOf = async (rows: CellSpec[][]): Promise<string> =>
    (await readRows(rows, { headerRow: 1 })).report.grids[0].fingerprint!;
  const remember = async (answers: LayoutAnswers, rows = ROWS): Promise<RememberedLayout> => ({
    fingerprint: await fingerprintOf(rows),
    sheetName: 'S',
    answers,
  });

  it('is in force for the same header, wherever it stands', async () => {
    const remembered = [await remember(ANSWER)];
    const again = await readRows([['BEGIN', 'run', ' Product', 'Reading', 'Other'], ROWS[1]], undefined, remembered);
    expect(values(again)).toEqual(READ);
    expect(again.report.grids[0]).toMatchObject({ isRemembered: true, isChanged: false });
    const lower = await readRows([['A title'], ['More'], ...ROWS], undefined, remembered);
    expect(values(lower)).toEqual([
      ['D4', 11, 12.1],
      ['E4', 12, 13.1],
    ]);
    expect(lower.report.grids[0].inForce.headerRow).toBe(3);
  });
  it('does not give the channel of one gauge to the sheet of another with the same header', async () => {
    const rows: CellSpec[][] = [
      ['Time', 'Lot', 'Product', 'Value'],
      [at('6:00'), 'A', 'SEP-12', 16],
    ];
    const remembered = [await remember({ columns: { D: { role: 'channel_values', channelId: 11 } } }, rows)];
    const sheets = ['Sheet1', 'LS-305', 'BG-201'].map((name) => ({ name, rows }));
    const result = await readSheets(sheets, undefined, remembered);
    expect(values(result)).toEqual([
      ['D2', 11, 16],
      ['D2', 12, 16],
      ['D2', 11, 16],
    ]);
    expect(problemList(result)).toEqual(['notice remembered-channel-not-used 1']);
    expect(result.report.problems[0].sheet).toBe('LS-305');
  });
  it('gives way to what is said, column by column', async () => {
    const remembered = [await remember(ANSWER)];
    const result = await readRows(ROWS, { columns: { E: { role: 'ignored' } } }, remembered);
    expect(values(result)).toEqual([['D2', 11, 12.1]]);
  });
  it('leaves a sheet out again of which nothing was to be read', async () => {
    const rows: CellSpec[][] = [
      ['Time', 'Lot', 'Product', 'CW'],
      [at('6:00'), 'A', 'SEP-12', 12.1],
    ];
    const result = await readRows(rows, undefined, [await remember({ headerRow: null }, rows)]);
    expect(problemList(result)).toContain('notice sheet-left-out');
    expect(result.readings).toEqual([]);
  });
  it('points out a changed layout under a known name, and asks how to read it', async () => {
    const rows: CellSpec[][] = [
      ['Time', 'Lot', 'Product', 'Web thickness', 'CW'],
      [at('6:00'), 'A', 'SEP-12', 16, 12.1],
    ];
    const remembered = [await remember(ANSWER)];
    const result = await readRows(rows, undefined, remembered);
    expect(problemList(result)).toEqual(['blocking layout-changed 1']);
    expect(result.report.grids[0]).toMatchObject({ isRemembered: false, isChanged: true });
    const [now, before] = result.report.questions[0].choices;
    expect(now.answers).toEqual({ sheets: { S: result.report.grids[0].inForce } });
    const asNow = await readSheets([{ name: 'S', rows }], now.answers, remembered);
    expect([asNow.report.isBlocked, values(asNow)]).toEqual([
      false,
      [
        ['D2', 12, 16],
        ['E2', 11, 12.1],
      ],
    ]);
    const asBefore = await readSheets([{ name: 'S', rows }], before.answers, remembered);
    expect(values(asBefore)).toEqual([
      ['D2', 11, 16],
      ['E2', 12, 12.1],
    ]);
  });
  it('does not offer the old columns where they are not there', async () => {
    const rows: CellSpec[][] = [
      ['Time', 'Lot', 'Product', 'CW'],
      [at('6:00'), 'A', 'SEP-12', 12.1],
    ];
    const { report } = await readRows(rows, undefined, [await remember(ANSWER)]);
    expect(report.questions[0].choices.map((one) => one.label)).toEqual(['As recognised now']);
  });
});

describe('the grid of a sheet', () => {
  it('shows its first forty filled rows as Excel would', async () => {
    const body = Array.from({ length: 50 }, (): CellSpec[] => [at('6:10'), 'A', 'SEP-12', 12.1]);
    const rows: CellSpec[][] = [
      ['Coater 2', { day: DAY }, { clock: 0.25 }, { percent: 0.057 }, { error: '#N/A' }, { formula: 'A1' }],
      [],
      ['Time', 'Lot', 'Product', 'CW'],
      ...body,
    ];
    const { report } = await readSheets([{ name: 'S', rows, hiddenRows: [5], state: 'hidden' }]);
    const [grid] = report.grids;
    expect(grid.rows).toHaveLength(40);
    expect(grid.rows[0]).toEqual({
      row: 1,
      isHidden: false,
      cells: {
        A: 'Coater 2',
        B: '2026-01-05',
        C: '06:00:00',
        D: '5.7 %',
        E: '#N/A',
        F: '(formula without a result)',
      },
    });
    expect(grid.rows[3]).toEqual({
      row: 5,
      isHidden: true,
      cells: { A: '2026-01-05 06:10', B: 'A', C: 'SEP-12', D: '12.1' },
    });
    expect(grid).toMatchObject({ sheet: 'S', headerRow: 3, isHidden: true, isRemembered: false, isChanged: false });
  });
});
