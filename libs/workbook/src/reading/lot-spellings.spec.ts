import type { WorkbookAnswers } from '../answers';
import { COATER, read, type Read } from '../testing/coater';
import { makeWorkbook, type CellSpec } from '../testing/make-workbook';
import { foldLot } from './lot-spellings';

const STAMP = { date: 46027.25 };
const readLots = (numbers: CellSpec[], lots: string[] = [], answers?: WorkbookAnswers): Promise<Read> => {
  const rows = numbers.map((lot): CellSpec[] => [STAMP, lot, 'SEP-12', 12.1]);
  const bytes = makeWorkbook({ sheets: [{ name: 'S', rows: [['Time', 'Lot', 'Product', 'CW'], ...rows] }] });
  return read(bytes, { ...COATER, lots }, { answers });
};
const asked = ({ report }: Read): unknown[] =>
  report.questions.map(({ code, rows, choices }) => [code, rows, choices.map((one) => one.answers.lots)]);

describe('foldLot', () => {
  it.each([
    ['L-0123', 'L123'],
    ['l 0123', 'L-123'],
    ['00024117', '24117'],
    ['A–7', 'a-07'],
  ])('finds %p and %p alike', (one, other) => {
    expect(foldLot(one)).toBe(foldLot(other));
  });
  it.each([
    ['L-0123', 'L-1230'],
    ['24117', '24118'],
    ['A1', 'B1'],
    ['100', '1'],
  ])('tells %p and %p apart', (one, other) => {
    expect(foldLot(one)).not.toBe(foldLot(other));
  });
});

describe('spellings of lot numbers', () => {
  it('are asked about against the lots of the line, and never merged by themselves', async () => {
    const result = await readLots(['L-0123', 'L-0123', 'L0124'], ['L0123', 'L0124']);
    expect(asked(result)).toEqual([['lot-spelling', 2, [{ 'L-0123': 'L0123' }, { 'L-0123': 'L-0123' }]]]);
    expect(result.report.questions[0].detail).toBe(
      'Sheet "S", row 2 and 1 more name the lot "L-0123", which is spelled almost like lot L0123 of this line: is it the same?',
    );
    expect(result.report.lots.map((lot) => lot.number)).toEqual(['L-0123', 'L0124']);
    expect(result.report.isBlocked).toBe(true);
  });
  it('are asked about among themselves, for the one that is used less', async () => {
    expect(asked(await readLots(['l 0123', 'L123', 'L123']))).toEqual([
      ['lot-spelling', 1, [{ 'l 0123': 'L123' }, { 'l 0123': 'l 0123' }]],
    ]);
  });
  it('are read as agreed, either way', async () => {
    const same = await readLots(['l 0123', 'L123'], [], { lots: { 'l 0123': 'L123' } });
    expect(same.readings.map((reading) => reading.lot)).toEqual(['L123', 'L123']);
    expect([same.report.isBlocked, same.report.lots.length]).toEqual([false, 1]);
    const different = await readLots(['l 0123', 'L123', 'L123'], [], { lots: { 'l 0123': 'l 0123' } });
    expect([different.report.isBlocked, different.report.lots.length]).toEqual([false, 2]);
  });
  it('are no question where both are lots of the line', async () => {
    expect(asked(await readLots(['L-0123', 'L0123'], ['L0123', 'L-0123']))).toEqual([]);
  });
  it('are asked about together where there are many', async () => {
    const numbers = Array.from({ length: 40 }, (_, index) => `L-${index + 100}`);
    const result = await readLots(
      numbers,
      numbers.map((one) => one.replace('-', '')),
    );
    expect(result.report.questions).toHaveLength(1);
    expect(result.report.questions[0]).toMatchObject({ code: 'lot-spelling', rows: 40 });
    const { answers } = result.report.questions[0].choices[0];
    const again = await readLots(
      numbers,
      numbers.map((one) => one.replace('-', '')),
      answers,
    );
    expect(again.report.isBlocked).toBe(false);
    expect(again.readings[0].lot).toBe('L100');
  });
});
