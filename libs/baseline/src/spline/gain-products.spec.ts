import { Matrix } from 'ml-matrix';
import { prepareSeries } from '../prepared-series';
import { filterForward } from './filter-passes';
import { GainProducts } from './gain-products';
import { backwardGain, STATE_SIZE } from './information-state';
import { wavySeries } from '../testing/series';

describe('products of gains over any range', () => {
  it.each([3, 8, 13, 32, 37])('of %p points are those of the gains one after another', (n) => {
    const series = prepareSeries(wavySeries(n, 71));
    const forward = new Float64Array(STATE_SIZE * n);
    filterForward(series.gap, series.pull, series.r, 500, forward);
    const gains = new GainProducts(n);
    gains.fill(series, 500, forward);
    const out = new Float64Array(4);
    for (let from = 0; from < n; from++) {
      let expected = Matrix.eye(2);
      for (let to = from; to < n; to++) {
        gains.product(from, to, out);
        expected
          .to1DArray()
          .forEach((v, i) => expect(Math.abs(out[i] - v)).toBeLessThan(1e-12 * Math.max(1, Math.abs(v))));
        backwardGain(forward, STATE_SIZE * to, series.pull[to], series.gap[to], 500, out, 0);
        expected = expected.mmul(Matrix.from1DArray(2, 2, out));
      }
    }
  });
  it('are written afresh for another penalty', () => {
    const series = prepareSeries(wavySeries(10, 72));
    const forward = new Float64Array(STATE_SIZE * 10);
    const [used, fresh] = [new GainProducts(10), new GainProducts(10)];
    const [a, b] = [new Float64Array(4), new Float64Array(4)];
    filterForward(series.gap, series.pull, series.r, 3, forward);
    used.fill(series, 3, forward);
    filterForward(series.gap, series.pull, series.r, 4000, forward);
    used.fill(series, 4000, forward);
    fresh.fill(series, 4000, forward);
    used.product(1, 8, a);
    fresh.product(1, 8, b);
    expect(a).toEqual(b);
  });
});
