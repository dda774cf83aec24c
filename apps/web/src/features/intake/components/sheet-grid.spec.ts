import type { IntakeColumn, IntakeReadingPreview } from '@app/contracts';
import { sheetGrids } from './sheet-grid';

const column = (letter: string, role: string, channel: string | null = null): IntakeColumn => ({
  sheet: 'Shift',
  column: letter,
  header: letter,
  unit: null,
  role,
  channel: channel === null ? null : { id: 1, name: channel },
});
const reading = (row: number, channelName: string, value: number | null): IntakeReadingPreview => ({
  sheet: 'Shift',
  row,
  at: '2026-12-01T05:00:00Z',
  lot: '24118',
  product: null,
  quantity: 2080,
  serial: null,
  position: 'left',
  channelName,
  unit: 'µm',
  value,
  censoring: value === null ? 'below' : null,
});
const format = { time: (at: string, form: string) => `${form} ${at.slice(11, 16)}` };

describe('sheetGrids', () => {
  it('lays a reading a row on the long layout', () => {
    const columns = ['time', 'lot', 'quantity', 'position', 'channel', 'value'].map((role, index) =>
      column('ABCDEF'[index], role),
    );
    const [grid] = sheetGrids(columns, [reading(2, 'Thickness', 25.1 + 0.1), reading(3, 'Thickness', null)], format);
    expect(grid.rows).toEqual([
      { row: 2, cells: ['seconds 05:00', '24118', '2080', 'left', 'Thickness', '25.2'] },
      { row: 3, cells: ['seconds 05:00', '24118', '2080', 'left', 'Thickness', 'off scale, low'] },
    ]);
  });

  it('gathers the channels of a row on the wide layout', () => {
    const columns = [
      column('A', 'date'),
      column('B', 'time_of_day'),
      column('C', 'channel_values', 'pH'),
      column('D', 'channel_values', 'Density'),
      column('E', 'remark'),
    ];
    const [grid] = sheetGrids(columns, [reading(4, 'Density', -1290), reading(4, 'pH', 8.4)], format);
    expect(grid.rows).toEqual([{ row: 4, cells: ['day 05:00', 'time 05:00', '8.4', '\u22121290', ''] }]);
  });

  it('keeps the sheets apart and the columns in their order', () => {
    const columns = [column('AA', 'lot'), column('B', 'lot'), { ...column('A', 'lot'), sheet: 'Other' }];
    const grids = sheetGrids(columns, [], format);
    expect(grids.map((grid) => grid.sheet)).toEqual(['Shift', 'Other']);
    expect(grids[0].columns.map((item) => item.column)).toEqual(['B', 'AA']);
    expect(grids[0].rows).toEqual([]);
  });
});
