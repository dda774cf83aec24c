import fc from 'fast-check';
import { relateUnits, unitsLike } from './units';

function convert(value: number, from: string, to: string): number {
  const relation = relateUnits(from, to);
  if (relation.kind !== 'convertible') throw new Error(relation.kind);
  return relation.conversion.convert(value);
}

describe('relateUnits', () => {
  // Exact by definition: the international inch, pound and standard gravity (1959 agreement; 3rd CGPM 1901), the bar, the
  // poise and the stokes (BIPM, SI Brochure, 9th ed.), the degree Fahrenheit (NIST SP 811, B.8).
  it.each([
    [12.3, 'mm', 'µm', 12300],
    [12.3, 'mm', 'um', 12300],
    [0.1, 'mm', 'μm', 100],
    [1.1, 'm', 'mm', 1100],
    [16.4, 'µm', 'mm', 0.0164],
    [0.6, 'mil', 'µm', 15.24],
    [1, 'inch', 'mm', 25.4],
    [2, '"', 'cm', 5.08],
    [12, 'g', 'kg', 0.012],
    [1, 'lb', 'g', 453.59237],
    [1, 'oz', 'g', 28.349523125],
    [2.5, 'bar', 'kPa', 250],
    [1, 'N', 'kN', 0.001],
    [1, 'kgf', 'N', 9.80665],
    [350, 'cP', 'mPa·s', 350],
    [0.35, 'Pa s', 'mPa·s', 350],
    [12, 'g/m²', 'kg/m2', 0.012],
    [1.25, 'g/cm³', 'kg/m³', 1250],
    [1, 'g/l', 'kg/m³', 1],
    [50, '°F', '°C', 10],
    [212, 'deg F', '°C', 100],
    [212, 'F', '°C', 100],
    [-40, '°C', '°F', -40],
    [25, '°C', 'K', 298.15],
    [2, '%', 'ppm', 20000],
    [0.02, '1', '%', 2],
    [60, 'rpm', 'Hz', 1],
    [1, 'cSt', 'mm²/s', 1],
    [6, 'm/min', 'mm/s', 100],
    [1, 'Nm', 'N·cm', 100],
    [5, 'MM', 'µm', 5000],
  ])('reads %p %s as %s', (value, from, to, expected) => {
    const relation = relateUnits(from, to);
    if (relation.kind === 'same') expect(value).toBe(expected);
    else expect(convert(value, from, to)).toBe(expected);
  });
  // NIST SP 811, appendix B.8, printed to seven digits; recalled from memory.
  it.each([
    [1, 'psi', 'kPa', 6.894757],
    [1, 'mmHg', 'Pa', 133.3224],
    [1, 'Torr', 'Pa', 133.3224],
    [1, 'inHg', 'kPa', 3.386389],
    [1, 'lbf', 'N', 4.448222],
    [1, 'lb/ft³', 'kg/m³', 16.01846],
  ])('reads %p %s as %s to the digits that NIST prints', (value, from, to, printed) => {
    expect(Number(convert(value, from, to).toPrecision(7))).toBe(printed);
  });
  it.each(['1', '1/1', '1·1'])('takes "%s" for a plain number, of no unit', (unit) => {
    expect(relateUnits(unit, 'µm').kind).toBe('other-quantity');
    expect(relateUnits(unit, '').kind).toBe('unknown');
  });
  it('takes the pound-force per square inch from its definition', () => {
    // 0.45359237 kg · 9.80665 m/s² / (0.0254 m)², by hand in integers: 4.4482216152605 / 0.00064516.
    expect(convert(1, 'psi', 'Pa')).toBeCloseTo(4.4482216152605 / 0.00064516, 9);
  });
  it.each([
    ['µm', 'um'],
    ['g/m²', 'g/m2'],
    ['C', '°C'],
    ['cP', 'mPa·s'],
    ['kg/m³', 'g/l'],
    ['U/min', 'rpm'],
  ])('finds nothing to convert between %s and %s', (from, to) => {
    expect(relateUnits(from, to)).toEqual({ kind: 'same' });
  });
  it.each([
    ['mm', 'g'],
    ['g/m²', 'kg/m³'],
    ['°C', 'bar'],
    ['N', 'N·m'],
    ['%', 'mm'],
  ])('finds %s and %s of different quantities', (from, to) => {
    expect(relateUnits(from, to)).toEqual({ kind: 'other-quantity' });
  });
  it.each([
    ['furlong', 'mm'],
    ['mm', 'HRC'],
    ['HV', 'V'],
    ['pH', '%'],
    ['', 'mm'],
    ['mm', ''],
    ['mm/s/s', 'm'],
  ])('does not know how %p and %p relate', (from, to) => {
    expect(relateUnits(from, to)).toEqual({ kind: 'unknown' });
  });
  it('says the factor, or an example where the zeros differ', () => {
    const said = (from: string, to: string): string => {
      const relation = relateUnits(from, to);
      return relation.kind === 'convertible' ? relation.conversion.said : relation.kind;
    };
    expect(said('mm', 'µm')).toBe('× 1000');
    expect(said('µm', 'mm')).toBe('÷ 1000');
    expect(said('mil', 'µm')).toBe('× 25.4');
    expect(said('°F', '°C')).toBe('for example, 100 °F is 37.77777778 °C');
  });
  it('moves the decimal point of any decimal number exactly', () => {
    const decimal = fc.tuple(fc.integer({ min: -9_999_999, max: 9_999_999 }), fc.integer({ min: 0, max: 6 }));
    fc.assert(
      fc.property(decimal, ([digits, places]) => {
        const value = Number(`${digits}e-${places}`);
        expect(convert(value, 'mm', 'µm')).toBe(Number(`${digits}e${3 - places}`));
        expect(convert(value, 'g', 'kg')).toBe(Number(`${digits}e${-3 - places}`));
      }),
    );
  });
  it('lists the usual units of the same quantity', () => {
    expect(unitsLike('µm')).toEqual(['nm', 'mm', 'cm', 'dm', 'm', 'km', 'mil', 'in', 'ft']);
    expect(unitsLike('HRC')).toEqual([]);
  });
});
