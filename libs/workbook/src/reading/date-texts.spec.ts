import fc from 'fast-check';
import { parseStampText, type DateHabits } from './date-texts';

const local = (iso: string) => ({ kind: 'local', ms: Date.parse(`${iso}Z`) });
const after = (shown: string[], written: string, habits: DateHabits = {}) => {
  for (const text of shown) parseStampText(text, habits);
  return parseStampText(written, habits);
};

describe('parseStampText', () => {
  it.each([
    ['2026-01-05T06:10:30', '2026-01-05T06:10:30'],
    ['2026-01-05 06:10', '2026-01-05T06:10:00'],
    ['2026-1-5 6:10', '2026-01-05T06:10:00'],
    ['2026-01-05', '2026-01-05T00:00:00'],
    ['2026-01-05T06:10:30,25', '2026-01-05T06:10:30.250'],
    ['2026/01/05 06:10', '2026-01-05T06:10:00'],
    ['20260105 061030', '2026-01-05T06:10:30'],
    ['05.01.2026 06:10', '2026-01-05T06:10:00'],
    ['5.1.2026, 6:10 Uhr', '2026-01-05T06:10:00'],
    ['5.1.2026 6.10 Uhr', '2026-01-05T06:10:00'],
    ['05.01.26 06:10', '2026-01-05T06:10:00'],
    ['27.02.26', '2026-02-27T00:00:00'],
    ['13/01/2026 06:10', '2026-01-13T06:10:00'],
    ['1/13/2026 6:05:00 PM', '2026-01-13T18:05:00'],
    ['13-01-26', '2026-01-13T00:00:00'],
    ['03/03/2026', '2026-03-03T00:00:00'],
    ['4. März 2026 14:05', '2026-03-04T14:05:00'],
    ['4 Mär. 2026', '2026-03-04T00:00:00'],
    ['04-Mrz-26', '2026-03-04T00:00:00'],
    ['Mi, 4. Maerz 2026', '2026-03-04T00:00:00'],
    ['4-MAR-2026 06:10:15', '2026-03-04T06:10:15'],
    ['4 March 2026', '2026-03-04T00:00:00'],
    ['Mar 4, 2026 6:10 am', '2026-03-04T06:10:00'],
    ['Wed 4th Mar 2026', '2026-03-04T00:00:00'],
    ['March 4 2026 12:00 a.m.', '2026-03-04T00:00:00'],
    ['1. Okt 2025', '2025-10-01T00:00:00'],
    ['24. Dezember 2025', '2025-12-24T00:00:00'],
    ['1 Jän 2026', '2026-01-01T00:00:00'],
    ['3 May 2026', '2026-05-03T00:00:00'],
    ['3. Mai 2026', '2026-05-03T00:00:00'],
    ['2026-01-05 24:00', '2026-01-06T00:00:00'],
  ])('reads %p', (written, expected) => {
    expect(parseStampText(written, {})).toEqual(local(expected));
  });
  it.each([
    ['2026-01-05T06:10:00Z', '2026-01-05T06:10:00Z'],
    ['2026-01-05T06:10:00+01:00', '2026-01-05T05:10:00Z'],
    ['2026-01-05 06:10 -0530', '2026-01-05T11:40:00Z'],
    ['2026-01-05 06:10 +01', '2026-01-05T05:10:00Z'],
    ['2026-01-05 06:10 UTC', '2026-01-05T06:10:00Z'],
    ['2026-01-05 06:10 GMT+02:00', '2026-01-05T04:10:00Z'],
    ['26.10.2025 02:30 MESZ', '2025-10-26T00:30:00Z'],
    ['26.10.2025 02:30 CET', '2025-10-26T01:30:00Z'],
  ])('reads %p with its offset as an instant', (written, expected) => {
    expect(parseStampText(written, {})).toEqual({ kind: 'instant', ms: Date.parse(expected) });
  });
  it.each([
    ['22:05', 22 * 60 + 5],
    ['6:05 pm', 18 * 60 + 5],
    ['12:00 AM', 0],
    ['12:30 p.m.', 12 * 60 + 30],
    ['14.05 Uhr', 14 * 60 + 5],
  ])('reads the time of day %p', (written, minutes) => {
    expect(parseStampText(written, {})).toEqual({ kind: 'clock', ms: minutes * 60_000 });
  });
  it.each([
    ['2025-02-29', 'date-does-not-exist'],
    ['2026-01-05 25:10', 'date-does-not-exist'],
    ['31.04.2026', 'date-does-not-exist'],
    ['13/13/2026', 'date-does-not-exist'],
    ['25:10', 'not-a-date'],
    ['13:00 pm', 'not-a-date'],
    ['yesterday', 'not-a-date'],
    ['4 Foo 2026', 'not-a-date'],
    ['2026-01-05 early', 'not-a-date'],
    ['1999-12-31T23:59', 'stamp-before-2000'],
    ['26/03/04', 'ambiguous-date'],
    ['03/04/2026 06:00Z', 'ambiguous-date'],
  ])('refuses %p with %p', (written, code) => {
    expect(parseStampText(written, {})).toMatchObject({ kind: 'bad', code });
  });
  it('finds day and month ambiguous where they could be swapped', () => {
    expect(parseStampText('03/04/2026 06:10', {})).toEqual({
      kind: 'ambiguous',
      dayFirst: Date.parse('2026-04-03T06:10Z'),
      monthFirst: Date.parse('2026-03-04T06:10Z'),
    });
  });
  it('goes by what the column has shown, and by the answer before it', () => {
    expect(after(['13/04/2026'], '03/04/2026')).toEqual(local('2026-04-03T00:00:00'));
    expect(after(['04/13/2026'], '03/04/2026')).toEqual(local('2026-03-04T00:00:00'));
    expect(after(['13/04/2026', '04/13/2026'], '03/04/2026')).toMatchObject({ kind: 'ambiguous' });
    expect(after(['13/04/2026'], '03/04/2026', { order: 'month-day' })).toEqual(local('2026-03-04T00:00:00'));
  });
  it('takes the order in which a date has come already, where the other lies ahead', () => {
    const latest = Date.parse('2026-03-06T00:00Z');
    expect(after([], '03/04/2026', { latest })).toEqual(local('2026-03-04T00:00:00'));
    expect(after(['03/04/2026'], '02/03/2026', { latest })).toEqual(local('2026-02-03T00:00:00'));
    expect(after([], '02/01/2026', { latest })).toMatchObject({ kind: 'ambiguous' });
  });

  // Written digit by digit from a known instant, as programs and people write it.
  it('reads back every minute in every way of writing it', () => {
    const pad = (number: number): string => String(number).padStart(2, '0');
    const english = 'Jan Feb Mar Apr May Jun Jul Aug Sep Oct Nov Dec'.split(' ');
    const german = 'Januar Februar März April Mai Juni Juli August September Oktober November Dezember'.split(' ');
    const ways: ((date: Date) => string)[] = [
      (date) => date.toISOString().slice(0, 16),
      (date) => `${pad(date.getUTCDate())}.${pad(date.getUTCMonth() + 1)}.${date.getUTCFullYear()} ${clock(date)}`,
      (date) => `${date.getUTCDate()}.${date.getUTCMonth() + 1}.${pad(date.getUTCFullYear() % 100)} ${clock(date)}`,
      (date) => `${date.getUTCDate()} ${english[date.getUTCMonth()]} ${date.getUTCFullYear()}, ${clock(date)}`,
      (date) => `${english[date.getUTCMonth()]} ${date.getUTCDate()}, ${date.getUTCFullYear()} ${half(date)}`,
      (date) => `${date.getUTCDate()}. ${german[date.getUTCMonth()]} ${date.getUTCFullYear()} ${clock(date)} Uhr`,
      (date) => `${date.getUTCFullYear()}/${pad(date.getUTCMonth() + 1)}/${pad(date.getUTCDate())} ${clock(date)}`,
    ];
    const clock = (date: Date): string => `${pad(date.getUTCHours())}:${pad(date.getUTCMinutes())}`;
    const half = (date: Date): string =>
      `${date.getUTCHours() % 12 || 12}:${pad(date.getUTCMinutes())} ${date.getUTCHours() < 12 ? 'AM' : 'PM'}`;
    const minute = fc.integer({ min: Date.UTC(2000, 0, 1) / 60_000, max: Date.UTC(2099, 11, 31) / 60_000 });
    fc.assert(
      fc.property(minute, fc.constantFrom(...ways), (minutes, write) => {
        const ms = minutes * 60_000;
        expect(parseStampText(write(new Date(ms)), {})).toEqual({ kind: 'local', ms });
      }),
      { numRuns: 500 },
    );
  });
  it('reads numbers between slashes in the answered order', () => {
    const day = fc.integer({ min: Date.UTC(2000, 0, 1) / 86_400_000, max: Date.UTC(2099, 11, 31) / 86_400_000 });
    fc.assert(
      fc.property(day, (days) => {
        const date = new Date(days * 86_400_000);
        const [d, m, y] = [date.getUTCDate(), date.getUTCMonth() + 1, date.getUTCFullYear()];
        const expected = { kind: 'local', ms: date.getTime() };
        expect(parseStampText(`${d}/${m}/${y}`, { order: 'day-month' })).toEqual(expected);
        expect(parseStampText(`${m}/${d}/${y}`, { order: 'month-day' })).toEqual(expected);
        const alone = parseStampText(`${d}/${m}/${y}`, {});
        if (alone.kind === 'ambiguous') expect(alone.dayFirst).toBe(expected.ms);
        else expect(alone).toEqual(expected);
      }),
    );
  });
});
