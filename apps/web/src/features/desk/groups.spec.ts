import type { DeskItem } from '@app/contracts';
import { countWords, groupsOf } from './groups';

const item = (group: DeskItem['group'], since: string): DeskItem => ({
  group,
  since,
  lineId: 1,
  lineName: 'Coater 2',
  sentence: `${group} ${since}`,
  action: { label: 'Open', path: '/' },
});

test('groups stand in the desk’s order, each with its oldest first, empty ones left out', () => {
  const items = [
    item('set_aside', '2026-12-01T08:00:00Z'),
    item('decide', '2026-12-01T09:00:00Z'),
    item('decide', '2026-12-01T07:00:00Z'),
  ];
  expect(
    groupsOf(items).map(({ group, items: found }) => [group, found.map(({ since }) => since.slice(11, 13))]),
  ).toEqual([
    ['decide', ['07', '09']],
    ['set_aside', ['08']],
  ]);
});

test('what waits is counted in words', () => {
  expect([countWords(0), countWords(1), countWords(5)]).toEqual([
    'Nothing waits for you',
    'One thing waits for you',
    '5 things wait for you',
  ]);
});
