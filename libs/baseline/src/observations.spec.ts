import { BaselineError } from './baseline-error';
import type { Observations } from './observations';
import { fitSmoothingSpline } from './spline/smoothing-spline';
import { observations } from './testing/series';

describe('observations that have no answer are typed errors', () => {
  const good = () => observations([0, 1, 2, 3], [1, 2, 0, 1]);
  const code = (change: (obs: Observations) => Partial<Observations>, lambda = 1) => {
    const obs = good();
    try {
      fitSmoothingSpline({ ...obs, ...change(obs) }, lambda);
    } catch (error) {
      if (error instanceof BaselineError) return error.code;
    }
    return 'none';
  };
  it.each<[string, (obs: Observations) => Partial<Observations>, string]>([
    ['a time that is NaN', () => ({ t: Float64Array.of(0, NaN, 2, 3) }), 'non-finite'],
    ['an infinite value', () => ({ y: Float64Array.of(0, Infinity, 2, 3) }), 'non-finite'],
    ['a weight that is NaN', () => ({ weight: Float64Array.of(1, NaN, 1, 1) }), 'non-finite'],
    ['a weight of zero', () => ({ weight: Float64Array.of(1, 0, 1, 1) }), 'bad-argument'],
    ['decreasing times', () => ({ t: Float64Array.of(0, 2, 1, 3) }), 'not-increasing'],
    ['too few values', () => ({ y: Float64Array.of(0, 2, 1) }), 'bad-argument'],
    ['a lot without an entry in pulls', () => ({ pulls: Uint8Array.of(1, 1, 1) }), 'bad-argument'],
    ['a negative lot', () => ({ lot: Int32Array.of(-1, 0, 1, 2) }), 'bad-argument'],
    ['two distinct times', () => ({ t: Float64Array.of(0, 0, 1, 1) }), 'insufficient-data'],
    ['two lots that pull', () => ({ pulls: Uint8Array.of(1, 0, 1, 0) }), 'insufficient-data'],
    ['sums that overflow', () => ({ y: Float64Array.of(1e200, 0, -1e200, 0) }), 'ill-posed'],
  ])('%s', (_name, change, expected) => {
    expect(code(change)).toBe(expected);
  });
  it.each([
    [NaN, 'non-finite'],
    [0, 'bad-argument'],
    [-1, 'bad-argument'],
  ])('lambda of %p', (lambda, expected) => {
    expect(code(() => ({}), lambda)).toBe(expected);
  });
  it('no points at all', () => {
    const none = new Float64Array(0);
    expect(() =>
      fitSmoothingSpline({ t: none, y: none, weight: none, lot: new Int32Array(0), pulls: new Uint8Array(0) }, 1),
    ).toThrow(BaselineError);
  });
  it('a time asked for that is not finite', () => {
    expect(() => fitSmoothingSpline(good(), 1).at(NaN)).toThrow(BaselineError);
  });
});
