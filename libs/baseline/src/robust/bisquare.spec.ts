import { BISQUARE_CONSTANT, bisquareFactor, medianAbsolute, NORMAL_PER_MEDIAN, startFactor } from './bisquare';

/** Integral of f times the standard normal density, by the trapezium rule. */
function normalMean(f: (z: number) => number): number {
  const h = 1e-3;
  let sum = 0;
  for (let k = -8000; k <= 8000; k++) sum += f(k * h) * Math.exp(-0.5 * k * k * h * h);
  return (sum * h) / Math.sqrt(2 * Math.PI);
}

describe('the factors of robust reweighting', () => {
  it('has 95 % efficiency at the normal distribution: (E psi prime)^2 / E psi^2, psi = z times the factor', () => {
    const psi = (z: number) => z * bisquareFactor(z, 1);
    const slope = (z: number) => (psi(z + 1e-5) - psi(z - 1e-5)) / 2e-5;
    expect(normalMean(slope) ** 2 / normalMean((z) => psi(z) ** 2)).toBeCloseTo(0.95, 3);
  });
  it('is 1 at the baseline, 0 from its constant on, and even', () => {
    expect(bisquareFactor(0, 2)).toBe(1);
    expect(bisquareFactor(BISQUARE_CONSTANT * 2, 2)).toBe(0);
    expect(bisquareFactor(-100, 2)).toBe(0);
    expect(bisquareFactor(-3, 2)).toBe(bisquareFactor(3, 2));
    expect(bisquareFactor(BISQUARE_CONSTANT / 2, 1)).toBeCloseTo(0.5625, 12);
  });
  it('starts from Huber weights that are 1 up to the median', () => {
    expect([0, 0.5, -1, 4].map((z) => startFactor(z, NORMAL_PER_MEDIAN))).toEqual([1, 1, 1, 0.25]);
  });
  it('puts half of a normal distribution inside its median absolute value', () => {
    expect(normalMean((z) => (Math.abs(z) * NORMAL_PER_MEDIAN <= 1 ? 1 : 0))).toBeCloseTo(0.5, 3);
  });
  it('takes the median of absolute values, and leaves the values as they were', () => {
    const x = Float64Array.of(-5, 1, 2);
    expect(medianAbsolute(x)).toBe(2);
    expect([...x]).toEqual([-5, 1, 2]);
    expect(medianAbsolute(Float64Array.of(4, -1, 3, 2))).toBe(2.5);
    expect(medianAbsolute(new Float64Array(0))).toBe(0);
  });
});
