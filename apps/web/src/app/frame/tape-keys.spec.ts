import { steppedIndex } from './tape-keys';

test('arrows walk one lot and stop at the ends', () => {
  expect(steppedIndex('ArrowRight', 3, 5)).toBe(4);
  expect(steppedIndex('ArrowRight', 4, 5)).toBe(4);
  expect(steppedIndex('ArrowLeft', 1, 5)).toBe(0);
  expect(steppedIndex('ArrowLeft', 0, 5)).toBe(0);
});

test('Home and End lead to the oldest and the newest lot', () => {
  expect(steppedIndex('Home', 3, 5)).toBe(0);
  expect(steppedIndex('End', 3, 5)).toBe(4);
});

test('other keys, an empty tape and a focus elsewhere lead nowhere', () => {
  expect(steppedIndex('Enter', 3, 5)).toBeNull();
  expect(steppedIndex('End', 0, 0)).toBeNull();
  expect(steppedIndex('ArrowLeft', -1, 5)).toBeNull();
});
