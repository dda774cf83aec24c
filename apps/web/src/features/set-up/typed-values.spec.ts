import { dayPlus, isDay, isTime, numberText, percentText, readNumber, shareOf } from './typed-values';

test('a number is read with a decimal point only', () => {
  expect([readNumber('12.5'), readNumber(' -3 '), readNumber('\u22120.02'), readNumber('.5')]).toEqual([
    12.5, -3, -0.02, 0.5,
  ]);
  expect(readNumber('  ')).toBeNull();
  for (const text of ['10,125', '1.234,5', '12 g', '1e3', 'NaN', '.', '-']) expect(readNumber(text)).toBeNaN();
});

test('a number goes into its field as it would be typed', () => {
  expect([numberText(0.01), numberText(null), numberText(-2)]).toEqual(['0.01', '', '-2']);
});

test('shares are typed as per cent, without a binary tail', () => {
  expect([percentText(0.07), percentText(0.29), percentText(0.25)]).toEqual(['7', '29', '25']);
  expect([shareOf('7'), shareOf('29'), shareOf('12.5')]).toEqual([0.07, 0.29, 0.125]);
  expect(shareOf('ten')).toBeNaN();
});

test('only days of the calendar and times of a day pass', () => {
  expect([isDay('2028-02-29'), isDay('2026-02-29'), isDay('1.2.2026'), isDay('2026-13-01')]).toEqual([
    true,
    false,
    false,
    false,
  ]);
  expect([isTime('00:00'), isTime('23:59'), isTime('24:00'), isTime('6:00'), isTime('2 PM')]).toEqual([
    true,
    true,
    false,
    false,
    false,
  ]);
});

test('the next day is found over the ends of months and years', () => {
  expect([dayPlus('2026-12-31', 1), dayPlus('2028-03-01', -1)]).toEqual(['2027-01-01', '2028-02-29']);
});
