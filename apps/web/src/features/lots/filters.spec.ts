import { dayAfter, filtersIn, isNarrowed, lotsPath, UNNARROWED } from './filters';

const PLANT = { id: 3, timeZone: 'Europe/Berlin' };
const read = (search: string) => filtersIn(new URLSearchParams(search));

test('an address without filters lists the newest lots first', () => {
  const filters = read('');
  expect(filters.sort).toBe('-startsAt');
  expect(filters.page).toBe(1);
  expect(isNarrowed(filters)).toBe(false);
});

test('what is malformed in an address is not set', () => {
  const filters = read('line=x&state=purple&held=maybe&from=1.12.2026&page=-2');
  expect(filters).toMatchObject({ line: null, state: null, held: null, from: null, page: 1 });
});

test('days are the plant’s own, and the last one is taken in whole', () => {
  const path = lotsPath(read('line=2&from=2026-12-01&to=2026-12-01&text= 241 '), PLANT);
  const query = new URLSearchParams(path.split('?')[1]);
  expect(query.get('from')).toBe('2026-11-30T23:00:00.000Z');
  expect(query.get('to')).toBe('2026-12-01T23:00:00.000Z');
  expect(query.get('text')).toBe('241');
  expect(query.get('lineId')).toBe('2');
});

test('what from and to speak of, and why a lot has no score, go to the API as they stand in the address', () => {
  const filters = read('by=decided&disposition=scrap&notScoredOn=7&notScoredFor=learning&state=scored');
  const query = new URLSearchParams(lotsPath(filters, PLANT).split('?')[1]);
  const asked = ['by', 'disposition', 'notScoredOn', 'notScoredFor', 'state'].map((name) => query.get(name));
  expect(asked).toEqual(['decided', 'scrap', '7', 'learning', 'scored']);
  const malformed = read('by=yesterday&disposition=lost&notScoredOn=x&notScoredFor=<b>');
  expect(malformed).toMatchObject({ by: null, disposition: null, notScoredOn: null, notScoredFor: null });
  expect([isNarrowed(filters), isNarrowed(malformed)]).toEqual([true, false]);
  expect(isNarrowed({ ...filters, ...UNNARROWED })).toBe(false);
});

test('an export asks for all pages', () => {
  const query = new URLSearchParams(lotsPath(read('page=3'), PLANT, 'xlsx').split('?')[1]);
  expect(query.get('format')).toBe('xlsx');
  expect(query.get('page')).toBeNull();
});

test('the day after a month’s last is the next month’s first', () => {
  expect(dayAfter('2028-02-28')).toBe('2028-02-29');
  expect(dayAfter('2026-12-31')).toBe('2027-01-01');
});
