import { inverse, Matrix } from 'ml-matrix';
import type { BaselineFit } from '../baseline-fit';
import type { Observations } from '../observations';
import { worstDifference } from '../testing/reference';
import { observations, wavySeries } from '../testing/series';
import { fitBSpline, fitConstant, fitNaturalSpline, fitPolynomial } from './fit-regression';

type Fitter = (obs: Observations) => BaselineFit;
const knotsOf = (obs: Observations, count: number) => {
  const pulling = obs.t.filter((_, i) => obs.pulls[obs.lot[i]] > 0);
  const [a, b] = [pulling[0], pulling[pulling.length - 1]];
  return Float64Array.from({ length: count }, (_, j) => a + (b - a) * ((j + 1) / (count + 1)) ** 1.2);
};
const METHODS: [string, number, Fitter][] = [
  ['natural spline without a knot', 2, (obs) => fitNaturalSpline(obs, knotsOf(obs, 0))],
  ['natural spline with one knot', 3, (obs) => fitNaturalSpline(obs, knotsOf(obs, 1))],
  ['natural spline with two knots', 4, (obs) => fitNaturalSpline(obs, knotsOf(obs, 2))],
  ['natural spline with three knots', 5, (obs) => fitNaturalSpline(obs, knotsOf(obs, 3))],
  ['natural spline with seven knots', 9, (obs) => fitNaturalSpline(obs, knotsOf(obs, 7))],
  ['B-spline without a knot', 4, (obs) => fitBSpline(obs, knotsOf(obs, 0))],
  ['B-spline with one knot', 5, (obs) => fitBSpline(obs, knotsOf(obs, 1))],
  ['B-spline with six knots', 10, (obs) => fitBSpline(obs, knotsOf(obs, 6))],
  ['polynomial of degree 1', 2, (obs) => fitPolynomial(obs, 1)],
  ['polynomial of degree 4', 5, (obs) => fitPolynomial(obs, 4)],
  ['polynomial of degree 5', 6, (obs) => fitPolynomial(obs, 5)],
  ['constant', 1, fitConstant],
];

/** Every second point of a lot far away, one lot idle, one at half weight, lots interleaved in threes, ties. */
function mixedSeries(): Observations {
  const obs = wavySeries(48, 21, (i) => (i % 3) + 3 * Math.floor(i / 12));
  obs.t[20] = obs.t[19];
  obs.t[21] = obs.t[19];
  const pulls = Float64Array.from(obs.pulls, () => 1);
  pulls[4] = 0;
  pulls[7] = 0.3;
  return { ...obs, pulls };
}

const pullOf = (obs: Observations) => obs.t.map((_, i) => obs.weight[i] * obs.pulls[obs.lot[i]]);

/** S by unit vectors. */
function smoother(obs: Observations, fitter: Fitter): Matrix {
  const n = obs.t.length;
  const s = Matrix.zeros(n, n);
  for (let j = 0; j < n; j++) {
    const y = new Float64Array(n);
    y[j] = 1;
    s.setColumn(j, [...fitter({ ...obs, y }).fitted]);
  }
  return s;
}

describe.each(METHODS)('the %s', (_name, dimension, fitter) => {
  const obs = mixedSeries();
  const fit = fitter(obs);
  const s = smoother(obs, fitter);
  const pull = pullOf(obs);
  const n = obs.t.length;

  it('is linear in y, with S by unit vectors: values, leverages, degrees of freedom, blocks', () => {
    expect(worstDifference(fit.fitted, s.mmul(Matrix.columnVector([...obs.y])).to1DArray())).toBeLessThan(1e-12);
    expect(worstDifference(fit.leverage, s.diagonal())).toBeLessThan(1e-13);
    expect(fit.edf).toBe(dimension);
    expect(s.trace()).toBeCloseTo(dimension, 11);
    obs.pulls.forEach((_, lot) => {
      const at = [...obs.t.keys()].filter((i) => obs.lot[i] === lot);
      expect(worstDifference(fit.smootherBlock(lot), s.selection(at, at).to1DArray())).toBeLessThan(1e-13);
    });
  });

  it('repeats what it holds: rows of S sum to 1, S S = S, straight lines come back', () => {
    for (let i = 0; i < n; i++) expect(s.getRow(i).reduce((a, b) => a + b)).toBeCloseTo(1, 12);
    expect(worstDifference(s.mmul(s).to1DArray(), s.to1DArray())).toBeLessThan(1e-12);
    if (dimension === 1) return;
    const y = obs.t.map((t) => 5 - 0.7 * t);
    expect(worstDifference(fitter({ ...obs, y }).fitted, y)).toBeLessThan(1e-12);
    expect(fitter({ ...obs, y }).weightedRss).toBeLessThan(1e-24);
  });

  it('has the sampling covariance S W^-1 S of its values, symmetric', () => {
    const inverse = Matrix.diag([...pull].map((w) => (w > 0 ? 1 / w : 0)));
    const c = s.mmul(inverse).mmul(s.transpose());
    const pairs = (f: (i: number, j: number) => number) =>
      [...obs.t.keys()].flatMap((i) => [...obs.t.keys()].map((j) => f(i, j)));
    const given = pairs((i, j) => fit.covariance(obs.t[i], obs.t[j]));
    expect(worstDifference(given, c.to1DArray())).toBeLessThan(1e-13);
    expect(given).toEqual(pairs((i, j) => fit.covariance(obs.t[j], obs.t[i])));
    expect(worstDifference(fit.standardError, c.diagonal().map(Math.sqrt))).toBeLessThan(1e-12);
  });

  it('has its residual sum of squares over the points that pull', () => {
    const rss = obs.y.reduce((sum, y, i) => sum + pull[i] * (y - fit.fitted[i]) ** 2, 0);
    expect(fit.weightedRss).toBeCloseTo(rss, 10);
    expect(fit.pullCount).toBe(pull.filter((w) => w > 0).length);
  });

  it('has the slopes and curvatures that differences give', () => {
    for (const t of [0.31, 0.77, 1.9].map((x) => obs.t[5] + 4 * x)) {
      const h = 1e-3;
      const [a, b, c] = [t - h, t, t + h].map((x) => fit.at(x));
      expect(Math.abs(b.slope - (c.value - a.value) / (2 * h))).toBeLessThan(1e-6);
      expect(Math.abs(b.curvature - (c.slope - a.slope) / (2 * h))).toBeLessThan(1e-6);
    }
    obs.t.forEach((t, i) => {
      const { value, slope, curvature, standardError } = fit.at(t);
      expect([value, slope, curvature, standardError]).toEqual([
        fit.fitted[i],
        fit.slope[i],
        fit.curvature[i],
        fit.standardError[i],
      ]);
    });
  });

  it('is its pieces', () => {
    const { breaks, coefficients } = fit.pieces();
    expect(breaks[0]).toBe(obs.t[0]);
    expect(breaks[breaks.length - 1]).toBe(obs.t[n - 1]);
    const x = [0, 0.3, 0.8, 1].flatMap((share) =>
      Array.from({ length: breaks.length - 1 }, (_, k) => ({ k, x: share * (breaks[k + 1] - breaks[k]) })),
    );
    const byPieces = x.map(({ k, x }) => {
      const [c0, c1, c2, c3] = coefficients.subarray(4 * k, 4 * k + 4);
      return c0 + x * (c1 + x * (c2 + x * c3));
    });
    const byFit = x.map(({ k, x }) => fit.at(breaks[k] + x).value);
    expect(worstDifference(byPieces, byFit)).toBeLessThan(1e-10);
  });

  it('without a lot is what (I - S_II)^-1 gives, and the fit of the others where that keeps the ends', () => {
    const isInner = (lot: number) => {
      const others = obs.t.filter((_, i) => obs.lot[i] !== lot && pull[i] > 0);
      return others[0] === obs.t[0] && others[others.length - 1] === obs.t[n - 1];
    };
    let refitted = 0;
    for (const { lot, indices, residual, covariance } of fit.deletedLots()) {
      const at = [...indices];
      const m = at.length;
      const rest = inverse(Matrix.sub(Matrix.eye(m), s.selection(at, at)));
      const e = rest.mmul(Matrix.columnVector(at.map((i) => obs.y[i] - fit.fitted[i]))).to1DArray();
      expect(worstDifference(residual, e)).toBeLessThan(1e-9);
      if (isInner(lot)) {
        refitted++;
        const pulls = Float64Array.from(obs.pulls, (v, j) => (j === lot ? 0 : v));
        const knots = 'knots' in fit.spec ? fit.spec.knots : new Float64Array(0);
        const other =
          fit.spec.method === 'natural-spline'
            ? fitNaturalSpline({ ...obs, pulls }, knots)
            : fit.spec.method === 'b-spline'
              ? fitBSpline({ ...obs, pulls }, knots)
              : fitter({ ...obs, pulls });
        const expected = at.map((i) => obs.y[i] - other.fitted[i]);
        expect(worstDifference(residual, expected)).toBeLessThan(1e-10);
        const expectedCovariance = at.flatMap((i) =>
          at.map((k) => other.covariance(obs.t[i], obs.t[k]) + (i === k ? 1 / obs.weight[i] : 0)),
        );
        expect(worstDifference(covariance, expectedCovariance)).toBeLessThan(1e-10);
      }
    }
    expect(refitted).toBeGreaterThan(5);
  });

  it('scores all lots at once as one by one, with any counts', () => {
    const count = obs.t.map((_, i) => 1 + (i % 4));
    for (const counts of [undefined, count]) {
      const scores = fit.scoreLots(counts);
      expect(scores.undetermined).toEqual([]);
      for (const { lot, indices, residual, covariance } of fit.deletedLots()) {
        const m = indices.length;
        const total = [...indices].reduce((sum, i) => sum + (counts?.[i] ?? 1), 0);
        const a = Array.from(indices, (i) => (counts?.[i] ?? 1) / total);
        const r = a.reduce((sum, x, k) => sum + x * residual[k], 0);
        let v = 0;
        for (let p = 0; p < m; p++) for (let q = 0; q < m; q++) v += a[p] * a[q] * covariance[p * m + q];
        expect(scores.residual[lot]).toBeCloseTo(r, 11);
        expect(scores.variance[lot]).toBeCloseTo(v, 11);
        indices.forEach((i, k) => expect(scores.deletedResidual[i]).toBeCloseTo(residual[k], 12));
      }
    }
  });

  it('multiplies by W (I - S), and finds steps by it', () => {
    const a = Matrix.sub(Matrix.eye(n), s);
    a.mulColumnVector([...pull]);
    const x = obs.t.map((t, i) => 3 + Math.cos(t) * (i % 5));
    expect(worstDifference(fit.residualProduct(x), a.mmul(Matrix.columnVector([...x])).to1DArray())).toBeLessThan(
      1e-11,
    );
    const { estimate, standardError } = fit.stepEstimates();
    expect([estimate[0], standardError[0]]).toEqual([0, Infinity]);
    for (let k = 1; k < n; k++) {
      const step = Matrix.columnVector(Array.from({ length: n }, (_, i) => (i < k ? 0 : 1)));
      const information = step.transpose().mmul(a).mmul(step).get(0, 0);
      const product = step
        .transpose()
        .mmul(a)
        .mmul(Matrix.columnVector([...obs.y]))
        .get(0, 0);
      expect(Math.abs(standardError[k] * Math.sqrt(information) - 1)).toBeLessThan(1e-9);
      expect(estimate[k]).toBeCloseTo(product / information, 9);
    }
  });

  it('does not depend on units or on the origin of time', () => {
    const other = fitter({
      ...obs,
      t: obs.t.map((t) => 1.7e9 + 86400 * Math.round(1e6 * t)),
      y: obs.y.map((y) => 1e3 * y),
      weight: obs.weight.map((w) => 1e-6 * w),
    });
    const here = fitter({ ...obs, t: obs.t.map((t) => Math.round(1e6 * t)) });
    expect(
      worstDifference(
        other.fitted.map((v) => v / 1e3),
        here.fitted,
      ),
    ).toBeLessThan(1e-9);
    expect(worstDifference(other.leverage, here.leverage)).toBeLessThan(1e-9);
    expect(
      worstDifference(
        other.standardError.map((v) => v / 1e3),
        here.standardError,
      ),
    ).toBeLessThan(1e-9);
    expect(
      worstDifference(
        other.slope.map((v) => v * 86400 * 1e3),
        here.slope.map((v) => v * 1e6),
      ),
    ).toBeLessThan(1e-8);
  });
});

describe('beyond the ends', () => {
  const obs = wavySeries(30, 22);
  const [a, b] = [obs.t[0], obs.t[29]];
  it.each([0, 1, 2, 5])('a natural spline with %p knots is straight, with a band that grows', (count) => {
    const fit = fitNaturalSpline(obs, knotsOf(obs, count));
    expect(Math.abs(fit.at(a).curvature) + Math.abs(fit.at(b).curvature)).toBeLessThan(1e-12);
    for (const d of [0.5, 3, 40]) {
      expect(fit.at(b + d).value).toBeCloseTo(fit.fitted[29] + d * fit.slope[29], 11);
      expect(fit.at(a - d).value).toBeCloseTo(fit.fitted[0] - d * fit.slope[0], 11);
      expect(fit.at(b + d).curvature).toBe(0);
    }
    const band = [0, 0.5, 3, 40].map((d) => fit.at(b + d).standardError);
    band.slice(1).forEach((v, i) => expect(v).toBeGreaterThan(band[i]));
    const slopeVariance = fit.covariance(b + 1, b + 1) - 2 * fit.covariance(b + 1, b) + fit.covariance(b, b);
    expect(fit.at(b + 1e6).standardError / 1e6).toBeCloseTo(Math.sqrt(slopeVariance), 5);
  });
  it('the constant stays', () => {
    const fit = fitConstant(obs);
    const total = obs.weight.reduce((sum, w) => sum + w, 0);
    const mean = obs.y.reduce((sum, y, i) => sum + obs.weight[i] * y, 0) / total;
    expect(fit.at(b + 1e9).value).toBeCloseTo(mean, 12);
    expect(fit.at(a - 1e9).standardError).toBeCloseTo(1 / Math.sqrt(total), 14);
  });
  it.each([
    ['b-spline', (o: Observations) => fitBSpline(o, knotsOf(o, 2))],
    ['polynomial', (o: Observations) => fitPolynomial(o, 2)],
  ])('a %s is not read', (method, fitter) => {
    const fit = fitter(obs);
    expect(fit.isProjectable).toBe(false);
    const refusal = expect.objectContaining({ code: 'no-projection', message: expect.stringContaining(method) });
    expect(() => fit.at(b + 1)).toThrow(refusal);
    expect(() => fit.covariance(a - 1, b)).toThrow(refusal);
    expect(() => fit.at(NaN)).toThrow(expect.objectContaining({ code: 'non-finite' }));
  });
  it('points that do not pull are judged there, with the error that this has', () => {
    const idle = { ...obs, pulls: obs.pulls.map((v, j) => (j < 2 || j > 27 ? 0 : v)) };
    for (const [, , fitter] of METHODS) {
      const fit = fitter(idle);
      expect(fit.leverage[0]).toBe(0);
      expect([...fit.fitted, ...fit.standardError].every(Number.isFinite)).toBe(true);
      const [own] = fit.deletedLots(Int32Array.of(29));
      expect(own.residual[0]).toBeCloseTo(obs.y[29] - fit.fitted[29], 12);
      expect(own.covariance[0]).toBeCloseTo(1 / obs.weight[29] + fit.standardError[29] ** 2, 12);
    }
  });
});

describe('a spline in its own space', () => {
  it('a B-spline fit repeats cubics, and a spline with its knots; a polynomial those of its degree', () => {
    const obs = wavySeries(40, 23);
    const knots = knotsOf(obs, 3);
    const cubic = obs.t.map((t) => 1 - t + 0.2 * t * t - 0.01 * t ** 3);
    const bent = cubic.map((y, i) => y + Math.max(0, obs.t[i] - knots[1]) ** 3);
    const scale = Math.max(...bent.map(Math.abs));
    expect(worstDifference(fitBSpline({ ...obs, y: cubic }, knots).fitted, cubic)).toBeLessThan(1e-13 * scale);
    expect(worstDifference(fitBSpline({ ...obs, y: bent }, knots).fitted, bent)).toBeLessThan(1e-13 * scale);
    expect(worstDifference(fitPolynomial({ ...obs, y: cubic }, 3).fitted, cubic)).toBeLessThan(1e-13 * scale);
  });
  it('a natural spline with a knot at every inner point passes through all points', () => {
    const obs = wavySeries(12, 24);
    const fit = fitNaturalSpline(obs, obs.t.slice(1, 11));
    expect(worstDifference(fit.fitted, obs.y)).toBeLessThan(1e-12);
    expect(worstDifference(fit.leverage, new Float64Array(12).fill(1))).toBeLessThan(1e-12);
    expect(fit.scoreLots().undetermined).toHaveLength(12);
  });
  it('a point repeated is a point of twice the weight', () => {
    const once = observations([0, 1, 3, 4, 6, 7], [1, 4, 2, 5, 3, 4], undefined, [1, 2, 1, 1, 2, 1]);
    const twice = observations([0, 1, 1, 3, 4, 6, 6, 7], [1, 4, 4, 2, 5, 3, 3, 4]);
    for (const fitter of [METHODS[1][2], METHODS[2][2], METHODS[5][2], METHODS[9][2], METHODS[11][2]]) {
      const [a, b] = [fitter(once), fitter(twice)];
      for (const t of [0, 1.5, 5, 7]) {
        expect(a.at(t).value).toBeCloseTo(b.at(t).value, 12);
        expect(a.at(t).standardError).toBeCloseTo(b.at(t).standardError, 12);
      }
    }
  });
});
