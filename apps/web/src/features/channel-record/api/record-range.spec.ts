import { columnsFor, parseRange, withMargin } from './record-range';

describe('parseRange', () => {
  it('reads two instants in order', () => {
    expect(parseRange('1000', '2000')).toEqual({ from: 1000, to: 2000 });
  });
  it('is null for anything else', () => {
    expect(parseRange(null, '2000')).toBeNull();
    expect(parseRange('2000', '1000')).toBeNull();
    expect(parseRange('a', '1000')).toBeNull();
    expect(parseRange('-5', '1000')).toBeNull();
  });
});

describe('withMargin', () => {
  it('doubles the range about its middle', () => {
    expect(withMargin({ from: 100, to: 200 })).toEqual({ from: 50, to: 250 });
  });
});

describe('columnsFor', () => {
  it('goes in steps between a floor and a cap', () => {
    expect(columnsFor(390)).toBe(400);
    expect(columnsFor(801)).toBe(1000);
    expect(columnsFor(5000)).toBe(1000);
  });
});
