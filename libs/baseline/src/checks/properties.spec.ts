import fc from 'fast-check';
import type { BaselineFit } from '../baseline-fit';
import { fitBaseline } from '../fit-baseline';
import type { Observations } from '../observations';
import { everyNumber, inOtherUnits, isConstant, METHODS, series } from './methods';
import { worstDifference } from '../testing/reference';

const RUNS = { numRuns: 30, seed: 12 };
const scaled = (list: ArrayLike<number>, factor: number) => Array.from(list, (v) => v * factor);
/** Residuals and variances of the lots that the others determine well. */
function wellScored(fit: BaselineFit): { residual: number[]; variance: number[] } {
  const { residual, variance } = fit.scoreLots();
  const kept = [...variance.keys()].filter((lot) => variance[lot] < 1e3);
  return { residual: kept.map((lot) => residual[lot]), variance: kept.map((lot) => variance[lot]) };
}

describe.each(METHODS)('a %s', (_name, specOf) => {
  it('moves with the values: y -> a + b y, weights / b^2', () => {
    const numbers = fc.tuple(fc.double({ min: -1e3, max: 1e3, noNaN: true }), fc.constantFrom(-2.5, 1e-3, 1, 700));
    fc.assert(
      fc.property(series, numbers, (obs, [a, b]) => {
        const spec = specOf(obs);
        const fit = fitBaseline(obs, spec);
        const y = obs.y.map((v) => a + b * v);
        const weight = obs.weight.map((w) => w / (b * b));
        const other = fitBaseline({ ...obs, y, weight }, inOtherUnits(spec, 1, 0, 1 / (b * b)));
        const tolerance = 1e-9 * Math.max(1, Math.abs(a / b));
        expect(
          worstDifference(
            scaled(
              other.fitted.map((g) => g - a),
              1 / b,
            ),
            fit.fitted,
          ),
        ).toBeLessThan(tolerance);
        expect(worstDifference(scaled(other.slope, 1 / b), fit.slope)).toBeLessThan(10 * tolerance);
        expect(worstDifference(scaled(other.standardError, 1 / Math.abs(b)), fit.standardError)).toBeLessThan(1e-9);
        expect(worstDifference(other.leverage, fit.leverage)).toBeLessThan(1e-9);
        expect(Math.abs(other.weightedRss - fit.weightedRss)).toBeLessThan(1e3 * tolerance);
        const [before, after] = [fit.scoreLots(), other.scoreLots()];
        before.variance.forEach((variance, lot) => {
          if (!(variance < 1e3)) return;
          expect(Math.abs(after.variance[lot] / (b * b) / variance - 1)).toBeLessThan(1e-6);
          expect(Math.abs(after.residual[lot] / b - before.residual[lot])).toBeLessThan(1e3 * tolerance);
        });
      }),
      RUNS,
    );
  });

  it('knows no unit and no origin of time', () => {
    fc.assert(
      fc.property(series, fc.constantFrom(60, 86400, 1e-6), fc.constantFrom(0, 1.7e9), (obs, unit, origin) => {
        // Stamps are rounded where an origin is added: the series compared with has them too.
        const t = obs.t.map((v) => v * unit + origin);
        if (origin > 0 && unit < 1) return;
        const raw = { ...obs, t: t.map((v) => (v - origin) / unit) };
        const spec = specOf(raw);
        const fit = fitBaseline(raw, spec);
        const other = fitBaseline({ ...obs, t }, inOtherUnits(spec, unit, origin, 1));
        expect(worstDifference(other.fitted, fit.fitted)).toBeLessThan(1e-8);
        expect(worstDifference(scaled(other.slope, unit), fit.slope)).toBeLessThan(1e-7);
        expect(worstDifference(other.standardError, fit.standardError)).toBeLessThan(1e-8);
        expect(Math.abs(other.edf - fit.edf)).toBeLessThan(1e-8);
        expect(worstDifference(wellScored(other).residual, wellScored(fit).residual)).toBeLessThan(1e-5);
      }),
      RUNS,
    );
  });

  it('does not mind the order of points that share a time', () => {
    fc.assert(
      fc.property(series, (obs) => {
        const order = [...obs.t.keys()].sort((i, j) => obs.t[i] - obs.t[j] || j - i);
        const other = {
          ...obs,
          y: Float64Array.from(order, (i) => obs.y[i]),
          weight: Float64Array.from(order, (i) => obs.weight[i]),
          lot: Int32Array.from(order, (i) => obs.lot[i]),
        };
        const [a, b] = [fitBaseline(obs, specOf(obs)), fitBaseline(other, specOf(obs))];
        expect(
          worstDifference(
            b.fitted,
            order.map((i) => a.fitted[i]),
          ),
        ).toBeLessThan(1e-9);
        expect(
          worstDifference(
            b.leverage,
            order.map((i) => a.leverage[i]),
          ),
        ).toBeLessThan(1e-9);
        expect(Math.abs(a.edf - b.edf)).toBeLessThan(1e-9);
        expect(worstDifference(wellScored(a).residual, wellScored(b).residual)).toBeLessThan(1e-6);
        expect(worstDifference(wellScored(a).variance, wellScored(b).variance)).toBeLessThan(1e-6);
      }),
      RUNS,
    );
  });

  it('takes a point of weight 2 w as two points of weight w', () => {
    fc.assert(
      fc.property(series, (obs) => {
        const twice = [...obs.t.keys()].flatMap((i) => (i % 3 === 1 ? [i, i] : [i]));
        const other: Observations = {
          t: Float64Array.from(twice, (i) => obs.t[i]),
          y: Float64Array.from(twice, (i) => obs.y[i]),
          weight: Float64Array.from(twice, (i) => obs.weight[i] / (i % 3 === 1 ? 2 : 1)),
          lot: Int32Array.from(twice, (i) => obs.lot[i]),
          pulls: obs.pulls,
        };
        const [a, b] = [fitBaseline(obs, specOf(obs)), fitBaseline(other, specOf(obs))];
        expect(
          worstDifference(
            b.fitted,
            twice.map((i) => a.fitted[i]),
          ),
        ).toBeLessThan(1e-9);
        expect(
          worstDifference(
            b.standardError,
            twice.map((i) => a.standardError[i]),
          ),
        ).toBeLessThan(1e-9);
        expect(Math.abs(a.edf - b.edf)).toBeLessThan(1e-9);
        expect(Math.abs(a.weightedRss - b.weightedRss)).toBeLessThan(1e-8);
        const count = Float64Array.from(obs.t, (_, i) => (i % 3 === 1 ? 2 : 1));
        const [one, two] = [a.scoreLots(count), b.scoreLots()];
        one.variance.forEach((variance, lot) => {
          if (!(variance < 1e3)) return;
          expect(Math.abs(two.variance[lot] / variance - 1)).toBeLessThan(1e-6);
          expect(Math.abs(two.residual[lot] - one.residual[lot])).toBeLessThan(1e-6);
        });
      }),
      RUNS,
    );
  });

  it('reproduces straight lines, or levels when it is a constant, and leaves nothing to any lot', () => {
    const line = fc.tuple(fc.double({ min: -50, max: 50, noNaN: true }), fc.double({ min: -5, max: 5, noNaN: true }));
    fc.assert(
      fc.property(series, line, (obs, [level, slope]) => {
        const spec = specOf(obs);
        const g = (t: number) => level + (isConstant(spec) ? 0 : slope * t);
        const fit = fitBaseline({ ...obs, y: obs.t.map(g) }, spec);
        const middle = (obs.t[3] + obs.t[obs.t.length - 1]) / 2;
        expect(worstDifference(fit.fitted, Array.from(obs.t, g))).toBeLessThan(1e-10);
        expect(Math.abs(fit.at(middle).value - g(middle))).toBeLessThan(1e-10);
        expect(Math.abs(fit.at(middle).slope - (isConstant(spec) ? 0 : slope))).toBeLessThan(1e-9);
        if (fit.isProjectable) expect(Math.abs(fit.at(40).value - g(40))).toBeLessThan(1e-9);
        for (const residual of wellScored(fit).residual) expect(Math.abs(residual)).toBeLessThan(1e-8);
      }),
      RUNS,
    );
  });

  it('has the slope and curvature of its values, by differences', () => {
    fc.assert(
      fc.property(series, fc.double({ min: 0.05, max: 0.95, noNaN: true }), (obs, share) => {
        const fit = fitBaseline(obs, specOf(obs));
        const [from, to] = [obs.t[0], obs.t[obs.t.length - 1]];
        const h = 1e-3;
        const at = from + share * (to - from);
        // Inside a piece of the curve, so that the third derivative does not jump.
        if ([...fit.pieces().breaks].some((b) => Math.abs(b - at) < 2 * h)) return;
        const [a, b, c] = [at - h, at, at + h].map((t) => fit.at(t));
        const size = 1 + Math.abs(b.slope) + Math.abs(b.curvature) + 100 * Math.abs(a.curvature - c.curvature);
        expect(Math.abs((c.value - a.value) / (2 * h) - b.slope)).toBeLessThan(1e-4 * size);
        expect(Math.abs((c.slope - a.slope) / (2 * h) - b.curvature)).toBeLessThan(1e-4 * size);
      }),
      RUNS,
    );
  });

  it('gives the same bits for the same input', () => {
    fc.assert(
      fc.property(series, (obs) => {
        const [a, b] = [0, 1].map(() => Float64Array.from(everyNumber(fitBaseline(obs, specOf(obs)), obs)));
        expect(Buffer.from(a.buffer).equals(Buffer.from(b.buffer))).toBe(true);
      }),
      { ...RUNS, numRuns: 10 },
    );
  });
});
