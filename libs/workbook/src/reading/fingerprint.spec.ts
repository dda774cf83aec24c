import { fingerprintOf } from './fingerprint';

const row = (...texts: (string | null)[]): (string | null)[] => [null, ...texts];
const HEADER = row('Time', 'Lot', null, 'Dicke [µm]');

describe('fingerprintOf', () => {
  it('is 64 hexadecimal digits', () => {
    expect(fingerprintOf([HEADER])).toMatch(/^[0-9a-f]{64}$/);
  });
  it.each([
    ['case, blanks and punctuation', row(' TIME', 'lot.', null, 'dicke [ µm ]')],
    ['accents', row('Tíme', 'Lot', null, 'Dicke [μm]')],
    ['blank columns at the end', [...HEADER, null, '  ', undefined as unknown as null]],
  ])('takes no notice of %s', (_, texts) => {
    expect(fingerprintOf([texts])).toBe(fingerprintOf([HEADER]));
  });
  it.each([
    ['another order', [row('Lot', 'Time', null, 'Dicke [µm]')]],
    ['another unit', [row('Time', 'Lot', null, 'Dicke [mm]')]],
    ['a blank column less in between', [row('Time', 'Lot', 'Dicke [µm]')]],
    ['another text', [row('Time', 'Lot', null, 'Breite [µm]')]],
    ['a row of units', [HEADER, row(null, null, null, 'mm')]],
  ])('differs for %s', (_, lines) => {
    expect(fingerprintOf(lines)).not.toBe(fingerprintOf([HEADER]));
  });
  it('tells mPa and MPa apart', () => {
    expect(fingerprintOf([row('Druck [mPa]')])).not.toBe(fingerprintOf([row('Druck [MPa]')]));
  });
});
