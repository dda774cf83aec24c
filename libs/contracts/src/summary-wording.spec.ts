import {
  ageInWords,
  ageSpanInWords,
  formatQuantity,
  measureInWords,
  percentInWords,
  weekInWords,
} from './summary-wording';
import { lotsOf500 } from './testing/made-summary';

const plain = (text: string) => text.replaceAll('\u202f', ' ');

describe('a week in words', () => {
  it.each([
    ['2026-11-23', '23 to 29 Nov 2026'],
    ['2026-03-30', '30 Mar to 5 Apr 2026'],
    ['2026-12-28', '28 Dec 2026 to 3 Jan 2027'],
  ])('from %s is %s', (startsOn, words) => expect(weekInWords(startsOn)).toBe(words));
});

describe('quantities, ages and shares in words', () => {
  it('part thousands by a space that no reader takes for a decimal mark', () => {
    expect(plain(formatQuantity(1_234_567, 'm'))).toBe('1 234 567 m');
    expect(plain(formatQuantity(10_125.4, 'm²'))).toBe('10 125 m²');
    expect(plain(formatQuantity(12.25, 'kg'))).toMatch(/^12\.[23] kg$/);
  });

  it('say what lots come to, and what is in no sum', () => {
    expect(plain(measureInWords(lotsOf500(3)))).toBe('3 lots (1 500 m, 2 700 EUR)');
    expect(measureInWords({ lots: 1, quantities: [], lotsWithoutQuantity: 1, value: null })).toBe('1 lot');
    const value = { amount: 900.4, currency: 'EUR', lotsWithout: 2 };
    expect(plain(measureInWords({ ...lotsOf500(3), value }))).toBe(
      '3 lots (1 500 m, 900 EUR without 2 lots of no stated value)',
    );
  });

  it('count ages in whole hours and days', () => {
    expect([0.5, 1, 23.99, 24, 52, 72].map((hours) => plain(ageInWords(hours)))).toEqual([
      'under an hour',
      '1 h',
      '23 h',
      '1 d',
      '2 d 4 h',
      '3 d',
    ]);
    const spans = [
      { fromHours: 0, toHours: 8 },
      { fromHours: 8, toHours: 24 },
      { fromHours: 72, toHours: null },
    ];
    expect(spans.map((span) => plain(ageSpanInWords(span)))).toEqual(['under 8 h', '8 h to 1 d', 'over 3 d']);
  });

  it('round shares to whole per cent', () => expect(plain(percentInWords(1.116))).toBe('112 %'));
});
