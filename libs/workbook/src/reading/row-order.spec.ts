import { RowOrder } from './row-order';

const MINUTE = 60_000;
const START = Date.parse('2025-10-26T00:00:00Z'); // 02:00 for the first time in Berlin

/** Feeds minutes after the first 02:00 as a wall clock shows them and returns minutes after it again. */
function follow(minutes: number[]): (number | null)[] {
  const order = new RowOrder();
  return minutes.map((minute) => {
    const isRepeated = minute >= 0 && minute < 120;
    if (!isRepeated) {
      order.note(START + minute * MINUTE);
      return minute;
    }
    const early = START + (minute % 60) * MINUTE;
    const choice = order.choose(early, early + 60 * MINUTE);
    return choice === null ? null : (choice - START) / MINUTE;
  });
}
const every = (step: number, from: number, to: number): number[] =>
  Array.from({ length: Math.floor((to - from) / step) + 1 }, (_, index) => from + index * step);

describe('RowOrder', () => {
  it.each([1, 7, 15, 20, 30])('follows rows every %i minutes forward through both passes', (step) => {
    const rows = every(step, -5 * step, 150);
    expect(follow(rows)).toEqual(rows);
  });
  it.each([1, 7, 15, 20, 30])('follows rows every %i minutes backward through both passes', (step) => {
    const rows = every(step, -60, 120 + 5 * step).reverse();
    expect(follow(rows)).toEqual(rows);
  });
  it('does not take rows a little out of order for the second pass', () => {
    const rows = [-20, -10, 5, 12, 10, 30, 28, 55, 62, 61, 70, 119, 118, 125];
    expect(follow(rows)).toEqual(rows);
  });
  it('keeps equal stamps together', () => {
    const rows = [-10, -10, 20, 20, 50, 50, 80, 80];
    expect(follow(rows)).toEqual(rows);
  });
  it('cannot tell when no row stands before', () => {
    expect(follow([30])).toEqual([null]);
  });
  it('cannot tell when the row before is out of reach', () => {
    expect(follow([-60, -30, 400, 30])).toEqual([-60, -30, 400, null]);
  });
});
