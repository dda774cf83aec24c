import { auditFiltersIn, auditPath, auditSearch, isNarrowed } from './filters';

const inAddress = (query: string) => auditFiltersIn(new URLSearchParams(query));

test('the address holds the filters, and what is malformed is not set', () => {
  expect(inAddress('person=0&kind=hold&thing=5&action=release&from=2026-03-11&text=24117&page=3')).toEqual({
    person: 0,
    kind: 'hold',
    thing: 5,
    action: 'release',
    from: '2026-03-11',
    to: null,
    text: '24117',
    page: 3,
  });
  expect(inAddress('person=-1&thing=5&from=yesterday&page=0')).toMatchObject({
    person: null,
    thing: null,
    from: null,
    page: 1,
  });
});

test('filters go into the address and come back', () => {
  const filters = inAddress('person=7&kind=hold&to=2026-03-11&page=2');
  expect(auditFiltersIn(auditSearch(filters))).toEqual(filters);
  expect(auditSearch(inAddress('')).toString()).toBe('');
});

test('a page alone narrows nothing', () => {
  expect(isNarrowed(inAddress('page=2'))).toBe(false);
  expect(isNarrowed(inAddress('person=0'))).toBe(true);
});

test('days are the plant’s own, the last one whole, over a change of clocks too', () => {
  // Berlin: UTC+1 until 29 March 2026 02:00, then UTC+2.
  const path = auditPath(3, 'Europe/Berlin', inAddress('from=2026-03-29&to=2026-03-29&person=0'));
  expect(path).toBe(
    '/plants/3/audit?person=0&from=2026-03-28T23%3A00%3A00.000Z&to=2026-03-29T22%3A00%3A00.000Z&page=1&pageSize=50',
  );
});

test('the workbook takes every page', () => {
  expect(auditPath(3, 'UTC', inAddress('kind=hold&page=4'), { isExport: true })).toBe(
    '/plants/3/audit/export?kind=hold',
  );
});
