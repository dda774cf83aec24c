import { clampRange, isSameRange, panRange, rangeForKey, SHORTEST_SPAN_MS, zoomRange } from './range';

const HOUR = 3_600_000;
const bounds = { from: 0, to: 100 * HOUR };

describe('clampRange', () => {
  it('moves a range that hangs over an end back inside at the same length', () => {
    expect(clampRange({ from: 95 * HOUR, to: 105 * HOUR }, bounds)).toEqual({ from: 90 * HOUR, to: 100 * HOUR });
    expect(clampRange({ from: -5 * HOUR, to: 5 * HOUR }, bounds)).toEqual({ from: 0, to: 10 * HOUR });
  });

  it('never answers more than the bounds or less than a minute', () => {
    expect(clampRange({ from: -HOUR, to: 900 * HOUR }, bounds)).toEqual(bounds);
    const shortest = clampRange({ from: HOUR, to: HOUR + 2 }, bounds);
    expect(shortest.to - shortest.from).toBe(SHORTEST_SPAN_MS);
  });

  it('lets bounds shorter than a minute be the whole', () => {
    expect(clampRange({ from: 0, to: HOUR }, { from: 10, to: 20 })).toEqual({ from: 10, to: 20 });
  });
});

describe('panRange', () => {
  it('moves by a share of the length and stops at the bounds', () => {
    expect(panRange({ from: 10 * HOUR, to: 20 * HOUR }, 0.5, bounds)).toEqual({ from: 15 * HOUR, to: 25 * HOUR });
    expect(panRange({ from: 10 * HOUR, to: 20 * HOUR }, -5, bounds)).toEqual({ from: 0, to: 10 * HOUR });
  });
});

describe('zoomRange', () => {
  it('keeps the anchor at its place on the screen', () => {
    const zoomed = zoomRange({ from: 20 * HOUR, to: 60 * HOUR }, 0.5, 30 * HOUR, bounds);
    expect((30 * HOUR - zoomed.from) / (zoomed.to - zoomed.from)).toBeCloseTo(0.25, 12);
    expect(zoomed.to - zoomed.from).toBe(20 * HOUR);
  });

  it('stops at the whole when zooming out', () => {
    expect(zoomRange({ from: 20 * HOUR, to: 60 * HOUR }, 10, 30 * HOUR, bounds)).toEqual(bounds);
  });
});

describe('rangeForKey', () => {
  const range = { from: 40 * HOUR, to: 50 * HOUR };
  const home = { from: 86 * HOUR, to: 100 * HOUR };

  it('pans a fifth with the arrows', () => {
    expect(rangeForKey('ArrowLeft', range, bounds, home)).toEqual({ from: 38 * HOUR, to: 48 * HOUR });
    expect(rangeForKey('ArrowRight', range, bounds, home)).toEqual({ from: 42 * HOUR, to: 52 * HOUR });
  });

  it('undoes a zoom in by a zoom out', () => {
    const closer = rangeForKey('+', range, bounds, home)!;
    expect(closer.to - closer.from).toBeLessThan(range.to - range.from);
    expect(isSameRange(rangeForKey('-', closer, bounds, home)!, range)).toBe(true);
  });

  it('goes home with 0 and leaves other keys alone', () => {
    expect(rangeForKey('0', range, bounds, home)).toEqual(home);
    expect(rangeForKey('Tab', range, bounds, home)).toBeUndefined();
  });
});
