import { urls, withQuery } from './urls';

test('a query leaves out what is not set, and escapes the rest', () => {
  expect(withQuery('/lots', { line: 2, held: null, text: 'a&b', state: '', from: undefined })).toBe(
    '/lots?line=2&text=a%26b',
  );
  expect(withQuery('/lots', {})).toBe('/lots');
});

test('a sign-in remembers where it came from, except the desk', () => {
  expect(urls.signIn('/holds/4?x=1')).toBe('/sign-in?next=%2Fholds%2F4%3Fx%3D1');
  expect(urls.signIn('/')).toBe('/sign-in');
});

test('each thing has one address', () => {
  expect([urls.desk(), urls.lot(3), urls.hold(4), urls.intakes(1), urls.intake(7), urls.channels(1)]).toEqual([
    '/',
    '/lots/3',
    '/holds/4',
    '/lines/1/intakes',
    '/intakes/7',
    '/lines/1/channels',
  ]);
  expect(urls.channel(5, { from: 10, to: 20 })).toBe('/channels/5?from=10&to=20');
  expect(urls.plans(5)).toBe('/channels/5/plans');
  expect([urls.newPlant(), urls.setUp(2), urls.setUp(2, 'gauges')]).toEqual([
    '/plants/new',
    '/plants/2/set-up',
    '/plants/2/set-up/gauges',
  ]);
});
