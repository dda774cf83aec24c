import { heldWords, sameForLine } from './other-line';

const at = (pathname: string, search = '') => ({ pathname, search });

test('another line opens on the page of the same kind', () => {
  expect(sameForLine(at('/lines/1/channels'), 2)).toBe('/lines/2/channels');
  expect(sameForLine(at('/lines/1/intakes'), 2)).toBe('/lines/2/intakes');
  expect(sameForLine(at('/channels/9/plans'), 2)).toBe('/lines/2/channels');
  expect(sameForLine(at('/intakes/9'), 2)).toBe('/lines/2/intakes');
  expect(sameForLine(at('/lots/9'), 2)).toBe('/lots?line=2');
});

test('the lots keep their filters but not their page', () => {
  expect(sameForLine(at('/lots', '?line=1&held=open&page=3'), 2)).toBe('/lots?line=2&held=open');
});

test('from anywhere else it leads to the desk', () => {
  expect(sameForLine(at('/'), 2)).toBe('/?line=2');
  expect(sameForLine(at('/holds/4'), 2)).toBe('/?line=2');
});

test('held lots are counted in words', () => {
  expect([heldWords(0), heldWords(1), heldWords(12)]).toEqual(['none held', '1 held', '12 held']);
});
