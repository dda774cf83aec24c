import { chooseLine, lineIdInAddress } from './choose-line';

const LINES = [{ id: 4 }, { id: 7 }];

test('the path names the line before the query does', () => {
  expect(lineIdInAddress('/lines/7/intakes', '4')).toBe(7);
  expect(lineIdInAddress('/lots', '4')).toBe(4);
  expect(lineIdInAddress('/lots', null)).toBeNull();
  expect(lineIdInAddress('/lots', 'seven')).toBeNull();
});

test('the first wish that is a line of the plant is chosen', () => {
  expect(chooseLine(LINES, [null, 99, 7, 4])).toBe(7);
});

test('without a wish that can be met it is the first line; without lines, none', () => {
  expect(chooseLine(LINES, [null, 0, 99])).toBe(4);
  expect(chooseLine([], [4])).toBeNull();
});
