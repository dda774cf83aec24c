import { positionOf } from './positions';

describe('positionOf', () => {
  it.each([
    ['Reading 3', 'reading', 'Reading', '3'],
    ['Messwert_04', 'reading', 'Messwert', '4'],
    ['Cavity 8', 'place', 'Cavity', '8'],
    ['Pos. 12', 'place', 'Pos', '12'],
    ['x1', 'place', 'x', '1'],
    ['#2', 'place', '', '2'],
    ['5', 'place', '', '5'],
    ['Coat weight (3)', 'other', 'Coat weight', '3'],
  ])('takes %p apart', (text, kind, of, position) => {
    expect(positionOf(text)).toEqual({ kind, of, position });
  });
  it.each(['Reading', '', '1234', '1.5', 'Lot 24117', '12,3', 'g/m2 x'])('finds no position in %p', (text) => {
    expect(positionOf(text)).toBeNull();
  });
});
