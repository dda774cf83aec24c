import { dueWeeks, lastCompleteWeek, toldAt, weekAt, weekBefore, weekStartingOn } from './summary-week';

const HOUR = 3_600_000;

/**
 * Mondays 00:00 around the changes of 2026, by hand from the zones' rules in the IANA data base (2025b): London +0 → +1 on 29 March
 * 01:00 UTC, back on 25 October 01:00 UTC; New York −5 → −4 on 8 March 07:00 UTC, back on 1 November 06:00 UTC; Lord Howe
 * +11 → +10:30 on 5 April (4 April 15:00 UTC), back on 4 October (3 October 15:30 UTC).
 */
const WEEKS: [string, string, string, string, number][] = [
  ['Europe/London', '2026-03-23', '2026-03-23T00:00:00.000Z', '2026-03-29T23:00:00.000Z', 167],
  ['Europe/London', '2026-10-19', '2026-10-18T23:00:00.000Z', '2026-10-26T00:00:00.000Z', 169],
  ['Europe/London', '2026-03-30', '2026-03-29T23:00:00.000Z', '2026-04-05T23:00:00.000Z', 168],
  ['America/New_York', '2026-03-02', '2026-03-02T05:00:00.000Z', '2026-03-09T04:00:00.000Z', 167],
  ['America/New_York', '2026-10-26', '2026-10-26T04:00:00.000Z', '2026-11-02T05:00:00.000Z', 169],
  ['Australia/Lord_Howe', '2026-03-30', '2026-03-29T13:00:00.000Z', '2026-04-05T13:30:00.000Z', 168.5],
  ['Australia/Lord_Howe', '2026-09-28', '2026-09-27T13:30:00.000Z', '2026-10-04T13:00:00.000Z', 167.5],
];

describe('a week of a plant', () => {
  it.each(WEEKS)('in %s from %s runs from Monday 00:00 to Monday 00:00', (zone, startsOn, from, to, hours) => {
    const week = weekStartingOn(startsOn, zone);
    expect([week.from.toISOString(), week.to.toISOString()]).toEqual([from, to]);
    expect((week.to.getTime() - week.from.getTime()) / HOUR).toBe(hours);
    expect(weekAt(week.from, zone)).toEqual(week);
    expect(weekAt(new Date(week.to.getTime() - 1), zone)).toEqual(week);
    expect(weekBefore(weekAt(week.to, zone), zone)).toEqual(week);
    expect(lastCompleteWeek(week.to, zone)).toEqual(week);
    expect(lastCompleteWeek(new Date(week.to.getTime() - 1), zone).startsOn < startsOn).toBe(true);
  });

  it('is told at six in the morning by the plant’s clock, on the day after a change too', () => {
    const told = (startsOn: string, zone: string) => toldAt(weekStartingOn(startsOn, zone), zone).toISOString();
    expect(told('2026-03-23', 'Europe/London')).toBe('2026-03-30T05:00:00.000Z');
    expect(told('2026-10-19', 'Europe/London')).toBe('2026-10-26T06:00:00.000Z');
    expect(told('2026-03-02', 'America/New_York')).toBe('2026-03-09T10:00:00.000Z');
    expect(told('2026-09-28', 'Australia/Lord_Howe')).toBe('2026-10-04T19:00:00.000Z');
  });

  it.each(['2026-03-03', '2026-3-2', 'last week', '2026-02-30', ''])('does not start on "%s"', (text) => {
    expect(() => weekStartingOn(text, 'Europe/London')).toThrow('not-a-monday');
  });
});

describe('the weeks whose summary is due', () => {
  const zone = 'Europe/London';
  const due = (at: string, toldStartsOn: string[], firstReadingAt: string | null = '2026-01-07T10:00:00Z', most = 53) =>
    dueWeeks(
      new Date(at),
      zone,
      { toldStartsOn, firstReadingAt: firstReadingAt === null ? null : new Date(firstReadingAt) },
      most,
    ).map((week) => week.startsOn);

  it('are the one that ended, from Monday 06:00 on', () => {
    expect(due('2026-03-30T04:59:59Z', ['2026-03-16'])).toEqual([]);
    expect(due('2026-03-30T05:00:00Z', ['2026-03-16'])).toEqual(['2026-03-23']);
    expect(due('2026-04-05T22:00:00Z', ['2026-03-23'])).toEqual([]);
  });

  it('are with it all that were missed since the first that was told', () => {
    const missed = ['2026-02-09', '2026-02-16', '2026-02-23', '2026-03-02', '2026-03-09', '2026-03-16', '2026-03-23'];
    expect(due('2026-03-30T05:00:00Z', ['2026-02-02'])).toEqual(missed);
    expect(due('2026-03-30T05:00:00Z', ['2026-02-23', '2026-02-02', '2026-03-16'])).toEqual(
      missed.filter((week) => week !== '2026-02-23' && week !== '2026-03-16'),
    );
    expect(due('2026-03-30T05:00:00Z', ['2026-02-02'], undefined, 2)).toEqual(missed.slice(-2));
  });

  it('are none while the newest is told, whatever was missed before', () => {
    expect(due('2026-03-30T05:00:00Z', ['2026-02-02', '2026-03-23'])).toEqual([]);
  });

  it('are only the last one where none was ever told', () => {
    expect(due('2026-03-30T05:00:00Z', [])).toEqual(['2026-03-23']);
    expect(due('2026-03-30T04:00:00Z', [])).toEqual(['2026-03-16']);
  });

  it('are none before the plant’s first reading', () => {
    expect(due('2026-03-30T05:00:00Z', [], null)).toEqual([]);
    expect(due('2026-03-30T05:00:00Z', [], '2026-03-29T23:00:00Z')).toEqual([]);
    expect(due('2026-03-30T05:00:00Z', [], '2026-03-29T22:59:00Z')).toEqual(['2026-03-23']);
    expect(due('2026-03-30T05:00:00Z', ['2026-03-02'], '2026-03-18T00:00:00Z')).toEqual(['2026-03-16', '2026-03-23']);
  });
});
