import { BaselineError } from '../baseline-error';
import type { BaselineMethod } from '../baseline-fit';
import { lambdaForPeriod, pointDensity } from '../drift-period';
import { fitBaseline } from '../fit-baseline';
import type { Observations } from '../observations';
import { placeKnots } from '../regression/place-knots';
import { naiveRegression } from '../testing/naive-regression';
import { lcg } from '../testing/lcg';
import { naiveSpline } from '../testing/naive-spline';
import { observations, wavySeries } from '../testing/series';
import { chooseAndFit, chooseBaseline } from './choose-baseline';
import type { ChooseBaselineOptions } from './chosen-baseline';

type Regression = Exclude<BaselineMethod, 'smoothing-spline'>;

/** Terms W_j m_j^2 of the leave-one-lot-out criterion, from values fitted without each lot. */
function lotTerms(obs: Observations, fittedWithout: (lot: number) => number[]): number[] {
  return [...obs.pulls.keys()]
    .filter((j) => obs.pulls[j] > 0)
    .map((j) => {
      const fitted = fittedWithout(j);
      const own = [...obs.lot.keys()].filter((i) => obs.lot[i] === j);
      const weight = own.reduce((sum, i) => sum + obs.weight[i] * obs.pulls[j], 0);
      const mean = own.reduce((sum, i) => sum + obs.weight[i] * obs.pulls[j] * (obs.y[i] - fitted[i]), 0) / weight;
      return weight * mean * mean;
    });
}
const mean = (x: number[]) => x.reduce((a, b) => a + b) / x.length;
const standardError = (x: number[]) =>
  Math.sqrt(x.reduce((sum, v) => sum + (v - mean(x)) ** 2, 0) / (x.length - 1) / x.length);

function specOf(obs: Observations, method: Regression, smoothness: number) {
  if (method === 'constant') return { method };
  if (method === 'polynomial') return { method, degree: smoothness };
  return { method, knots: placeKnots(obs, smoothness, 'quantile') };
}

const fractional = (() => {
  const obs = wavySeries(36, 51, (i) => Math.floor(i / 3));
  return { ...obs, pulls: Float64Array.from(obs.pulls, (_, j) => (j === 5 ? 0 : j % 4 === 1 ? 0.3 : 1)) };
})();
const interleaved = wavySeries(30, 52, (i) => i % 10);

describe('the criteria of regression baselines agree with dense refits', () => {
  it.each<Regression>(['natural-spline', 'b-spline', 'polynomial', 'constant'])('%s', (method) => {
    for (const obs of [fractional, interleaved]) {
      for (const rule of ['lot-cv', 'gcv', 'gcv14'] as const) {
        const { curve } = chooseBaseline(obs, { method, rule }).criterion;
        expect(curve.length).toBeGreaterThanOrEqual(method === 'polynomial' ? 4 : 1);
        for (const { smoothness, edf, value } of curve.filter((c) => c.smoothness < 6)) {
          const spec = specOf(obs, method, smoothness);
          const whole = naiveRegression(obs, spec);
          const gamma = rule === 'gcv14' ? 1.4 : 1;
          const naive =
            rule === 'lot-cv'
              ? mean(lotTerms(obs, (j) => naiveRegression(obs, spec, j).fitted))
              : (whole.pullCount * whole.rss) / (whole.pullCount - gamma * whole.edf) ** 2;
          expect(edf).toBeCloseTo(whole.edf, 8);
          expect(Math.abs(value / naive - 1)).toBeLessThan(1e-6);
        }
      }
    }
  });
  it('the best of the curve is chosen, the smoother of equals, and the minima are its valleys', () => {
    for (const method of ['natural-spline', 'b-spline', 'polynomial'] as const) {
      const chosen = chooseBaseline(wavySeries(120, 53), { method, rule: 'lot-cv' });
      const { value, curve } = chosen.criterion;
      expect(value).toBe(Math.min(...curve.map((c) => c.value)));
      expect(Math.min(...chosen.minima.map((c) => c.value))).toBe(value);
      for (const m of chosen.minima) {
        const near = curve.filter((c) => Math.abs(c.smoothness - m.smoothness) === 1);
        for (const c of near) expect(c.value).toBeGreaterThanOrEqual(m.value);
      }
      expect(fitBaseline(wavySeries(120, 53), chosen.spec).edf).toBeCloseTo(chosen.edf, 10);
    }
  });
  it('candidates without which the other lots determine nothing are left out of the curve', () => {
    // Two lots hold all late points: no knot can be followed there without one of them.
    const t = [...Array.from({ length: 20 }, (_, i) => i), 40, 41, 42, 43];
    const obs = observations(
      t,
      t.map((x, i) => Math.sin(x) + (i % 3)),
      t.map((_, i) => (i < 20 ? i : i < 22 ? 20 : 21)),
    );
    const { curve } = chooseBaseline(obs, { method: 'b-spline', rule: 'lot-cv', placement: 'even' }).criterion;
    const gcv = chooseBaseline(obs, { method: 'b-spline', rule: 'gcv', placement: 'even' }).criterion.curve;
    expect(curve.length).toBeLessThan(gcv.length);
    expect(curve.every((c) => Number.isFinite(c.value))).toBe(true);
  });
});

describe('a slow drift under a fast wave', () => {
  const uniform = lcg(12);
  const t = Array.from({ length: 400 }, (_, i) => i);
  const noise = () => uniform() + uniform() + uniform() - 1.5;
  const wave = (cycles: number, x: number) => Math.sin((2 * Math.PI * cycles * x) / 400);
  const y = t.map((x) => 3 * wave(1, x) + wave(50, x) + noise());
  const obs = observations(
    t,
    y,
    undefined,
    t.map(() => 4),
  );
  it.each(['lot-cv', 'gcv', 'reml'] as const)(
    'gives %s two minima; both are found and the better is chosen',
    (rule) => {
      const { minima, edf, criterion, smoothness } = chooseBaseline(obs, { method: 'smoothing-spline', rule });
      expect(minima).toHaveLength(2);
      expect(minima[0].edf).toBeGreaterThan(100);
      expect(minima[1].edf).toBeLessThan(20);
      expect(edf).toBe(minima[0].edf);
      expect(criterion.value).toBe(Math.min(minima[0].value, minima[1].value));
      const at = (lambda: number) =>
        chooseBaseline(obs, { method: 'smoothing-spline', rule, floorLambda: lambda }).criterion.curve[0].value;
      expect(smoothness).toBe(minima[0].smoothness);
      for (const m of minima) {
        for (const factor of [0.9, 0.99, 1.01, 1.1]) expect(at(m.smoothness * factor)).toBeGreaterThan(m.value);
      }
    },
  );
  it('and a floor between them leaves the slow one', () => {
    const both = chooseBaseline(obs, { method: 'smoothing-spline', rule: 'gcv' }).minima;
    const slow = chooseBaseline(obs, { method: 'smoothing-spline', rule: 'gcv', shortestPeriodSeconds: 40 });
    expect(Math.abs(slow.smoothness / both[1].smoothness - 1)).toBeLessThan(1e-3);
    expect(slow.isAtFloor).toBe(false);
  });
});

describe('the shortest drift period', () => {
  const obs = wavySeries(200, 54);
  const window = obs.t[199] - obs.t[0];
  it('is the floor of lambda, and says when it decided', () => {
    const period = window / 2;
    const floor = lambdaForPeriod(pointDensity(obs.t, obs.weight, period), period);
    const free = chooseBaseline(obs, { method: 'smoothing-spline', rule: 'gcv' });
    expect(free.smoothness).toBeLessThan(floor);
    const bound = chooseBaseline(obs, { method: 'smoothing-spline', rule: 'gcv', shortestPeriodSeconds: period });
    expect([bound.smoothness, bound.isAtFloor, bound.isAtBound]).toEqual([floor, true, null]);
    const fixed = chooseBaseline(obs, {
      method: 'smoothing-spline',
      rule: 'edf',
      edf: 50,
      shortestPeriodSeconds: period,
    });
    expect([fixed.smoothness, fixed.isAtFloor]).toEqual([floor, true]);
    expect(fixed.edf).toBeCloseTo(fitBaseline(obs, fixed.spec).edf, 10);
  });
  it.each(['natural-spline', 'b-spline'] as const)('bounds the knots of a %s and keeps them T/2 apart', (method) => {
    const period = window / 2.2;
    for (const placement of ['even', 'quantile', 'variability'] as const) {
      const chosen = chooseBaseline(obs, { method, rule: 'gcv', placement, shortestPeriodSeconds: period });
      expect(chosen.criterion.curve.map((c) => c.smoothness)).toEqual([0, 1, 2, 3]);
      const { spec } = chosen;
      if (!('knots' in spec)) throw new Error('no knots');
      spec.knots.forEach((knot, k) => {
        if (k > 0) expect(knot - spec.knots[k - 1]).toBeGreaterThanOrEqual((period / 2) * (1 - 1e-12));
      });
    }
    const most = chooseBaseline(obs, { method, rule: 'edf', edf: 9, shortestPeriodSeconds: period });
    expect([most.smoothness, most.isAtFloor]).toEqual([3, true]);
  });
  it('bounds the degree of a polynomial', () => {
    const { criterion, isAtFloor } = chooseBaseline(obs, {
      method: 'polynomial',
      rule: 'gcv',
      shortestPeriodSeconds: window * 0.9,
    });
    expect(criterion.curve.map((c) => c.smoothness)).toEqual([1, 2]);
    expect(isAtFloor).toBe(true);
  });
  it.each(['smoothing-spline', 'natural-spline', 'b-spline', 'polynomial'] as const)(
    'beyond the window leaves the straight line (%s)',
    (method) => {
      const line = fitBaseline(obs, { method: 'polynomial', degree: 1 }).fitted;
      const options = { method, shortestPeriodSeconds: 1.01 * window };
      for (const chosen of [
        chooseBaseline(obs, { ...options, rule: 'lot-cv' }),
        chooseBaseline(obs, { ...options, rule: 'edf', edf: 4 }),
      ]) {
        expect([chosen.isAtFloor, chosen.isAtBound]).toEqual([true, 'line']);
        const { fitted } = fitBaseline(obs, chosen.spec);
        fitted.forEach((g, i) => expect(Math.abs(g - line[i])).toBeLessThan(1e-9));
      }
    },
  );
});

describe('bounds', () => {
  const t = Array.from({ length: 60 }, (_, i) => i);
  const line = observations(
    t,
    t.map((x) => 2 + 0.1 * x),
  );
  const uniform = lcg(55);
  const rough = observations(
    t,
    t.map(() => (uniform() < 0.5 ? 0 : 5)),
  );
  it('are said in words', () => {
    const bound = (obs: Observations, method: BaselineMethod, rule: 'gcv' | 'lot-cv' = 'gcv') =>
      chooseBaseline(obs, { method, rule }).isAtBound;
    expect(bound(line, 'smoothing-spline')).toBe('line');
    const followed = observations(
      t,
      t.map((x) => Math.sin(x / 3)),
    );
    expect(bound(followed, 'smoothing-spline')).toBe('interpolation');
    expect(bound(followed, 'natural-spline')).toBe('most-knots');
    const quartic = observations(
      t,
      t.map((x) => ((x - 30) / 30) ** 4 + 1e-3 * Math.sin(9 * x)),
    );
    expect(bound(quartic, 'polynomial')).toBe('highest-degree');
    expect(['line', null]).toContain(bound(rough, 'natural-spline', 'lot-cv'));
    expect(bound(rough, 'constant')).toBeNull();
  });
});

describe('the one-standard-error rule', () => {
  const obs = wavySeries(36, 56, (i) => Math.floor(i / 2));
  it('takes the largest lambda within one standard error, as a fine grid of refits does', () => {
    const { smoothness, oneStandardError, minima } = chooseBaseline(obs, {
      method: 'smoothing-spline',
      rule: 'lot-cv',
      hasOneStandardError: true,
    });
    const terms = (lambda: number) => lotTerms(obs, (j) => naiveSpline(obs, lambda, j).fitted);
    const best = terms(minima[0].smoothness);
    expect(oneStandardError!.value).toBeCloseTo(mean(best), 8);
    expect(oneStandardError!.standardError).toBeCloseTo(standardError(best), 8);
    const allowed = mean(best) + standardError(best);
    expect(mean(terms(smoothness))).toBeLessThanOrEqual(allowed * (1 + 1e-9));
    expect(mean(terms(smoothness * 1.001))).toBeGreaterThan(allowed);
    for (let x = 0.25; x < 16; x += 0.5) expect(mean(terms(smoothness * Math.exp(x)))).toBeGreaterThan(allowed);
  });
  it('takes the fewest knots within it', () => {
    const { smoothness, oneStandardError, criterion } = chooseBaseline(obs, {
      method: 'natural-spline',
      rule: 'lot-cv',
      hasOneStandardError: true,
    });
    const spec = specOf(obs, 'natural-spline', oneStandardError!.smoothness);
    const terms = lotTerms(obs, (j) => naiveRegression(obs, spec, j).fitted);
    expect(oneStandardError!.standardError).toBeCloseTo(standardError(terms), 8);
    const inside = criterion.curve.filter((c) => c.value <= mean(terms) + standardError(terms) + 1e-12);
    expect(smoothness).toBe(Math.min(...inside.map((c) => c.smoothness)));
  });
});

describe('degrees of freedom as given', () => {
  it.each([2.0001, 2.5, 5.25, 20, 49.5])('%p are those of the fit', (edf) => {
    const obs = wavySeries(50, 57);
    const chosen = chooseBaseline(obs, { method: 'smoothing-spline', rule: 'edf', edf });
    expect(Math.abs(fitBaseline(obs, chosen.spec).edf / edf - 1)).toBeLessThan(1e-10);
    expect(chosen.edf).toBeCloseTo(edf, 8);
    expect(chosen.isAtFloor).toBe(false);
  });
  it('are a number of knots or a degree', () => {
    const obs = wavySeries(50, 57);
    for (const [method, offset] of [
      ['natural-spline', 2],
      ['b-spline', 4],
      ['polynomial', 1],
    ] as const) {
      const chosen = chooseBaseline(obs, { method, rule: 'edf', edf: 5 });
      expect([chosen.smoothness, fitBaseline(obs, chosen.spec).edf]).toEqual([5 - offset, expect.closeTo(5, 9)]);
    }
  });
});

describe('options that have no answer', () => {
  const obs = wavySeries(40, 58);
  const code = (run: () => unknown) => {
    try {
      run();
    } catch (error) {
      return error instanceof BaselineError ? error.code : 'other';
    }
    return 'none';
  };
  const spline = { method: 'smoothing-spline' } as const;
  it.each([
    ['REML of a regression', () => chooseBaseline(obs, { method: 'polynomial', rule: 'reml' }), 'bad-argument'],
    ['the rule without the number', () => chooseBaseline(obs, { ...spline, rule: 'edf' }), 'bad-argument'],
    ['the number without the rule', () => chooseBaseline(obs, { ...spline, rule: 'gcv', edf: 5 }), 'bad-argument'],
    ['two degrees of freedom', () => chooseBaseline(obs, { ...spline, rule: 'edf', edf: 2 }), 'bad-argument'],
    ['as many as points', () => chooseBaseline(obs, { ...spline, rule: 'edf', edf: 40 }), 'bad-argument'],
    ['NaN', () => chooseBaseline(obs, { ...spline, rule: 'edf', edf: NaN }), 'non-finite'],
    ['halves', () => chooseBaseline(obs, { method: 'b-spline', rule: 'edf', edf: 5.5 }), 'bad-argument'],
    ['too few', () => chooseBaseline(obs, { method: 'b-spline', rule: 'edf', edf: 3 }), 'bad-argument'],
    [
      'one standard error of GCV',
      () => chooseBaseline(obs, { ...spline, rule: 'gcv', hasOneStandardError: true }),
      'bad-argument',
    ],
    [
      'a floor of knots',
      () => chooseBaseline(obs, { method: 'polynomial', rule: 'gcv', floorLambda: 1 }),
      'bad-argument',
    ],
    ['no period', () => chooseBaseline(obs, { ...spline, rule: 'gcv', shortestPeriodSeconds: 0 }), 'bad-argument'],
    [
      'nothing to judge by',
      () => chooseBaseline(observations([0, 1, 2, 3], [0, 1, 0, 1], [0, 1, 1, 1]), { ...spline, rule: 'lot-cv' }),
      'insufficient-data',
    ],
    [
      'fewer times than a cubic has coefficients',
      () => chooseBaseline(observations([0, 1, 2], [0, 1, 0]), { method: 'b-spline', rule: 'gcv' }),
      'insufficient-data',
    ],
  ])('%s', (_name, run, expected) => expect(code(run)).toBe(expected));
  it('says which degrees of freedom are possible', () => {
    expect(() => chooseBaseline(obs, { method: 'polynomial', rule: 'edf', edf: 9 })).toThrow('2 to 5 degrees');
  });
});

describe('choosing and fitting at once', () => {
  it.each<ChooseBaselineOptions>([
    { method: 'smoothing-spline', rule: 'gcv' },
    { method: 'smoothing-spline', rule: 'edf', edf: 5 },
    { method: 'natural-spline', rule: 'lot-cv' },
  ])('is the choice and its fit, to the bit: $method, $rule', (options) => {
    const obs = wavySeries(90, 51, (i) => Math.floor(i / 3));
    const { chosen, fit } = chooseAndFit(obs, options);
    expect(chosen).toEqual(chooseBaseline(obs, options));
    expect(fit.fitted).toEqual(fitBaseline(obs, chosen.spec).fitted);
    expect(fit.edf).toBeCloseTo(chosen.edf, 9);
  });
  it.each<ChooseBaselineOptions>([
    { method: 'smoothing-spline', rule: 'gcv' },
    { method: 'smoothing-spline', rule: 'gcv14' },
    { method: 'smoothing-spline', rule: 'reml' },
    { method: 'smoothing-spline', rule: 'reml', remlVariance: 'estimated' },
    { method: 'smoothing-spline', rule: 'lot-cv' },
  ])('agrees with the exact criterion on a long series, where the fit is the evaluation: %j', (options) => {
    const obs = wavySeries(3600, 52, (i) => i);
    const { chosen, fit } = chooseAndFit(obs, options);
    const apart = chooseBaseline(obs, options);
    expect(fit.spec).toEqual(chosen.spec);
    expect(fit.fitted).toEqual(fitBaseline(obs, chosen.spec).fitted);
    expect(chosen.smoothness).toBe(apart.smoothness);
    expect(chosen.edf / apart.edf).toBeCloseTo(1, 10);
    expect(chosen.criterion.value / apart.criterion.value).toBeCloseTo(1, 10);
    expect(chosen.isAtFloor).toBe(apart.isAtFloor);
  });
});
