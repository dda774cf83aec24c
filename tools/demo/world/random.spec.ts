import { drawsFor } from './random';

const take = (count: number, draw: () => number): number[] => Array.from({ length: count }, () => draw());
const mean = (values: number[]): number => values.reduce((sum, value) => sum + value, 0) / values.length;

describe('seeded draws', () => {
  it('are the same for the same key and others for another', () => {
    const first = take(20, drawsFor('7/Coater 2').uniform);
    expect(take(20, drawsFor('7/Coater 2').uniform)).toEqual(first);
    expect(take(20, drawsFor('8/Coater 2').uniform)).not.toEqual(first);
  });

  it('are uniform on [0, 1): mean 1/2 and variance 1/12 within five standard errors', () => {
    const values = take(20000, drawsFor('uniform').uniform);
    expect(Math.min(...values)).toBeGreaterThanOrEqual(0);
    expect(Math.max(...values)).toBeLessThan(1);
    expect(Math.abs(mean(values) - 0.5)).toBeLessThan(5 * Math.sqrt(1 / 12 / 20000));
    expect(Math.abs(mean(values.map((value) => (value - 0.5) ** 2)) - 1 / 12)).toBeLessThan(
      5 * Math.sqrt(1 / 180 / 20000),
    );
  });

  it('are standard normal: mean 0, variance 1, fourth moment 3, no correlation of neighbours', () => {
    const values = take(20000, drawsFor('normal').normal);
    const root = Math.sqrt(20000);
    expect(Math.abs(mean(values))).toBeLessThan(5 / root);
    expect(Math.abs(mean(values.map((value) => value ** 2)) - 1)).toBeLessThan((5 * Math.SQRT2) / root);
    expect(Math.abs(mean(values.map((value) => value ** 4)) - 3)).toBeLessThan((5 * Math.sqrt(96)) / root);
    expect(Math.abs(mean(values.slice(1).map((value, index) => value * values[index])))).toBeLessThan(5 / root);
  });

  it('of neighbouring keys are not alike', () => {
    const firsts = take(5000, () => 0).map((_, index) => drawsFor(`1/Coater 2/Coat weight/${24001 + index}`).normal());
    expect(Math.abs(mean(firsts))).toBeLessThan(5 / Math.sqrt(5000));
    expect(Math.abs(mean(firsts.slice(1).map((value, index) => value * firsts[index])))).toBeLessThan(
      5 / Math.sqrt(5000),
    );
  });
});
