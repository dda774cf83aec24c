import { worstDifference } from '../testing/reference';
import { observations, wavySeries } from '../testing/series';
import { fitNaturalSpline } from './fit-regression';
import { mostKnots, placeKnots, type KnotPlacement } from './place-knots';
import { quantileOfSorted } from './quantile';
import { spaceKnots } from './space-knots';

const PLACEMENTS: KnotPlacement[] = ['even', 'quantile', 'variability'];
const gapsOf = (knots: Float64Array, from: number, to: number) =>
  [...knots, to].map((knot, j) => knot - (j > 0 ? knots[j - 1] : from));

describe('placing knots', () => {
  const obs = wavySeries(60, 31);
  const [from, to] = [obs.t[0], obs.t[59]];

  it('evenly means equal steps', () => {
    for (const gap of gapsOf(placeKnots(obs, 4, 'even'), from, to)) expect(gap).toBeCloseTo((to - from) / 5, 12);
  });

  it("by quantiles means R's type 7 of the distinct times of points that pull", () => {
    // quantile(c(1, 2, 4, 8, 16), 1:3 / 4, type = 7) in R: h = 1, 2, 3 are the inner times themselves.
    const five = observations(
      [1, 1, 2, 4, 4, 4, 6, 8, 16],
      new Array(9).fill(0),
      [0, 0, 0, 0, 0, 0, 1, 0, 0],
      undefined,
      [1],
    );
    expect([...placeKnots(five, 3, 'quantile')]).toEqual([2, 4, 8]);
    expect([...placeKnots(five, 1, 'quantile')]).toEqual([4]);
    // h = 4/3 and 8/3: 2 + 1/3 * 2 and 4 + 2/3 * 4.
    expect(worstDifference(placeKnots(five, 2, 'quantile'), [8 / 3, 20 / 3])).toBeLessThan(1e-14);
    expect(quantileOfSorted(Float64Array.of(3), 0.7)).toBe(3);
    expect(quantileOfSorted(Float64Array.of(3, 5), 1)).toBe(5);
  });

  it('by variability puts more knots where the residuals vary more', () => {
    const y = obs.t.map((t, i) => (i < 30 ? 0 : 3) * Math.sin(4 * t) + 0.01 * ((i * 7) % 5));
    const knots = placeKnots({ ...obs, y }, 9, 'variability');
    expect(knots.filter((knot) => knot > obs.t[30]).length).toBeGreaterThanOrEqual(6);
    expect(knots.filter((knot) => knot < obs.t[30]).length).toBeGreaterThanOrEqual(2);
  });

  it('by variability leaves every span between a fifth and twice an equal share of the points, and without residuals is by quantiles', () => {
    const t = Array.from({ length: 400 }, (_, i) => i);
    const spike = observations(
      t,
      t.map((i) => (i >= 100 && i < 110 ? 1e3 * (i % 2) : 0)),
    );
    const knots = placeKnots(spike, 9, 'variability');
    for (const gap of gapsOf(knots, 0, 399)) {
      expect(gap).toBeGreaterThan(40 / 5 - 1);
      expect(gap).toBeLessThan(80 + 1);
    }
    const line = observations(
      t,
      t.map(() => 7),
    );
    expect(worstDifference(placeKnots(line, 9, 'variability'), placeKnots(line, 9, 'quantile'))).toBeLessThan(1e-9);
  });

  it.each(PLACEMENTS)('%s: the fits take them, on any scale, and the same points give the same bits', (placement) => {
    for (const count of [0, 1, 5, 12]) {
      const knots = placeKnots(obs, count, placement);
      expect(fitNaturalSpline(obs, knots).edf).toBe(count + 2);
      expect([...placeKnots(obs, count, placement)]).toEqual([...knots]);
      const scaled = { ...obs, t: obs.t.map((t) => 1.7e9 + 3600 * t), y: obs.y.map((y) => 1e6 * y) };
      const back = placeKnots(scaled, count, placement).map((knot) => (knot - 1.7e9) / 3600);
      expect(worstDifference(back, knots)).toBeLessThan(1e-8);
    }
  });

  it.each(PLACEMENTS)('%s: with a shortest period the knots and ends are half of it apart', (placement) => {
    const y = obs.t.map((t, i) => (i < 30 ? 0 : 3) * Math.sin(4 * t));
    const period = (to - from) / 4;
    expect(mostKnots(to - from, period)).toBe(7);
    for (let count = 0; count <= 7; count++) {
      const knots = placeKnots({ ...obs, y }, count, placement, { minimumSpacing: period / 2 });
      expect(knots).toHaveLength(count);
      for (const gap of gapsOf(knots, from, to)) expect(gap).toBeGreaterThan((period / 2) * (1 - 1e-12));
    }
    expect(() => placeKnots(obs, 8, placement, { minimumSpacing: period / 2 })).toThrow(
      expect.objectContaining({ code: 'bad-argument', message: expect.stringContaining('7 fit') }),
    );
  });

  it('the number that fits is floor(2 window / T - 1), never negative', () => {
    expect(mostKnots(30 * 86400, 3 * 86400)).toBe(19);
    expect(mostKnots(0.3, 0.2)).toBe(2);
    expect(mostKnots(10, 10.1)).toBe(0);
    expect(mostKnots(10, 1000)).toBe(0);
  });

  it('moves knots by the least squares that keeps them apart', () => {
    expect([...spaceKnots(Float64Array.of(2, 5), 1, 10)]).toEqual([2, 5]);
    expect([...spaceKnots(Float64Array.of(4, 5), 2, 10)]).toEqual([3.5, 5.5]);
    expect([...spaceKnots(Float64Array.of(0.5, 1, 9.9), 2, 10)]).toEqual([2, 4, 8]);
    // Against all placements on a grid of tenths.
    const wanted = [2.3, 2.9, 3.4];
    const best = { cost: Infinity, at: [0, 0, 0] };
    for (let a = 15; a <= 85; a++) {
      for (let b = a + 15; b <= 85; b++) {
        for (let c = b + 15; c <= 85; c++) {
          const at = [a / 10, b / 10, c / 10];
          const cost = at.reduce((sum, v, j) => sum + (v - wanted[j]) ** 2, 0);
          if (cost < best.cost) Object.assign(best, { cost, at });
        }
      }
    }
    expect(worstDifference(spaceKnots(Float64Array.from(wanted), 1.5, 10), best.at)).toBeLessThan(0.1);
  });

  it.each([
    ['a negative count', -1, undefined, 'bad-argument'],
    ['half a knot', 0.5, undefined, 'bad-argument'],
    ['NaN knots', NaN, undefined, 'bad-argument'],
    ['a spacing of 0', 1, 0, 'bad-argument'],
    ['a spacing of NaN', 1, NaN, 'non-finite'],
  ])('refuses %s', (_name, count, minimumSpacing, code) => {
    for (const placement of PLACEMENTS) {
      expect(() => placeKnots(obs, count, placement, { minimumSpacing })).toThrow(expect.objectContaining({ code }));
    }
  });
});
