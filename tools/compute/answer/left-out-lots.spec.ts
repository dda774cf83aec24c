import { csvOf, fit, type PlainAnswer } from '../testing/run-in-process';
import { largestMiss, rangeOf, referenceFile } from '../testing/reference-file';

interface Reference {
  t: number[];
  y: number[];
  w: number[];
  lot: string[];
  fits: {
    name: string;
    options: string[];
    edf: number;
    sigma2: number;
    fitted: number[];
    standardError: number[];
    leverage: number[];
    deletedResidual: number[];
    lots: string[];
    residual: number[];
    variance: (number | null)[];
    score: (number | null)[];
    at?: number[];
    value?: number[];
    valueError?: number[];
  }[];
}

/** R solves dense systems, which leaves it ten digits. */
const TOLERANCE = 1e-8;
const reference = referenceFile<Reference>('r-leave-lot-out.json');
const { t, y, w, lot } = reference;

describe.each(reference.fits)('$name with interleaved lots, ties and weights of 0', (wanted) => {
  let answer: PlainAnswer;
  beforeAll(async () => {
    answer = await fit(wanted.options, csvOf({ t, y, w, lot }));
  });
  const size = rangeOf(y);

  it('has the degrees of freedom and the variance that R works out', () => {
    expect(answer.method).toBe(wanted.name);
    expect(Math.abs(answer.smoothness.edf - wanted.edf)).toBeLessThan(TOLERANCE * wanted.edf);
    expect(Math.abs(answer.sigma2! - wanted.sigma2)).toBeLessThan(TOLERANCE * wanted.sigma2);
  });

  it('has its fitted values, standard errors, leverages and deleted residuals, row by row', () => {
    expect(answer.t).toEqual(t);
    expect(largestMiss(answer.fitted, wanted.fitted, size)).toBeLessThan(TOLERANCE);
    expect(largestMiss(answer.standardError, wanted.standardError, Math.sqrt(wanted.sigma2))).toBeLessThan(TOLERANCE);
    expect(largestMiss(answer.leverage, wanted.leverage, 1)).toBeLessThan(TOLERANCE);
    expect(largestMiss(answer.deletedResidual, wanted.deletedResidual, size)).toBeLessThan(TOLERANCE);
  });

  it('has its lots, by first time, with residual, variance and score', () => {
    expect(answer.lots.map((one) => one.lot)).toEqual(wanted.lots);
    expect(
      largestMiss(
        answer.lots.map((one) => one.residual),
        wanted.residual,
        size,
      ),
    ).toBeLessThan(TOLERANCE);
    wanted.lots.forEach((_, j) => {
      const { variance, score } = answer.lots[j];
      if (wanted.variance[j] === null) expect([variance, score]).toEqual([null, null]);
      else {
        expect(Math.abs(variance! / wanted.variance[j] - 1)).toBeLessThan(TOLERANCE);
        expect(Math.abs(score! - wanted.score[j]!)).toBeLessThan(10 * TOLERANCE);
      }
    });
  });

  it('is projected as R projects it, where it may be', () => {
    const { projection } = answer;
    expect(projection.map((point) => point.t)).toEqual(wanted.at ?? []);
    expect(
      largestMiss(
        projection.map((point) => point.value),
        wanted.value ?? [],
        size,
      ),
    ).toBeLessThan(TOLERANCE);
    expect(
      largestMiss(
        projection.map((point) => point.standardError),
        wanted.valueError ?? [],
        size,
      ),
    ).toBeLessThan(TOLERANCE);
  });
});
