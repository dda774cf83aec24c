import type { SizeFigures } from './size-figures';

export interface Target {
  /** What is asked, in words. */
  text: string;
  /** The ratio measured; undefined where one of its parts was not. */
  ratio?: number;
  isMet?: boolean;
}

/** The ratios that the baseline lib promises, each against what this run measured. */
export function judgeTargets(sizes: SizeFigures[]): Target[] {
  const time = (n: number, route: string) => sizes.find((size) => size.n === n)?.routes[route]?.median;
  const ratio = (above?: number, below?: number) =>
    above === undefined || below === undefined ? undefined : above / below;
  const atLeast = (text: string, bound: number, value?: number): Target => ({
    text: `${text}: at least ${bound} ×`,
    ratio: value,
    isMet: value === undefined ? undefined : value >= bound,
  });
  const atMost = (text: string, bound: number, value?: number): Target => ({
    text: `${text}: at most ${bound} ×`,
    ratio: value,
    isMet: value === undefined ? undefined : value <= bound,
  });
  const againstR = (n: number, bound: number) =>
    atLeast(
      `${n.toLocaleString('en')} points, smoothness chosen by GCV, R's default knots against ours`,
      bound,
      ratio(time(n, 'r-gcv'), time(n, 'ours-gcv')),
    );
  const growth = (route: string, words: string) =>
    atMost(
      `1,000,000 against 100,000 points, ours with ${words}`,
      16,
      ratio(time(1_000_000, route), time(100_000, route)),
    );
  return [
    againstR(10_000, 1),
    againstR(100_000, 4),
    againstR(1_000_000, 4),
    atLeast(
      '10,000 points, lambda fixed, SciPy against ours',
      50,
      ratio(time(10_000, 'scipy-fixed'), time(10_000, 'ours-fixed')),
    ),
    growth('ours-fixed', 'lambda fixed'),
    growth('ours-gcv', 'smoothness chosen by GCV'),
  ];
}
