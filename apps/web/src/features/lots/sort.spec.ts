import { sortOf, sortText } from './sort';

test('a minus before the field means the greatest first', () => {
  expect(sortOf('-startsAt')).toEqual({ sortField: 'startsAt', sortOrder: -1 });
  expect(sortOf('number')).toEqual({ sortField: 'number', sortOrder: 1 });
  expect(sortText('startsAt', -1)).toBe('-startsAt');
  expect(sortText('number', 1)).toBe('number');
});
