import type { SheetGrid, WorkbookAnswers } from '@app/contracts';
import {
  answerOf,
  choiceOf,
  countChanges,
  layoutWith,
  lettersOf,
  withColumn,
  withHeader,
  withLayout,
} from './corrections';

const grid: SheetGrid = {
  sheet: 'Night',
  fingerprint: 'f',
  isRemembered: false,
  isChanged: false,
  headerRow: 2,
  isHidden: false,
  rows: [
    { row: 2, isHidden: false, cells: { A: 'Time', AA: 'Remark', B: 'Lot', D: 'Mass' } },
    { row: 3, isHidden: false, cells: { A: '06:00', B: '24117', C: 'x', D: '60,1' } },
  ],
  inForce: {
    headerRow: 2,
    columns: { A: { role: 'time' }, B: { role: 'lot' }, D: { role: 'ignored' } },
    decimalSign: ',',
  },
};

describe('corrections of a sheet', () => {
  it('stand before what was recognised, column by column', () => {
    const draft = withColumn({}, 'Night', 'D', { role: 'channel_values', channelId: 7 });
    expect(layoutWith(grid, draft)).toEqual({
      headerRow: 2,
      decimalSign: ',',
      columns: { A: { role: 'time' }, B: { role: 'lot' }, D: { role: 'channel_values', channelId: 7 } },
    });
    expect(layoutWith(grid, {})).toEqual(grid.inForce);
  });

  it('leave other sheets and other answers as they are', () => {
    const draft: WorkbookAnswers = { date: '2026-03-02', sheets: { Day: { headerRow: 1 } } };
    expect(withLayout(draft, 'Night', { dateOrder: 'day-month' })).toEqual({
      date: '2026-03-02',
      sheets: { Day: { headerRow: 1 }, Night: { dateOrder: 'day-month' } },
    });
  });

  it('can be taken back', () => {
    const draft = withLayout({}, 'Night', { dateOrder: 'day-month', isShiftDate: true });
    expect(withLayout(draft, 'Night', { dateOrder: undefined })).toEqual({ sheets: { Night: { isShiftDate: true } } });
  });

  it('of the header let go what was said about the columns of the old one', () => {
    const draft = withColumn({}, 'Night', 'D', { role: 'lot' });
    expect(withHeader(draft, 'Night', 3)).toEqual({ sheets: { Night: { headerRow: 3 } } });
  });

  it('choose a channel by its id and keep the unit while the column holds values', () => {
    expect(answerOf('channel 7', { role: 'value', unit: 'mm' })).toEqual({
      role: 'channel_values',
      channelId: 7,
      unit: 'mm',
    });
    expect(answerOf('lot', { role: 'value', unit: 'mm', isDeviation: true })).toEqual({ role: 'lot' });
    expect(choiceOf({ role: 'channel_values', channelId: 7 })).toBe('channel 7');
    expect(choiceOf({ role: 'value' })).toBe('value');
  });

  it('are counted, a column once', () => {
    const before: WorkbookAnswers = { sheets: { Night: { columns: { B: { role: 'lot' } } } } };
    let after = withColumn(before, 'Night', 'D', { role: 'channel_values', channelId: 7, unit: 'mm' });
    expect(countChanges(before, after)).toBe(1);
    after = withLayout(after, 'Night', { decimalSign: '.' });
    expect(countChanges(before, after)).toBe(2);
    expect(countChanges(before, before)).toBe(0);
  });
});

it('columns stand in the order of their letters, those without cells in these rows too', () => {
  expect(lettersOf(grid)).toEqual(['A', 'B', 'C', 'D', 'AA']);
});
