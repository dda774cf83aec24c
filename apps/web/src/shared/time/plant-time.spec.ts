import { formatInstant, plantDay, plantInstant } from './plant-time';

test('an instant is shown in the plant’s zone, in 24 hours', () => {
  expect(formatInstant('2026-07-01T22:30:00Z', 'Europe/Berlin')).toBe('Thu 2 Jul 2026, 00:30');
  expect(formatInstant('2026-07-01T22:30:00Z', 'America/New_York', 'short')).toBe('1 Jul 18:30');
  expect(formatInstant(Date.UTC(2026, 11, 1, 14, 5), 'UTC', 'time')).toBe('14:05');
  expect(formatInstant('2026-12-01T14:05:09Z', 'UTC', 'seconds')).toBe('1 Dec 14:05:09');
  expect(formatInstant('2026-12-01T14:05:09Z', 'UTC', 'exact')).toBe('1 Dec 2026 14:05:09');
  expect(formatInstant('2026-12-01T14:05:09Z', 'UTC', 'day')).toBe('Tue 1 Dec');
  expect(formatInstant('2026-12-31T23:30:00Z', 'Europe/Berlin', 'date')).toBe('1 Jan 2027');
});

test('what is no instant is a dash and not a date', () => {
  expect(formatInstant('yesterday', 'UTC')).toBe('–');
});

test('a local time becomes its instant on both sides of a change of clocks', () => {
  // Berlin: UTC+1 until 29 March 2026 02:00, then UTC+2.
  expect(plantInstant('2026-03-28', '12:00', 'Europe/Berlin')).toBe('2026-03-28T11:00:00.000Z');
  expect(plantInstant('2026-03-29', '12:00', 'Europe/Berlin')).toBe('2026-03-29T10:00:00.000Z');
  expect(plantInstant('2026-03-29', '00:00', 'Europe/Berlin')).toBe('2026-03-28T23:00:00.000Z');
  expect(plantInstant('2026-10-25', '12:00', 'Europe/Berlin')).toBe('2026-10-25T11:00:00.000Z');
});

test('the plant’s day is not the universal day', () => {
  expect(plantDay('2026-06-30T22:30:00Z', 'Europe/Berlin')).toBe('2026-07-01');
  expect(plantDay('2026-07-01T02:00:00Z', 'America/New_York')).toBe('2026-06-30');
});
