import { DateTime } from 'luxon';
import { demoEndsAt, demoSchedule } from '.';
import { ENDS_AT } from './testing/lot-deviations';

const at = (iso: string): number => DateTime.fromISO(iso, { zone: 'Europe/London' }).toSeconds();

describe('the shift calendar', () => {
  it('holds six weeks of three shifts a day and the two shifts after them, without gaps', () => {
    const { shifts, further, startsAt } = demoSchedule(ENDS_AT);
    const all = [...shifts, ...further];
    expect([shifts.length, further.length]).toEqual([126, 2]);
    expect(startsAt).toBe(at('2026-01-19T06:00'));
    expect(shifts[125].endsAt).toBe(ENDS_AT);
    expect(all.slice(1).every((shift, index) => shift.startsAt === all[index].endsAt)).toBe(true);
    expect(all.slice(-3).map(({ name }) => name)).toEqual(['night', 'early', 'late']);
    expect(all.map(({ index }) => index)).toEqual(all.map((_, index) => index));
  });

  it('keeps the wall clock: the night of the spring change has 7 hours, that of the autumn change 9', () => {
    const hours = (endsAt: number): number[] =>
      demoSchedule(endsAt).shifts.map((shift) => (shift.endsAt - shift.startsAt) / 3600);
    const spring = hours(at('2026-04-06T06:00'));
    expect(spring.filter((length) => length !== 8)).toEqual([7]);
    const autumn = demoSchedule(at('2026-11-02T14:00')).shifts.filter(
      (shift) => shift.endsAt - shift.startsAt !== 28800,
    );
    expect(autumn).toMatchObject([{ name: 'night', startsAt: at('2026-10-24T22:00'), endsAt: at('2026-10-25T06:00') }]);
    expect(autumn[0].endsAt - autumn[0].startsAt).toBe(9 * 3600);
  });

  it.each([
    ['2026-03-02T22:00', '2026-03-02T06:00'],
    ['2026-03-03T05:59', '2026-03-02T06:00'],
    ['2026-03-03T06:00', '2026-03-02T14:00'],
    ['2026-03-02T00:30', '2026-03-01T06:00'],
    ['2026-03-29T13:00', '2026-03-28T14:00'],
  ])('ends two full shifts before now: at %s it ends at %s', (now, endsAt) => {
    expect(demoEndsAt(at(now))).toBe(at(endsAt));
    expect(demoSchedule(demoEndsAt(at(now))).further[1].endsAt).toBeLessThanOrEqual(at(now));
  });

  it('refuses an end that is no shift change', () => {
    expect(() => demoSchedule(ENDS_AT + 60)).toThrow('not the end of a shift');
    expect(() => demoSchedule(NaN)).toThrow();
  });
});
