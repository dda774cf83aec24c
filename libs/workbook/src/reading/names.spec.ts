import { foldName, isSameUnit, splitUnit } from './names';
import { isCheckStandardLabel, isSummaryLabel, meaningOf } from './synonyms';

describe('foldName', () => {
  it('takes no notice of case, blanks, punctuation and accents', () => {
    expect(foldName(' Lot-Nr. ')).toBe('lotnr');
    expect(foldName('Messgröße')).toBe('messgrosse');
    expect(foldName('COAT\u00a0WEIGHT')).toBe('coatweight');
  });
});

describe('isSameUnit', () => {
  it.each([
    ['µm', 'μm'],
    ['um', 'µm'],
    ['g/m²', 'g/m2'],
    ['g/m^2', 'g/m²'],
    ['°C', '℃'],
    ['deg C', '°C'],
    ['mPa·s', 'mPa*s'],
    ['mPa s', 'mPas'],
    ['KG/M³', 'kg/m3'],
    ['PH', 'pH'],
  ])('finds %p and %p the same', (one, other) => {
    expect(isSameUnit(one, other)).toBe(true);
  });
  it.each([
    ['mPa·s', 'MPa·s'],
    ['µm', 'mm'],
    ['°C', '°F'],
    ['g/m²', 'kg/m²'],
    ['', 'µm'],
  ])('finds %p and %p different', (one, other) => {
    expect(isSameUnit(one, other)).toBe(false);
  });
});

describe('splitUnit', () => {
  it.each([
    ['Thickness [µm]', 'Thickness', 'µm'],
    ['Thickness (µm)', 'Thickness', 'µm'],
    ['Thickness\n[µm]', 'Thickness', 'µm'],
    ['Dicke in µm', 'Dicke', 'µm'],
    ['pH', 'pH', null],
    ['pH [-]', 'pH', null],
  ])('splits %p', (header, name, unit) => {
    expect(splitUnit(header)).toEqual({ name, unit });
  });
});

describe('meaningOf', () => {
  it.each([
    ['Time', 'clock'],
    ['Datum/Uhrzeit', 'stamp'],
    ['Batch No.', 'lot'],
    ['Chargen-Nr.', 'lot'],
    ['Artikelnummer', 'product'],
    ['Prüfmerkmal', 'characteristic'],
    ['Messmittel', 'gauge'],
    ['Messwert', 'value'],
    ['Stückzahl', 'quantity'],
    ['Coat weight', undefined],
  ])('knows %p as %p', (header, meaning) => {
    expect(meaningOf(foldName(header))).toBe(meaning);
  });
});

describe('labels of rows that are no readings', () => {
  it.each(['Average', 'Mittelwert:', 'Std. Dev.', 'Summe', 'Cpk', 'MAX'])('takes %p for totals', (label) => {
    expect(isSummaryLabel(label)).toBe(true);
  });
  it.each(['MASTER', 'Ref 2', 'CHK', 'Zero', 'Nullpunkt'])('takes %p for a check standard', (label) => {
    expect(isCheckStandardLabel(label)).toBe(true);
  });
  it.each(['L-24101', 'Refined 12', 'Masterbatch'])('takes %p for neither', (label) => {
    expect(isSummaryLabel(label) || isCheckStandardLabel(label)).toBe(false);
  });
});
