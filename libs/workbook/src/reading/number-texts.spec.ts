import fc from 'fast-check';
import { bothReadings, newHabits, parseNumberText } from './number-texts';

/** What is read after a column has shown these texts. */
const after = (shown: string[], written: string): number | string | null => {
  const habits = newHabits();
  for (const text of shown) parseNumberText(text, habits);
  return parseNumberText(written, habits);
};

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
    ['12\u2009345.6', 12345.6],
    ["1'234.5", 1234.5],
    ['1’234,5', 1234.5],
    ["'12.5", 12.5],
    ['-0.5', -0.5],
    ['−3,25', -3.25],
    ['12,5-', -12.5],
    ['+7', 7],
    ['1E-03', 0.001],
    ['1,234E+03', 1234],
    ['2,5e2', 250],
    ['.5', 0.5],
    ['5.', 5],
  ])('reads %p as %p', (written, expected) => {
    expect(parseNumberText(written, newHabits())).toBe(expected);
  });
  it.each(['10,125', '1,000', '999,999', '-10,125'])('finds %p ambiguous by itself', (written) => {
    expect(parseNumberText(written, newHabits())).toBe('ambiguous');
  });
  it.each<[string[], string, number | string]>([
    [['12,34'], '12,345', 12.345],
    [['1.234,5'], '12,345', 12.345],
    [['1.234,5'], '12.345', 12345],
    [['12,34'], '12.345', 'ambiguous'],
    [['1,234.5'], '12,345', 12345],
    [['1,234,567'], '12,345', 12345],
    [['12.34'], '12,345', 'ambiguous'],
    [['12.34', '12,34'], '12,345', 'ambiguous'],
    [['12.34', '12,34'], '12.345', 'ambiguous'],
    [['12.34'], '12.345', 12.345],
    [['9,8'], '10.12', 10.12],
  ])('in a column that shows %p reads %p as %p', (shown, written, expected) => {
    expect(after(shown, written)).toBe(expected);
  });
  it('goes by the answer before anything else', () => {
    expect(parseNumberText('12,345', newHabits(','))).toBe(12.345);
    expect(parseNumberText('12,345', newHabits('.'))).toBe(12345);
    expect(parseNumberText('12.345', newHabits(','))).toBe(12345);
    expect(parseNumberText('12,5', newHabits('.'))).toBeNull();
    expect(parseNumberText('1,234.5', newHabits(','))).toBeNull();
  });
  it('counts the points that it takes as decimal without having been told', () => {
    const habits = newHabits();
    for (const text of ['10.125', '10.250']) parseNumberText(text, habits);
    expect(habits.assumedPoints).toBe(2);
    parseNumberText('10.2', habits);
    parseNumberText('10.375', habits);
    expect(habits.assumedPoints).toBe(2);
  });
  it('tells both readings of an ambiguous text', () => {
    expect(bothReadings('12,345')).toEqual({ decimal: 12.345, grouped: 12345, sign: ',' });
    expect(bothReadings('12.345')).toEqual({ decimal: 12.345, grouped: 12345, sign: '.' });
  });
  it.each(['', 'abc', '1,23,456', '1.2.3', '1,234.5.6', '12 34', '--5', '1e999', '5-3', '1,2,3'])(
    'finds no number in %p',
    (written) => {
      expect(parseNumberText(written, newHabits())).toBeNull();
    },
  );

  // Written as people write them, from whole digits, so that the number is known before it is a text.
  it('reads back every number in every way of writing it, once the decimal sign is known', () => {
    const parts = fc.tuple(fc.integer({ min: 0, max: 999_999_999 }), fc.integer({ min: 0, max: 9_999 }), fc.boolean());
    const signs = fc.constantFrom<['.' | ',', string]>(
      ['.', ''],
      ['.', ','],
      ['.', ' '],
      ['.', "'"],
      ['.', '\u202f'],
      [',', ''],
      [',', '.'],
      [',', '\u00a0'],
      [',', '’'],
    );
    fc.assert(
      fc.property(parts, signs, ([whole, fraction, isNegative], [decimal, group]) => {
        const grouped = String(whole).replace(/\B(?=(\d{3})+(?!\d))/g, group);
        const places = String(fraction).padStart(4, '0');
        const written = `${isNegative ? '-' : ''}${grouped}${decimal}${places}`;
        const expected = Number(`${isNegative ? '-' : ''}${whole}.${places}`);
        expect(parseNumberText(written, newHabits(decimal))).toBe(expected);
        expect(parseNumberText(written, newHabits())).toBe(expected);
      }),
      { numRuns: 500 },
    );
  });
  it('never reads a text in two ways, whatever the column has shown', () => {
    const text = fc.stringMatching(/^[-+]?\d{1,4}([.,]\d{1,4}){0,2}$/);
    fc.assert(
      fc.property(fc.array(text, { maxLength: 6 }), text, (shown, written) => {
        const read = after(shown, written);
        const possible = [parseNumberText(written, newHabits('.')), parseNumberText(written, newHabits(','))];
        expect(['ambiguous', null, ...possible]).toContain(read);
      }),
      { numRuns: 500 },
    );
  });
});
