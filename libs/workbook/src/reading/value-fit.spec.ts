import type { ChannelContext } from '../types';
import { betterFits, fits, specificationOf } from './value-fit';

const channel = (specifications: ChannelContext['specifications']): ChannelContext => ({
  id: 1,
  name: 'Thickness',
  aliases: [],
  unit: 'µm',
  specifications,
});
const film = channel([{ product: 'A', nominal: 16, lower: 15, upper: 17 }]);
const sample = (...values: number[]) => values.map((value) => ({ value, product: 'A' }));
const asIs = { unit: 'µm', isDeviation: false };

describe('fits', () => {
  // The specification is 2 µm wide, so that three widths beyond its limits are 9 and 23 µm.
  it.each([
    [[9, 9, 9], true],
    [[8.9, 8.9, 8.9], false],
    [[23, 23, 23], true],
    [[23.1, 23.1, 23.1], false],
    [[16, 16, 9999], true],
  ])('looks at the median: %p', (values, expected) => {
    expect(fits(sample(...values), film, asIs)).toBe(expected);
  });
  it('says nothing of fewer than three values, of no specification, and of units that do not convert', () => {
    expect(fits(sample(900, 900), film, asIs)).toBeNull();
    expect(fits(sample(900, 900, 900), channel(undefined), asIs)).toBeNull();
    expect(
      fits(sample(900, 900, 900), channel([{ product: 'A', nominal: null, lower: 1, upper: null }]), asIs),
    ).toBeNull();
    expect(fits(sample(900, 900, 900), film, { unit: 'g', isDeviation: false })).toBeNull();
  });
  it('takes twice the distance from nominal to the only limit for the width, or a fifth of nominal without one', () => {
    const oneSided = channel([{ product: 'A', nominal: 16, lower: null, upper: 17 }]);
    expect([fits(sample(9, 9, 9), oneSided, asIs), fits(sample(8, 8, 8), oneSided, asIs)]).toEqual([true, false]);
    const bare = channel([{ product: 'A', nominal: 10, lower: null, upper: null }]);
    expect([fits(sample(3, 3, 3), bare, asIs), fits(sample(2.9, 2.9, 2.9), bare, asIs)]).toEqual([true, false]);
  });
});

describe('betterFits', () => {
  it('finds the unit, or the deviation, in which values fit', () => {
    expect(betterFits(sample(0.0161, 0.0158, 0.016), film, asIs)).toContainEqual({ unit: 'mm', isDeviation: false });
    expect(betterFits(sample(0.1, -0.2, 0), film, asIs)).toEqual([{ unit: 'µm', isDeviation: true }]);
    expect(betterFits(sample(16, 16.1, 15.8), film, { unit: 'mm', isDeviation: false })).toEqual([asIs]);
  });
  it('finds none where values fit, and none where nothing makes them fit', () => {
    expect(betterFits(sample(16, 16.1, 15.8), film, asIs)).toEqual([]);
    expect(betterFits(sample(300, 310, 320), film, asIs)).toEqual([]);
  });
});

describe('specificationOf', () => {
  it('goes by the product, or takes the only one where the row names none', () => {
    expect(specificationOf(film, 'A')?.nominal).toBe(16);
    expect(specificationOf(film, 'B')).toBeUndefined();
    expect(specificationOf(film, null)?.nominal).toBe(16);
  });
});
