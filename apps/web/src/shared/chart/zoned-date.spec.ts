import { zonedDate } from './zoned-date';

const fields = (date: Date) => [
  date.getFullYear(),
  date.getMonth() + 1,
  date.getDate(),
  date.getHours(),
  date.getMinutes(),
];

describe('zonedDate', () => {
  it('shows the zone’s clocks in winter and in summer', () => {
    expect(fields(zonedDate(Date.parse('2026-12-01T23:30:00Z'), 'Europe/Berlin'))).toEqual([2026, 12, 2, 0, 30]);
    expect(fields(zonedDate(Date.parse('2026-07-01T12:00:00Z'), 'Europe/Berlin'))).toEqual([2026, 7, 1, 14, 0]);
    expect(fields(zonedDate(Date.parse('2026-07-01T12:00:00Z'), 'Asia/Kolkata'))).toEqual([2026, 7, 1, 17, 30]);
  });

  it('keeps the milliseconds', () => {
    expect(zonedDate(Date.parse('2026-12-01T00:00:00.250Z'), 'UTC').getMilliseconds()).toBe(250);
  });
});
