import type { ChannelSetUpView, SpecificationSetUpView } from '@app/contracts';
import { listed, readinessOf, readinessWords, type SetUpFacts } from './readiness';

const NOW = Date.parse('2026-12-01T12:00:00Z');
const EARLIER = '2026-01-01T00:00:00Z';
const LATER = '2026-12-09T00:00:00Z';
const torque = { id: 7, name: 'Torque', unit: 'N·m', resolution: 0.1 };

const EMPTY: SetUpFacts = {
  plant: {
    id: 2,
    name: 'Overdale',
    timeZone: 'America/Chicago',
    mayChangeTimeZone: true,
    currency: null,
    engineerMayRelease: false,
    reminderManagerHours: 8,
    reminderDirectorHours: 24,
    allowanceNoticeShare: 0.1,
    allowanceCapShare: 0.25,
  },
  calendars: [],
  lines: [],
  products: [],
  characteristics: [],
  specifications: [],
  gauges: [],
  channels: [],
  people: [{ roles: ['administrator'] }],
  now: NOW,
  today: '2026-12-01',
};

const specification: SpecificationSetUpView = {
  product: { id: 3, code: 'CAP-28', name: 'Cap 28 mm' },
  characteristic: torque,
  versions: [
    {
      id: 9,
      version: 1,
      nominal: 2,
      lower: 1.6,
      upper: 2.4,
      appliesToIndividuals: true,
      validFrom: EARLIER,
      until: null,
      proposedBy: 'Ines',
      approvedBy: 'Ada',
      approvedAt: EARLIER,
    },
  ],
  proposal: null,
};

const channel: ChannelSetUpView = {
  id: 11,
  name: 'Torque A',
  line: { id: 5, name: 'Capper 4' },
  characteristic: torque,
  position: 'A',
  gauges: [{ gaugeId: 8, assetNumber: 'TQ-31', since: EARLIER, until: null }],
  hasReadings: false,
  isRetired: false,
};

const READY: SetUpFacts = {
  ...EMPTY,
  calendars: [{ validFrom: '2026-01-01', until: null, shifts: [{ name: 'day', startsAt: '06:00', endsAt: '06:00' }] }],
  lines: [{ id: 5, name: 'Capper 4', channelCount: 1, isRetired: false }],
  products: [{ id: 3, code: 'CAP-28', name: 'Cap 28 mm', valuePerUnit: null, isRetired: false }],
  characteristics: [{ ...torque, mayChangeUnit: false, isRetired: false }],
  specifications: [specification],
  gauges: [{ id: 8, assetNumber: 'TQ-31', kind: 'torque cell', serves: [], isRetired: false }],
  channels: [channel],
  people: [{ roles: ['engineer', 'line_lead'] }, { roles: ['quality_manager'] }],
};

const missing = (change: Partial<SetUpFacts>): string[] =>
  readinessOf({ ...READY, ...change })
    .filter(({ isThere }) => !isThere)
    .map(({ sentence }) => sentence);

test('of a new plant everything but its zone is missing, in the order of setting up', () => {
  const items = readinessOf(EMPTY);
  expect(items.map(({ section, isThere }) => [section, isThere])).toEqual([
    ['plant', true],
    ['lines', false],
    ['lines', false],
    ['products', false],
    ['characteristics', false],
    ['specifications', false],
    ['gauges', false],
    ['channels', false],
    ['people', false],
  ]);
  expect(items[0].sentence).toBe('Times of the plant are those of America/Chicago.');
  expect(items[8].sentence).toBe('No quality engineer, no quality manager, no line lead yet.');
  expect(readinessWords(items, 'Overdale', true)).toBe(
    '8 things are missing before Overdale can take its first workbook.',
  );
});

test('a plant with all of it is ready', () => {
  const items = readinessOf(READY);
  expect(items.every(({ isThere }) => isThere)).toBe(true);
  expect(readinessWords(items, 'Overdale', true)).toBe('Nothing is missing: Overdale is ready for its first workbook.');
  expect(readinessWords(items, 'Overdale', false)).toBe('Nothing is missing: Overdale can take workbooks.');
  expect(items.map(({ sentence }) => sentence)).toContain('1 line: Capper 4.');
});

test('what is retired does not count', () => {
  expect(missing({ lines: [{ ...READY.lines[0], isRetired: true }] })).toEqual([
    'No line yet: a workbook is uploaded to a line.',
  ]);
});

test('a calendar that begins later is not there yet', () => {
  expect(missing({ calendars: [{ ...READY.calendars[0], validFrom: '2026-12-02' }] })).toEqual([
    'The shift calendar begins only on 2026-12-02.',
  ]);
});

test('a specification that is only proposed, or begins later, is missing', () => {
  const { versions } = specification;
  const proposal = {
    ...versions[0],
    reason: 'New.',
    proposedAt: EARLIER,
    mayApprove: false,
    whyNot: null,
    mayWithdraw: false,
  };
  expect(missing({ specifications: [{ ...specification, versions: [], proposal }] })).toEqual([
    'No approved specification for CAP-28. 1 proposed, waiting for a quality manager.',
  ]);
  expect(missing({ specifications: [{ ...specification, versions: [{ ...versions[0], validFrom: LATER }] }] })).toEqual(
    ['No approved specification for CAP-28.'],
  );
});

test('a channel wants a specification in its characteristic, and a gauge that serves it now', () => {
  const other = { ...channel, id: 12, name: 'Fill mass', characteristic: { ...torque, id: 6, name: 'Fill mass' } };
  expect(missing({ channels: [channel, other] })).toEqual(['No product has an approved specification in Fill mass.']);
  const ended = { ...channel.gauges[0], until: '2026-11-30T00:00:00Z' };
  expect(missing({ channels: [{ ...channel, gauges: [ended] }] })).toEqual(['No gauge serves Torque A on Capper 4.']);
  const second = { id: 6, name: 'Capper 5', channelCount: 0, isRetired: false };
  expect(missing({ lines: [...READY.lines, second] })).toEqual(['No channel yet on Capper 5.']);
});

test('who may not know the people reads nothing about them', () => {
  expect(readinessOf({ ...READY, people: null }).map(({ section }) => section)).not.toContain('people');
});

test('long lists are cut with their count', () => {
  expect([listed([]), listed(['A']), listed(['A', 'B', 'C', 'D']), listed(['A', 'B', 'C', 'D', 'E'])]).toEqual([
    '',
    'A',
    'A, B, C and D',
    'A, B, C and 2 more',
  ]);
});
