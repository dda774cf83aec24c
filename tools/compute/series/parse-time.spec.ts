import { parseTime } from './parse-time';

describe('a time', () => {
  it.each([
    ['0', 0],
    ['-12.5', -12.5],
    ['+.5e3', 500],
    ['1772323200.000001', 1772323200.000001],
    ['20260301', 20260301],
  ])('as a number stays as it stands: %s', (text, seconds) => {
    expect(parseTime(text)).toEqual({ kind: 'number', seconds, isZoneless: false });
  });

  // 2026-03-01T06:00:00Z is 20,513 days and 6 hours after 1970-01-01 (date -u -d '2026-03-01T06:00:00Z' +%s).
  it.each([
    ['2026-03-01T06:00:00Z', 1772344800, false],
    ['2026-03-01T06:00Z', 1772344800, false],
    ['2026-03-01t07:00:00+01:00', 1772344800, false],
    ['2026-03-01T00:30:00-0530', 1772344800, false],
    ['2026-03-01 08:00:00+02', 1772344800, false],
    ['2026-03-01T06:00:00.25Z', 1772344800.25, false],
    ['2026-03-01T06:00:00,250001Z', 1772344800.250001, false],
    ['2026-03-01T06:00:00', 1772344800, true],
    ['2026-03-01', 1772323200, true],
    ['2024-02-29T00:00:00Z', 1709164800, false],
    ['1969-12-31T23:59:59Z', -1, false],
  ])('in ISO 8601 becomes seconds: %s', (text, seconds, isZoneless) => {
    expect(parseTime(text)).toEqual({ kind: 'iso', seconds, isZoneless });
  });

  it.each([
    [''],
    ['now'],
    ['NaN'],
    ['1e999'],
    ['0x10'],
    ['12,5'],
    ['2026-02-29T00:00:00Z'],
    ['2026-13-01T00:00:00Z'],
    ['2026-03-01T24:00:00Z'],
    ['2026-03-01T06:60:00Z'],
    ['2026-03-01T06:00:60Z'],
    ['2026-03-01T06:00:00+24:00'],
    ['01.03.2026 06:00'],
    ['2026-03-01T06:00:00 Europe/Berlin'],
  ])('is not read from %p', (text) => {
    expect(parseTime(text)).toBeUndefined();
  });
});
