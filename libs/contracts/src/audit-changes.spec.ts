import { changesOf, nameInWords } from './audit-changes';

const asIs = (iso: string) => `at ${iso}`;

test('names the fields that changed, in words, and leaves out what stayed', () => {
  const before = { state: 'in_force', evidenceVersion: 1, note: null };
  const after = { state: 'retired', evidenceVersion: 1, note: 'Roll 3.' };
  expect(changesOf(before, after, asIs)).toEqual([
    { field: 'state', before: 'in force', after: 'retired' },
    { field: 'note', before: null, after: 'Roll 3.' },
  ]);
});

test('tells what is new and what is gone', () => {
  expect(changesOf(null, { isRobust: true }, asIs)).toEqual([{ field: 'robust', before: null, after: 'yes' }]);
  expect(changesOf({ place: 'bay 7' }, null, asIs)).toEqual([{ field: 'place', before: 'bay 7', after: null }]);
  expect(changesOf(undefined, undefined, asIs)).toEqual([]);
});

test('names fields of fields, numbers with a real minus sign, and instants as people read them', () => {
  expect(
    changesOf({ limits: { lower: -1.5 } }, { limits: { lower: -2e-7 }, validFrom: '2026-03-11T06:00:00Z' }, asIs),
  ).toEqual([
    { field: 'limits: lower', before: '−1.5', after: '−2e−7' },
    { field: 'valid from', before: null, after: 'at 2026-03-11T06:00:00Z' },
  ]);
});

test('tells lists by their sentences, their names, their values, or item by item', () => {
  const after = {
    causes: [
      { channelId: 3, sentence: 'lies low' },
      { channelId: 4, sentence: 'lies high' },
    ],
    lines: [{ id: 1, name: 'Coater 2' }],
    roles: ['quality_manager', 'engineer'],
    shifts: [{ name: 'early', startsAt: '06:00', endsAt: '14:00' }],
    gone: [],
  };
  expect(changesOf(null, after, asIs)).toEqual([
    { field: 'causes', before: null, after: 'lies low; lies high' },
    { field: 'lines', before: null, after: 'Coater 2' },
    { field: 'roles', before: null, after: 'quality manager; engineer' },
    { field: 'shifts: 1: name', before: null, after: 'early' },
    { field: 'shifts: 1: starts at', before: null, after: '06:00' },
    { field: 'shifts: 1: ends at', before: null, after: '14:00' },
  ]);
});

test('puts names of code into words', () => {
  expect(['hasNotice', 'valid_from', 'set-aside', 'is', 'isolation', 'allowanceCapShare'].map(nameInWords)).toEqual([
    'notice',
    'valid from',
    'set aside',
    'is',
    'isolation',
    'allowance cap share',
  ]);
});
