import { thingPage } from './thing-page';

const page = (kind: string, may = true) =>
  thingPage({ kind, id: 5, name: null }, 3, (permission) => may || permission === 'read');

test('a thing leads to its own page, or to where the plant’s set-up shows it', () => {
  expect(['hold', 'intake', 'channel', 'plan'].map((kind) => page(kind))).toEqual([
    '/holds/5',
    '/intakes/5',
    '/channels/5',
    '/plans/5',
  ]);
  expect(page('gauge')).toBe('/plants/3/set-up/gauges');
  expect(page('plant')).toBe('/plants/3/set-up');
});

test('a thing without a page, or with one that the reader may not open, leads nowhere', () => {
  expect(page('something else')).toBeNull();
  expect(page('person')).toBe('/plants/3/people');
  expect(page('person', false)).toBeNull();
  expect(page('mail', false)).toBeNull();
});
