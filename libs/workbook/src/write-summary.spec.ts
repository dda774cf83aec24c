import { Workbook } from 'exceljs';
import { gauge, lotsOf500, figures, madeSummary, openHold } from '../../contracts/src/testing/made-summary';
import { writeSummary } from './write-summary';

const content = madeSummary({
  headline: '=cmd()',
  total: { week: figures({ stillOpen: lotsOf500(1) }), lastWeek: null },
  openHolds: { count: 1, holds: [openHold({ lot: { id: 1, number: '00117' }, openedAt: '2026-03-29T01:30:00.000Z' })] },
  gauges: [gauge()],
});

describe('the workbook of a week', () => {
  let book: Workbook;
  beforeAll(async () => {
    book = new Workbook();
    await book.xlsx.load((await writeSummary(content)) as never);
  });
  const sheet = (name: string) => {
    const found = book.getWorksheet(name);
    if (!found) throw new Error(`no sheet ${name}`);
    return found;
  };
  const cells = (name: string, row: number) => (sheet(name).getRow(row).values as unknown[]).slice(1);

  it('has a sheet for each list, each with a frozen header and a filter', () => {
    expect(book.worksheets.map(({ name }) => name)).toEqual([
      'Week',
      'Lots by line',
      'Quantities',
      'Open holds',
      'Slow movement removed',
      'Slow movement',
      'Without a score',
      'Workbooks',
    ]);
    for (const { views, autoFilter } of book.worksheets) {
      expect(views).toEqual([expect.objectContaining({ state: 'frozen', ySplit: 1 })]);
      expect(autoFilter).toBeTruthy();
    }
  });

  it('keeps types: lot numbers are text, quantities numbers, instants the plant’s wall clock across a change of it', () => {
    expect(cells('Open holds', 1)).toEqual(expect.arrayContaining(['Value [EUR]', 'Age at the week’s end [h]']));
    expect(cells('Open holds', 2).slice(0, 8)).toEqual([
      '00117',
      'Coater 2',
      'SEP-16',
      500,
      'm',
      900,
      new Date('2026-03-29T02:30:00Z'),
      52,
    ]);
    expect(cells('Slow movement', 2)).toEqual(['Coat weight', 'Coater 2', 'BG-204', 0.246, 0.6, 'g/m²', 0.41, 0.38]);
    expect(sheet('Slow movement').getRow(2).getCell(7).numFmt).toBe('0%');
  });

  it('makes no formula of what it tells', () => {
    expect(cells('Week', 4)).toEqual(['First to know', "'=cmd()"]);
  });

  it('has the plant’s total last, and no week before where there is none', () => {
    const rows = sheet('Lots by line').getSheetValues().slice(2) as unknown[][];
    expect(rows.map(([, line, week]) => [line, week])).toEqual([
      ['Coater 2', 'this week'],
      ['Coater 2', 'week before'],
      ['All lines', 'this week'],
    ]);
  });
});
