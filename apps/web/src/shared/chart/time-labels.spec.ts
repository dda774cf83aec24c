import { timeLabels } from './time-labels';

const utc = (text: string) => Date.parse(text);

describe('timeLabels', () => {
  it('shows times of day in the zone, the date under the first of each day', () => {
    const splits = [utc('2026-11-03T20:00:00Z'), utc('2026-11-03T22:00:00Z'), utc('2026-11-04T00:00:00Z')];
    expect(timeLabels(splits, 2 * 3_600_000, 'Europe/Berlin')).toEqual(['21:00\n3 Nov', '23:00', '01:00\n4 Nov']);
  });

  it('shows midnight as 00:00', () => {
    expect(timeLabels([utc('2026-11-03T00:00:00Z')], 3_600_000, 'UTC')).toEqual(['00:00\n3 Nov']);
  });

  it('shows dates with the year under the first of each year', () => {
    const splits = [utc('2026-12-30T12:00:00Z'), utc('2026-12-31T12:00:00Z'), utc('2027-01-01T12:00:00Z')];
    expect(timeLabels(splits, 86_400_000, 'UTC')).toEqual(['30 Dec\n2026', '31 Dec', '1 Jan\n2027']);
  });

  it('is right across the end of summer time', () => {
    const splits = [utc('2026-10-25T00:00:00Z'), utc('2026-10-25T01:00:00Z')];
    expect(timeLabels(splits, 3_600_000, 'Europe/Berlin')).toEqual(['02:00\n25 Oct', '02:00']);
  });
});
