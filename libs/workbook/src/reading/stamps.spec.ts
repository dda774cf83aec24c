import fc from 'fast-check';
import { GENERAL } from '../container/formats';
import type { Cell } from '../container/sheet-rows';
import { parseStamp, serialToLocal } from './stamps';

const number = (value: number): Cell => ({ kind: 'number', number: value, text: '', format: GENERAL });
const text = (value: string): Cell => ({ kind: 'text', number: NaN, text: value, format: GENERAL });
const local = (iso: string) => ({ kind: 'local', ms: Date.parse(`${iso}Z`) });

const special = (kind: Cell['kind'], text: string): Cell => ({ kind, number: NaN, text, format: GENERAL });

// Facts of Excel's two date systems as Microsoft documents them (support article "Date systems in Excel"; article 214326
// on the leap year 1900).
describe('serialToLocal', () => {
  it.each<[string, number, 1900 | 1904, string]>([
    ['1899-12-30 + serial from 61 on', 61, 1900, '1900-03-01'],
    ['1899-12-30 + serial from 61 on', 36_526, 1900, '2000-01-01'],
    ['one day later before the day that never was', 1, 1900, '1900-01-01'],
    ['one day later before the day that never was', 59, 1900, '1900-02-28'],
    ['1904-01-01 + serial', 0, 1904, '1904-01-01'],
    ['1904-01-01 + serial', 60, 1904, '1904-03-01'],
    ['5 July 2011 = 40729 in the 1900 system', 40_729, 1900, '2011-07-05'],
    ['1900 serial = 1904 serial + 1462', 40_729 - 1_462, 1904, '2011-07-05'],
    ['the last day of both', 2_958_465, 1900, '9999-12-31'],
    ['the last day of both', 2_958_465 - 1_462, 1904, '9999-12-31'],
  ])('knows: %s (%i in the %i system)', (_, serial, system, day) => {
    expect(serialToLocal(serial, system)).toBe(Date.parse(`${day}T00:00:00Z`));
  });
  it('knows no day 60 in the 1900 system', () => {
    expect(serialToLocal(60, 1900)).toBeNull();
    expect(serialToLocal(60.5, 1900)).toBeNull();
  });
  it('rounds the fraction to the millisecond', () => {
    expect(serialToLocal(46027 + (6 * 60 + 10) / 1440, 1900)).toBe(Date.UTC(2026, 0, 5, 6, 10));
    expect(serialToLocal(46027.99999999999, 1900)).toBe(Date.UTC(2026, 0, 6));
  });
  it.each([NaN, -1, Infinity, 2_958_466])('has no date for %p', (serial) => {
    expect(serialToLocal(serial, 1900)).toBeNull();
  });
  it('counts days as the calendar does, in both systems', () => {
    fc.assert(
      fc.property(fc.integer({ min: 61, max: 2_958_465 }), fc.integer({ min: 0, max: 86_399 }), (serial, second) => {
        const expected = Date.UTC(1899, 11, 30 + serial, 0, 0, second);
        expect(serialToLocal(serial + second / 86_400, 1900)).toBe(expected);
        if (serial >= 1_462) expect(serialToLocal(serial - 1_462 + second / 86_400, 1904)).toBe(expected);
      }),
    );
  });
});

describe('parseStamp', () => {
  it('reads a text by what its column has shown', () => {
    expect(parseStamp(text(' 2026-01-05 06:10 '), 1900)).toEqual(local('2026-01-05T06:10:00'));
    expect(parseStamp(text('03/04/2026'), 1900, { sawDayFirst: true })).toEqual(local('2026-04-03T00:00:00'));
    expect(parseStamp(text('n/a'), 1900)).toEqual({ kind: 'missing' });
  });
  it('reads a fraction of a day as a time of day', () => {
    expect(parseStamp(number(0.25), 1900)).toEqual({ kind: 'clock', ms: 6 * 3_600_000 });
  });
  it.each([
    [number(36525), 'stamp-before-2000'],
    [number(60), 'date-does-not-exist'],
    [number(20260105), 'not-a-date'],
    [number(-3), 'not-a-date'],
    [special('error', '#VALUE!'), 'error-cell'],
  ])('refuses %p with %p', (cell, code) => {
    expect(parseStamp(cell, 1900)).toMatchObject({ kind: 'bad', code });
  });
  it('takes 2000-01-01 as the first day', () => {
    expect(parseStamp(number(36526), 1900)).toEqual(local('2000-01-01T00:00:00'));
  });
});
