import { nearestAt } from './nearest';

describe('nearestAt', () => {
  const items = [{ at: 0 }, { at: 10 }, { at: 25 }];
  it('finds the nearest on either side, the earlier when equally near', () => {
    expect(nearestAt(items, 4)?.at).toBe(0);
    expect(nearestAt(items, 6)?.at).toBe(10);
    expect(nearestAt(items, 5)?.at).toBe(0);
  });
  it('stays at the ends and is undefined for nothing', () => {
    expect(nearestAt(items, -99)?.at).toBe(0);
    expect(nearestAt(items, 99)?.at).toBe(25);
    expect(nearestAt([], 1)).toBeUndefined();
  });
});
