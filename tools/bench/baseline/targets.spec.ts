import type { SizeFigures } from './size-figures';
import { shareOfRange } from './curves';
import { judgeTargets } from './targets';

const size = (n: number, medians: Record<string, number>): SizeFigures => ({
  n,
  lambda: 1,
  routes: Object.fromEntries(Object.entries(medians).map(([route, median]) => [route, { seconds: [median], median }])),
});

describe('the targets of the baseline bench', () => {
  it('are met or missed by ratios within the run', () => {
    const targets = judgeTargets([
      size(10_000, { 'ours-fixed': 0.01, 'ours-gcv': 0.02, 'r-gcv': 0.02, 'scipy-fixed': 0.4 }),
      size(100_000, { 'ours-fixed': 0.1, 'ours-gcv': 0.1, 'r-gcv': 0.39 }),
      size(1_000_000, { 'ours-fixed': 1.6, 'ours-gcv': 1.7, 'r-gcv': 6.8 }),
    ]);
    expect(targets.map((target) => target.isMet)).toEqual([
      ...[true, false, true, false, true, false],
      ...[undefined, undefined, undefined],
    ]);
    expect(targets[3].value).toBeCloseTo(40, 9);
  });
  it('stay open where a size or a program is missing', () => {
    const targets = judgeTargets([size(10_000, { 'ours-fixed': 0.01, 'ours-gcv': 0.02 })]);
    expect(targets.map((target) => target.isMet)).toEqual(Array(9).fill(undefined));
  });
  it('of exactness are judged by the worst size, and missed where a value is no number', () => {
    const exact = { ...size(1000, {}), exactness: { fitted: 1e-12, edf: 1e-10, leverage: NaN } };
    const rough = { ...size(10_000, {}), exactness: { fitted: 2e-9, edf: 1e-13, leverage: 1e-10 } };
    const targets = judgeTargets([exact, rough]);
    expect(targets.slice(6).map((target) => target.isMet)).toEqual([false, true, false]);
  });
});

describe('the difference of two curves', () => {
  it('is a share of the second one’s range, and infinite where a value is no number', () => {
    expect(shareOfRange(Float64Array.of(1, 2.5, 5), Float64Array.of(1, 2, 5))).toBe(0.125);
    expect(shareOfRange(Float64Array.of(1, NaN, 5), Float64Array.of(1, 2, 5))).toBe(Infinity);
  });
});
