import { ControlError } from './control-error';
import { pooledVariance } from './pooled-variance';
import { pseudoResidualVariance } from './pseudo-residual-variance';

// NIST Dataplot, CCXBAR.DAT: thickness of silicon wafers, 20 subgroups of 5. numpy gives 0.9396541917109719 for the pooled standard deviation.
// prettier-ignore
const WAFERS = [
  [24.5, 22.4, 23.7, 23.5, 23.8], [23.6, 23.8, 22.5, 22.5, 23.0], [25.0, 22.6, 23.7, 22.7, 22.9], [24.3, 22.6, 23.2, 23.3, 23.2],
  [23.8, 24.9, 23.6, 22.5, 24.8], [24.4, 22.8, 22.6, 22.9, 23.1], [23.7, 22.9, 23.3, 23.2, 23.9], [23.4, 23.7, 23.5, 23.4, 23.3],
  [24.9, 23.9, 23.1, 24.5, 23.7], [23.0, 23.8, 22.5, 23.6, 23.4], [24.8, 24.0, 24.1, 23.9, 23.9], [24.4, 23.7, 23.2, 23.0, 23.8],
  [24.9, 24.0, 22.2, 23.2, 22.3], [24.3, 23.6, 22.4, 23.2, 23.2], [23.4, 23.7, 24.0, 22.5, 24.0], [25.3, 24.9, 23.1, 22.6, 23.7],
  [24.1, 23.6, 23.8, 24.0, 23.3], [25.9, 25.4, 22.4, 24.3, 24.3], [26.4, 24.4, 22.1, 26.4, 23.2], [27.8, 22.7, 25.0, 25.9, 25.4],
];

const meanOf = (values: number[]) => values.reduce((sum, x) => sum + x, 0) / values.length;
const squaresOf = (values: number[]) => values.reduce((sum, x) => sum + (x - meanOf(values)) ** 2, 0);

describe('pooled variance', () => {
  it('is the mean square within groups of a one-way table', () => {
    const groups = WAFERS.map((values) => ({ count: values.length, sumSquares: squaresOf(values) }));
    expect(Math.sqrt(pooledVariance(groups).variance)).toBeCloseTo(0.9396541917109719, 12);
    expect(pooledVariance(groups).terms).toBe(80);
  });

  it('says that single values tell nothing, and refuses NaN and negative squares', () => {
    expect(pooledVariance([{ count: 1, sumSquares: 0 }])).toEqual({ variance: 0, wasNegative: false, terms: 0 });
    expect(() => pooledVariance([{ count: 2, sumSquares: NaN }])).toThrow(ControlError);
    expect(() => pooledVariance([{ count: 2, sumSquares: -1 }])).toThrow(ControlError);
    expect(() => pooledVariance([{ count: 0, sumSquares: 0 }])).toThrow(ControlError);
  });
});

describe('variance beside a slow movement', () => {
  const at = [0, 1, 3, 4, 10, 11, 12];
  const none = at.map(() => 0);

  it('is 0 on a straight line, however uneven the times', () => {
    const line = at.map((t) => 5 + 0.25 * t);
    expect(pseudoResidualVariance(at, line, none).variance).toBe(0);
  });

  it('is the second difference squared over six on even times, as by hand', () => {
    expect(pseudoResidualVariance([0, 1, 2], [0, 3, 0], [0, 0, 0])).toEqual({
      variance: 6,
      wasNegative: false,
      terms: 1,
    });
  });

  it('takes known variances off, and says when nothing is left', () => {
    // E of the known part with v = 1 is a² + b² + 1 = 1.5: one less in the estimate.
    expect(pseudoResidualVariance([0, 1, 2], [0, 3, 0], [1, 1, 1]).variance).toBeCloseTo(5, 12);
    expect(pseudoResidualVariance([0, 1, 2], [0, 3, 0], [9, 9, 9])).toEqual({
      variance: 0,
      wasNegative: true,
      terms: 1,
    });
  });

  it('hardly sees a sinusoid of 22 spacings with an amplitude of 2.5 standard deviations', () => {
    const n = 2200;
    const times = Array.from({ length: n }, (_, i) => i);
    const wave = times.map((t) => 2.5 * Math.sin((2 * Math.PI * t) / 22));
    // Gain 1 - cos(2 pi / 22) = 0.0405, mean square 3.125, divisor 1.5: 0.00342.
    const { variance } = pseudoResidualVariance(times, wave, times.map(() => 0)); // prettier-ignore
    expect(variance).toBeCloseTo((3.125 * (1 - Math.cos((2 * Math.PI) / 22)) ** 2) / 1.5, 5);
    expect(variance).toBeLessThan(0.004);
  });

  it('passes over equal times, says that two values tell nothing, refuses NaN and sizes that do not match', () => {
    expect(pseudoResidualVariance([0, 0, 0, 1], [1, 5, 9, 2], [0, 0, 0, 0]).terms).toBe(0);
    expect(pseudoResidualVariance([0, 1], [1, 2], [0, 0])).toEqual({ variance: 0, wasNegative: false, terms: 0 });
    expect(() => pseudoResidualVariance([0, 1, 2], [1, NaN, 2], [0, 0, 0])).toThrow(ControlError);
    expect(() => pseudoResidualVariance([0, 1, 2], [1, 2], [0, 0])).toThrow(ControlError);
  });
});
