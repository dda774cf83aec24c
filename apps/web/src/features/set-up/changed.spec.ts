import { changedFields } from './changed';

test('only what differs is sent, a value that was taken away as null', () => {
  const before = { code: 'CAP-28', name: 'Cap 28 mm', valuePerUnit: 0.02 as number | null };
  expect(changedFields(before, { ...before, name: 'Cap 28 mm, blue', valuePerUnit: null })).toEqual({
    name: 'Cap 28 mm, blue',
    valuePerUnit: null,
  });
});

test('where nothing differs there is nothing to send', () => {
  expect(changedFields({ name: 'A' }, { name: 'A' })).toBeNull();
});
