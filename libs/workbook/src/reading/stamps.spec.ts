import { GENERAL } from '../container/formats';
import type { Cell } from '../container/sheet-rows';
import { parseStamp, serialToLocal } from './stamps';

const number = (value: number): Cell => ({ kind: 'number', number: value, text: '', format: GENERAL });
const text = (value: string): Cell => ({ kind: 'text', number: NaN, text: value, format: GENERAL });
const local = (iso: string) => ({ kind: 'local', ms: Date.parse(`${iso}Z`) });

const special = (kind: Cell['kind'], text: string): Cell => ({ kind, number: NaN, text, format: GENERAL });

describe('serialToLocal', () => {
  // Facts of Excel's two date systems as Microsoft documents them (support article "Date systems in Excel").
  it('reads 40729 as 5 July 2011 in the 1900 system', () => {
    expect(serialToLocal(40729, 1900)).toBe(Date.UTC(2011, 6, 5));
  });
  it('counts from 1899-12-30 from serial 61 on', () => {
    expect(serialToLocal(61, 1900)).toBe(Date.UTC(1900, 2, 1));
  });
  it('counts one day later before the day that never was', () => {
    expect(serialToLocal(1, 1900)).toBe(Date.UTC(1900, 0, 1));
    expect(serialToLocal(59, 1900)).toBe(Date.UTC(1900, 1, 28));
  });
  it('knows no day 60 in the 1900 system', () => {
    expect(serialToLocal(60, 1900)).toBeNull();
    expect(serialToLocal(60.5, 1900)).toBeNull();
  });
  it('counts from 1904-01-01 in the 1904 system', () => {
    expect(serialToLocal(0, 1904)).toBe(Date.UTC(1904, 0, 1));
    expect(serialToLocal(60, 1904)).toBe(Date.UTC(1904, 2, 1));
  });
  it('has serials 1,462 smaller for the same day in the 1904 system', () => {
    expect(serialToLocal(40729 - 1462, 1904)).toBe(serialToLocal(40729, 1900));
  });
  it('rounds the fraction to the millisecond', () => {
    expect(serialToLocal(46027 + (6 * 60 + 10) / 1440, 1900)).toBe(Date.UTC(2026, 0, 5, 6, 10));
    expect(serialToLocal(46027.99999999999, 1900)).toBe(Date.UTC(2026, 0, 6));
  });
  it.each([NaN, -1, Infinity, 2_958_466])('has no date for %p', (serial) => {
    expect(serialToLocal(serial, 1900)).toBeNull();
  });
});

describe('parseStamp', () => {
  it.each([
    ['2026-01-05T06:10:30', '2026-01-05T06:10:30'],
    ['2026-01-05 06:10', '2026-01-05T06:10:00'],
    ['2026-01-05', '2026-01-05T00:00:00'],
    ['2026-01-05T06:10:30,25', '2026-01-05T06:10:30.250'],
    ['05.01.2026 06:10', '2026-01-05T06:10:00'],
    ['5.1.2026, 6:10 Uhr', '2026-01-05T06:10:00'],
  ])('reads the text %p', (written, expected) => {
    expect(parseStamp(text(written), 1900)).toEqual(local(expected));
  });
  it.each([
    ['2026-01-05T06:10:00Z', '2026-01-05T06:10:00Z'],
    ['2026-01-05T06:10:00+01:00', '2026-01-05T05:10:00Z'],
    ['2026-01-05 06:10 -0530', '2026-01-05T11:40:00Z'],
  ])('reads %p with its offset as an instant', (written, expected) => {
    expect(parseStamp(text(written), 1900)).toEqual({ kind: 'instant', ms: Date.parse(expected) });
  });
  it.each([
    ['22:05', 22 * 60 + 5],
    ['6:05 pm', 18 * 60 + 5],
    ['12:00 AM', 0],
  ])('reads the time of day %p', (written, minutes) => {
    expect(parseStamp(text(written), 1900)).toEqual({ kind: 'clock', ms: minutes * 60_000 });
  });
  it('reads a fraction of a day as a time of day', () => {
    expect(parseStamp(number(0.25), 1900)).toEqual({ kind: 'clock', ms: 6 * 3_600_000 });
  });
  it.each([
    [text('05/01/2026 06:10'), 'ambiguous-date'],
    [text('13/01/2026'), 'ambiguous-date'],
    [text('05.01.26'), 'ambiguous-date'],
    [text('2025-02-29'), 'date-does-not-exist'],
    [text('2026-01-05 25:10'), 'date-does-not-exist'],
    [text('25:10'), 'not-a-date'],
    [text('yesterday'), 'not-a-date'],
    [text('1999-12-31T23:59'), 'stamp-before-2000'],
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
