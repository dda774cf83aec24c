import type { AllocationFigures } from './allocation';
import type { SizeFigures } from './size-figures';

export interface Target {
  /** What is asked, in words. */
  text: string;
  /** What was measured; undefined where a part of it was not. */
  value?: number;
  isRatio: boolean;
  isMet?: boolean;
}

/** What the baseline lib promises, each against what this run measured. */
export function judgeTargets(sizes: SizeFigures[], allocated: AllocationFigures[] = []): Target[] {
  const time = (n: number, route: string) => sizes.find((size) => size.n === n)?.routes[route]?.median;
  const ratio = (above?: number, below?: number) =>
    above === undefined || below === undefined ? undefined : above / below;
  const atLeast = (text: string, bound: number, value?: number): Target => ({
    text: `${text}: at least ${bound} ×`,
    value,
    isRatio: true,
    isMet: value === undefined ? undefined : value >= bound,
  });
  const againstR = (n: number, bound: number) =>
    atLeast(
      `${n.toLocaleString('en')} points, smoothness chosen by GCV, R's default knots against ours`,
      bound,
      ratio(time(n, 'r-gcv'), time(n, 'ours-gcv')),
    );
  const growth = (route: string, words: string): Target => {
    const value = ratio(time(1_000_000, route), time(100_000, route));
    return {
      text: `1,000,000 against 100,000 points, ours with ${words}: at most 16 ×`,
      value,
      isRatio: true,
      isMet: value === undefined ? undefined : value <= 16,
    };
  };
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
    exactTo(sizes, 'fitted', 'fitted values, of their range', 1e-9),
    exactTo(sizes, 'edf', 'degrees of freedom, relative', 1e-9),
    exactTo(sizes, 'leverage', 'leverages, relative', 1e-8),
    ...allocated.map(reusesBuffers),
  ];
}

/** What is left to a candidate: the few numbers that its evaluation answers with. */
const CANDIDATE_BYTES = 512;

function reusesBuffers({ what, bytesPerCandidate, collections }: AllocationFigures): Target {
  return {
    text: `Bytes allocated per candidate of lambda, ${what}: at most ${CANDIDATE_BYTES}`,
    value: bytesPerCandidate,
    isRatio: false,
    isMet: bytesPerCandidate <= CANDIDATE_BYTES && collections === 0,
  };
}

/** The worst over all sizes that have a reference; NaN meets nothing. */
function exactTo(sizes: SizeFigures[], figure: 'fitted' | 'edf' | 'leverage', words: string, bound: number): Target {
  const values = sizes.flatMap(({ exactness }) => (exactness ? [exactness[figure]] : []));
  const value = values.length > 0 ? Math.max(...values) : undefined;
  return {
    text: `Against quadruple precision, ${words}: at most ${bound.toExponential(0)}`,
    value,
    isRatio: false,
    isMet: value === undefined ? undefined : value <= bound,
  };
}
