import { calendarOn, coverageWords, gapsOf, lengthOf, lengthWords } from './shift-words';

const span = (startsAt: string, endsAt: string) => ({ name: 'early', startsAt, endsAt });

test('a span that ends at or before its start runs over midnight', () => {
  expect([
    lengthOf(span('06:00', '14:00')),
    lengthOf(span('22:00', '06:00')),
    lengthOf(span('06:00', '06:00')),
  ]).toEqual([480, 480, 1440]);
});

test('lengths read in hours and minutes', () => {
  expect([lengthWords(480), lengthWords(495), lengthWords(30)]).toEqual([
    '8\u202fh',
    '8\u202fh 15\u202fmin',
    '30\u202fmin',
  ]);
});

test('what no shift covers is told, across midnight too', () => {
  expect(gapsOf([span('06:00', '14:00'), span('14:00', '22:00'), span('22:00', '06:00')])).toEqual([]);
  expect(gapsOf([span('14:00', '22:00'), span('06:00', '13:30')])).toEqual(['13:30 to 14:00', '22:00 to 06:00']);
  expect(gapsOf([span('08:00', '08:00')])).toEqual([]);
  expect(gapsOf([span('22:00', '04:00'), span('04:00', '12:00')])).toEqual(['12:00 to 22:00']);
});

test('coverage is said in a sentence', () => {
  expect(coverageWords([])).toBe('No shift is stated.');
  expect(coverageWords([span('06:00', '06:00')])).toBe('The shifts cover the whole day.');
  expect(coverageWords([span('06:00', '22:00')])).toBe(
    'No shift covers 22:00 to 06:00: readings from then belong to no shift.',
  );
});

test('a calendar’s end is the first day of the next one', () => {
  const calendars = [
    { validFrom: '2026-06-01', until: null, shifts: [] },
    { validFrom: '2026-01-01', until: '2026-06-01', shifts: [] },
  ];
  expect(calendarOn(calendars, '2026-05-31')?.validFrom).toBe('2026-01-01');
  expect(calendarOn(calendars, '2026-06-01')?.validFrom).toBe('2026-06-01');
  expect(calendarOn(calendars, '2025-12-31')).toBeUndefined();
});
