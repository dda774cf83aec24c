import { GENERAL } from '../container/formats';
import type { Cell } from '../container/sheet-rows';
import { parseValue, Tokens, type ParsedValue } from './values';

const text = (value: string): Cell => ({ kind: 'text', number: NaN, text: value, format: GENERAL });
const number = (value: number, format = GENERAL): Cell => ({ kind: 'number', number: value, text: '', format });
const special = (kind: Cell['kind'], text: string): Cell => ({ kind, number: NaN, text, format: GENERAL });
const parse = (cell: Cell | undefined, missing: string[] = []): ParsedValue =>
  parseValue(cell, {}, new Tokens(missing));
const plain = { kind: 'value', unit: null, isPercent: false, isText: false, uncertainty: null };

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
    text('Nicht gemessen'),
    text('\u00a0'),
  ])('finds %p missing and not zero', (cell) => {
    expect(parse(cell)).toEqual({ kind: 'missing' });
  });
  it.each([
    ['<0.05', 'below'],
    ['< 0,05', 'below'],
    ['<=0.05', 'below'],
    ['<1E-3', 'below'],
    ['<LOD', 'below'],
    ['< LOQ', 'below'],
    ['n.n.', 'below'],
    ['UNDER', 'below'],
    ['-OL', 'below'],
    ['LO', 'below'],
    ['>MAX', 'above'],
    ['> LOD', 'above'],
    ['OL', 'above'],
    ['O.L.', 'above'],
    ['+OL', 'above'],
    ['over', 'above'],
    ['Over-range', 'above'],
    ['OVLD', 'above'],
    ['HI', 'above'],
    ['> 250', 'above'],
    ['1.#INF', 'above'],
    ['>>>', 'above'],
  ])('reads %p as censored %s', (written, censoring) => {
    expect(parse(text(written))).toEqual({ kind: 'censored', censoring, unit: null });
  });
  it('keeps the unit of a censored reading', () => {
    expect(parse(text('≤0.05 µm'))).toEqual({ kind: 'censored', censoring: 'below', unit: 'µm' });
  });
  it('reads zero as zero', () => {
    expect(parse(number(0))).toEqual({ ...plain, value: 0 });
    expect(parse(text('0,0'))).toEqual({ ...plain, value: 0, isText: true });
  });
  it.each([
    ['12,5 g/m2', 12.5, 'g/m2', null],
    ['5.7 %', 5.7, '%', null],
    ['1.234,5mPa·s', 1234.5, 'mPa·s', null],
    ['12.3 ± 0.2', 12.3, null, '0.2'],
    ['12,3 +/- 0,2 µm', 12.3, 'µm', '0,2'],
    ['1E-03', 0.001, null, null],
    ["'12.5", 12.5, null, null],
    ['12 mil', 12, 'mil', null],
    ['3 "', 3, '"', null],
  ])('reads %p as %p in %p', (written, value, unit, uncertainty) => {
    expect(parse(text(written))).toEqual({ ...plain, isText: true, value, unit, uncertainty });
  });
  it('tells a number formatted as a percentage', () => {
    expect(parse(number(0.057, { ...GENERAL, isPercent: true }))).toEqual({ ...plain, value: 0.057, isPercent: true });
  });
  it('leaves to the column what it cannot tell by the cell alone', () => {
    expect(parse(text('10,125'))).toEqual({ kind: 'ambiguous', text: '10,125' });
    expect(parse(text('10,125 µm'))).toEqual({ kind: 'ambiguous', text: '10,125' });
  });
  it.each([
    [text('OK'), 'not-a-number'],
    [text('ERR'), 'not-a-number'],
    [text('± 3'), 'not-a-number'],
    [text('2-3'), 'not-a-number'],
    [text('12 34'), 'not-a-number'],
    [text('12.5 '.repeat(20)), 'not-a-number'],
    [number(46027, { ...GENERAL, isDate: true }), 'value-is-a-date'],
    [number(Infinity), 'not-a-number'],
    [special('error', '#DIV/0!'), 'error-cell'],
    [special('formula-without-result', ''), 'formula-without-result'],
    [special('boolean', 'TRUE'), 'not-a-number'],
  ])('refuses %p with %p', (cell, code) => {
    expect(parse(cell)).toMatchObject({ kind: 'bad', code });
  });
  it.each<[Cell, string]>([
    [number(9999), '9999'],
    [number(-999), '-999'],
    [text('9999'), '9999'],
    [text('9.999'), '9,999'],
    [number(99.99), '99,99'],
    [text('VOID'), 'void'],
    [number(0), '0'],
  ])('finds %p missing where %p was said to stand for it', (cell, token) => {
    expect(parse(cell, [token]).kind).toBe('missing');
    expect(parse(cell, ['77']).kind).toBe(cell.text === 'VOID' ? 'bad' : 'value');
  });
});
