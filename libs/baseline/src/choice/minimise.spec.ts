import { minimiseInside } from './minimise';

describe("Brent's minimum", () => {
  it('is found where calculus puts it', () => {
    expect(minimiseInside((x) => (x - 2) ** 2, 0, 5, 1e-8).x).toBeCloseTo(2, 7);
    expect(minimiseInside((x) => Math.cos(x), 1, 6, 1e-7).x).toBeCloseTo(Math.PI, 6);
    expect(minimiseInside((x) => Math.exp(x) - 2 * x, -3, 3, 1e-7).x).toBeCloseTo(Math.LN2, 6);
  });
  it('approaches an end when the function is monotone', () => {
    expect(minimiseInside((x) => x, 1, 2, 1e-4).x).toBeLessThan(1.001);
    expect(minimiseInside((x) => -x, 1, 2, 1e-4).x).toBeGreaterThan(1.999);
  });
  it('copes with plateaus and infinities, and says when it gave up', () => {
    expect(minimiseInside(() => 1, 0, 1, 1e-6).hasConverged).toBe(true);
    const wall = minimiseInside((x) => (x < 0.5 ? Infinity : x), 0, 1, 1e-6);
    expect(wall.x).toBeGreaterThanOrEqual(0.5);
    expect(wall.x).toBeLessThan(0.51);
    expect(minimiseInside((x) => (x - 2) ** 2, 0, 5, 1e-12, 4).hasConverged).toBe(false);
  });
});
