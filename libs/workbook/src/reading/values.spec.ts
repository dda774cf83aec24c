import { GENERAL } from '../container/formats';
import type { Cell } from '../container/sheet-rows';
import { parseNumberText, parseValue } from './values';

const habits = () => ({ sawDecimalComma: false });
const text = (value: string): Cell => ({ kind: 'text', number: NaN, text: value, format: GENERAL });
const number = (value: number, format = GENERAL): Cell => ({ kind: 'number', number: value, text: '', format });

const special = (kind: Cell['kind'], text: string): Cell => ({ kind, number: NaN, text, format: GENERAL });

describe('parseNumberText', () => {
  it.each([
    ['10125', 10125],
    ['10.125', 10.125],
    ['12,5', 12.5],
    ['0,125', 0.125],
    ['1234,567', 1234.567],
    ['1.234,56', 1234.56],
    ['1,234.56', 1234.56],
    ['1,234,567', 1234567],
    ['1.234.567,8', 1234567.8],
    ['1 234,5', 1234.5],
    ['1\u202f234\u00a0567', 1234567],
    ["1'234.5", 1234.5],
    ['-0.5', -0.5],
    ['−3,25', -3.25],
    ['+7', 7],
    ['1E-03', 0.001],
    ['.5', 0.5],
  ])('reads %p as %p', (written, expected) => {
    expect(parseNumberText(written, habits())).toBe(expected);
  });
  it.each(['10,125', '1,000', '999,999', '-10,125'])('finds %p ambiguous', (written) => {
    expect(parseNumberText(written, habits())).toBe('ambiguous');
  });
  it('finds a point before three digits ambiguous once the column has shown decimal commas', () => {
    const column = habits();
    expect(parseNumberText('9,8', column)).toBe(9.8);
    expect(parseNumberText('10.125', column)).toBe('ambiguous');
    expect(parseNumberText('10.12', column)).toBe(10.12);
  });
  it.each(['', 'abc', '1,23,456', '1.2.3', '1,234.5.6', '12 34', '--5', '1e999'])(
    'finds no number in %p',
    (written) => {
      expect(parseNumberText(written, habits())).toBeNull();
    },
  );
});

describe('parseValue', () => {
  it.each([
    undefined,
    text('  '),
    text('-'),
    text('--'),
    text('n/a'),
    text('N/A'),
    text('k.A.'),
    text('—'),
    text('\u00a0'),
  ])('finds %p missing and not zero', (cell) => {
    expect(parseValue(cell, 'µm', habits())).toEqual({ kind: 'missing' });
  });
  it.each([
    ['<0.05', 'below'],
    ['< 0,05', 'below'],
    ['≤0.05 µm', 'below'],
    ['<LOD', 'below'],
    ['UNDER', 'below'],
    ['>MAX', 'above'],
    ['OL', 'above'],
    ['O.L.', 'above'],
    ['over', 'above'],
    ['> 250', 'above'],
  ])('reads %p as censored %s', (written, censoring) => {
    expect(parseValue(text(written), 'μm', habits())).toEqual({ kind: 'censored', censoring });
  });
  it('reads zero as zero', () => {
    expect(parseValue(number(0), 'µm', habits())).toEqual({ kind: 'value', value: 0, note: null });
  });
  it('reads a number with the channel’s own unit and says that it was text', () => {
    expect(parseValue(text('12,5 g/m2'), 'g/m²', habits())).toEqual({
      kind: 'value',
      value: 12.5,
      note: 'number-stored-as-text',
    });
  });
  it('reads a percentage for a channel in %, and refuses it for another', () => {
    const percent = { ...GENERAL, isPercent: true };
    expect(parseValue(number(0.057, percent), '%', habits())).toMatchObject({ value: 5.7, note: 'percent-cell' });
    expect(parseValue(number(0.057, percent), 'µm', habits())).toMatchObject({ kind: 'bad', code: 'percent-cell' });
  });
  it.each([
    [text('12 mil'), 'unit-differs'],
    [text('<5 mil'), 'unit-differs'],
    [text('10,125'), 'ambiguous-number'],
    [text('OK'), 'not-a-number'],
    [text('ERR'), 'not-a-number'],
    [text('12 ± 3'), 'not-a-number'],
    [number(46027, { ...GENERAL, isDate: true }), 'value-is-a-date'],
    [number(Infinity), 'not-a-number'],
    [special('error', '#DIV/0!'), 'error-cell'],
    [special('formula-without-result', ''), 'formula-without-result'],
    [special('boolean', 'TRUE'), 'not-a-number'],
  ])('refuses %p with %p', (cell, code) => {
    expect(parseValue(cell, 'µm', habits())).toMatchObject({ kind: 'bad', code });
  });
  it('questions a number that instruments write as a code', () => {
    expect(parseValue(number(-999), 'µm', habits())).toMatchObject({ value: -999, note: 'looks-like-a-code' });
  });
});
