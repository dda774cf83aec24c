import { runsOf } from './band';
import { fitWords } from './breaks';

describe('runsOf', () => {
  it('parts a curve at nulls', () => {
    expect(runsOf([null, 1, 2, null, 3, null, null, 4, 5])).toEqual([
      [1, 2],
      [4, 4],
      [7, 8],
    ]);
  });
  it('is empty for nothing', () => {
    expect(runsOf([])).toEqual([]);
    expect(runsOf([null, null])).toEqual([]);
  });
});

describe('fitWords', () => {
  const measure = (text: string) => text.length * 10;
  it('leaves words that fit', () => {
    expect(fitWords('window wiped', 120, measure)).toBe('window wiped');
  });
  it('cuts longer ones with an ellipsis and gives up when little fits', () => {
    expect(fitWords('window wiped', 80, measure)).toBe('window\u2026');
    expect(fitWords('window wiped', 30, measure)).toBe('');
  });
});
