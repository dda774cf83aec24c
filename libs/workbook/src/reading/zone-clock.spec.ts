import fc from 'fast-check';
import { DateTime } from 'luxon';
import { ZoneClock } from './zone-clock';

const wall = (iso: string): number => Date.parse(`${iso}Z`);
const at = (...iso: string[]): number[] => iso.map((one) => Date.parse(one));

describe('ZoneClock', () => {
  const berlin = new ZoneClock('Europe/Berlin');

  it('reads a winter and a summer wall clock', () => {
    expect(berlin.instantsOf(wall('2026-01-05T06:00:00'))).toEqual(at('2026-01-05T05:00:00Z'));
    expect(berlin.instantsOf(wall('2026-07-05T06:00:00'))).toEqual(at('2026-07-05T04:00:00Z'));
  });
  // Directive 2000/84/EC: the last Sundays of March and October, at 01:00 UTC.
  it('finds no instant in the hour that is jumped over', () => {
    expect(berlin.instantsOf(wall('2026-03-29T02:00:00'))).toEqual([]);
    expect(berlin.instantsOf(wall('2026-03-29T02:59:59'))).toEqual([]);
    expect(berlin.instantsOf(wall('2026-03-29T01:59:59'))).toEqual(at('2026-03-29T00:59:59Z'));
    expect(berlin.instantsOf(wall('2026-03-29T03:00:00'))).toEqual(at('2026-03-29T01:00:00Z'));
  });
  it('finds two instants in the repeated hour', () => {
    expect(berlin.instantsOf(wall('2025-10-26T02:30:00'))).toEqual(at('2025-10-26T00:30:00Z', '2025-10-26T01:30:00Z'));
    expect(berlin.instantsOf(wall('2025-10-26T01:59:59'))).toEqual(at('2025-10-25T23:59:59Z'));
    expect(berlin.instantsOf(wall('2025-10-26T03:00:00'))).toEqual(at('2025-10-26T02:00:00Z'));
  });
  it('finds the instant of every wall clock that luxon shows', () => {
    const zones = [
      'Europe/Berlin',
      'America/New_York',
      'Australia/Lord_Howe',
      'Asia/Kolkata',
      'America/St_Johns',
      'UTC',
    ];
    const clocks = new Map(zones.map((zone) => [zone, new ZoneClock(zone)]));
    const instant = fc.integer({ min: Date.UTC(2000, 0, 2), max: Date.UTC(2035, 0, 1) });
    fc.assert(
      fc.property(fc.constantFrom(...zones), instant, (zone, ms) => {
        const shown = DateTime.fromMillis(ms, { zone }).setZone('UTC', { keepLocalTime: true }).toMillis();
        expect(clocks.get(zone)!.instantsOf(shown)).toContain(ms);
      }),
      { numRuns: 500 },
    );
  });
  it('refuses a zone that does not exist', () => {
    expect(() => new ZoneClock('Europe/Marrowby')).toThrow(RangeError);
  });
});
