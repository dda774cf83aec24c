import { fieldPathOf, placeErrors } from './problem-fields';

test('a JSON pointer becomes the form’s path', () => {
  expect(fieldPathOf('/reason')).toBe('reason');
  expect(fieldPathOf('/parts/0/quantity')).toBe('parts.0.quantity');
  expect(fieldPathOf('/a~1b/c~0d')).toBe('a/b.c~d');
});

test('errors of fields that the form lacks are kept for the form', () => {
  const known = { pointer: '/reason', code: 'required', detail: 'Say why.' };
  const unknown = { pointer: '/evidenceVersion', code: 'stale', detail: 'The evidence changed.' };
  expect(placeErrors([known, unknown], ['reason'])).toEqual({
    placed: [{ name: 'reason', detail: 'Say why.' }],
    rest: [unknown],
  });
});
