import { safeNext } from './safe-next';

test('a sign-in leads on to a page of ours', () => {
  expect(safeNext('/holds/4?x=1')).toBe('/holds/4?x=1');
});

test.each([null, '', 'https://elsewhere.example', '//elsewhere.example', '/\\elsewhere.example', '/sign-in?next=/'])(
  'from %p it leads to the desk',
  (next) => {
    expect(safeNext(next)).toBe('/');
  },
);
