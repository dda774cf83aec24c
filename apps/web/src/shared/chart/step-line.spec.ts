import { lastStepWithin, stepsOf } from './step-line';

const lot = (startsAt: number, endsAt: number, value: number | null) => ({ startsAt, endsAt, value });

describe('stepsOf', () => {
  it('joins neighbouring lots of one value over the gap between them', () => {
    expect(stepsOf([lot(0, 10, 2), lot(12, 20, 2)])).toEqual([{ from: 0, to: 20, value: 2 }]);
  });

  it('begins anew when the product, and so the value, changes', () => {
    expect(stepsOf([lot(0, 10, 2), lot(10, 20, 3), lot(20, 30, 2)])).toEqual([
      { from: 0, to: 10, value: 2 },
      { from: 10, to: 20, value: 3 },
      { from: 20, to: 30, value: 2 },
    ]);
  });

  it('ends at a lot without the limit', () => {
    expect(stepsOf([lot(0, 10, 2), lot(10, 20, null), lot(20, 30, 2)])).toEqual([
      { from: 0, to: 10, value: 2 },
      { from: 20, to: 30, value: 2 },
    ]);
  });

  it('keeps the later end of overlapping lots and is empty for none', () => {
    expect(stepsOf([lot(0, 30, 1), lot(5, 10, 1)])).toEqual([{ from: 0, to: 30, value: 1 }]);
    expect(stepsOf([])).toEqual([]);
  });
});

describe('lastStepWithin', () => {
  const steps = stepsOf([lot(0, 10, 1), lot(10, 20, 2), lot(20, 30, 3)]);
  it('is the newest stretch that the range touches', () => {
    expect(lastStepWithin(steps, 5, 15)?.value).toBe(2);
    expect(lastStepWithin(steps, 40, 50)).toBeUndefined();
  });
});
