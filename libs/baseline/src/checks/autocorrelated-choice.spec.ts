import { chooseLambda, type ChooseLambdaOptions } from '../choice/choose-lambda';
import { fitSmoothingSpline } from '../spline/smoothing-spline';
import type { Observations } from '../observations';
import { normals } from '../testing/normal';

const POINTS = 240;
const RUNS = 60;
const LOT = 8;

/** A drift of one sine of amplitude 1.5 and a slope of 1 over the record, in AR(1) noise of standard deviation 1. */
function drift(i: number): number {
  const s = i / (POINTS - 1);
  return 1.5 * Math.sin(2 * Math.PI * s) + s;
}
function series(rho: number, normal: () => number, lotSize: number, y = autocorrelated(rho, normal)): Observations {
  const t = Float64Array.from(y, (_, i) => i);
  const lot = Int32Array.from(t, (i) => Math.floor(i / lotSize));
  return { t, y, weight: new Float64Array(POINTS).fill(1), lot, pulls: new Uint8Array(POINTS / lotSize).fill(1) };
}
function autocorrelated(rho: number, normal: () => number): Float64Array {
  let e = normal();
  return Float64Array.from({ length: POINTS }, (_, i) => {
    const value = drift(i) + e;
    e = rho * e + Math.sqrt(1 - rho * rho) * normal();
    return value;
  });
}

const chosenEdf = (obs: Observations, options: Omit<ChooseLambdaOptions, 'floorLambda'>) =>
  fitSmoothingSpline(obs, chooseLambda(obs, { ...options, floorLambda: 0 }).lambda).edf;

/** Degrees of freedom of the fit nearest to the true drift. */
function oracleEdf(obs: Observations): number {
  let best = { error: Infinity, edf: NaN };
  for (let decade = 2; decade < 8; decade += 0.25) {
    const { fitted, edf } = fitSmoothingSpline(obs, 10 ** decade);
    const error = fitted.reduce((sum, g, i) => sum + (g - drift(i)) ** 2, 0);
    if (error < best.error) best = { error, edf };
  }
  return best.edf;
}

const median = (x: number[]) => [...x].sort((a, b) => a - b)[x.length >> 1];

function medians(rho: number) {
  const normal = normals(20240301);
  const runs = Array.from({ length: RUNS }, () => {
    const obs = series(rho, normal, 1);
    return {
      gcv: chosenEdf(obs, { rule: 'gcv' }),
      gcv14: chosenEdf(obs, { rule: 'gcv', gcvInflation: 1.4 }),
      reml: chosenEdf(obs, { rule: 'reml', remlVariance: 'estimated' }),
      lotCv: chosenEdf(series(rho, normal, LOT, obs.y), { rule: 'lot-cv' }),
      oracle: oracleEdf(obs),
    };
  });
  const of = (key: keyof (typeof runs)[0]) => median(runs.map((run) => run[key]));
  return { gcv: of('gcv'), gcv14: of('gcv14'), reml: of('reml'), lotCv: of('lotCv'), oracle: of('oracle') };
}

describe(`the degrees of freedom chosen under autocorrelation (medians of ${RUNS} seeded series of ${POINTS} points)`, () => {
  // Opsomer, Wang & Yang (2001, Statist. Sci. 16:134): GCV takes correlated noise for drift. Figures: 200 runs with numpy for
  // such a drift (its slope may differ) and noise.
  const figures = {
    0: { gcv: 6.2, gcv14: 5.8, reml: 7.4, oracle: 6.4 },
    0.3: { gcv: 57.6, gcv14: 6.7, reml: 7.9, oracle: 5.9 },
    0.6: { gcv: 113, gcv14: 50.8, reml: 26, oracle: 5.6 },
  };
  const found = { 0: medians(0), 0.3: medians(0.3), 0.6: medians(0.6) };
  it.each([0, 0.3, 0.6] as const)('at correlation %p are those found with numpy, to 30 %%', (rho) => {
    for (const rule of ['gcv', 'gcv14', 'reml', 'oracle'] as const) {
      expect(Math.abs(found[rho][rule] / figures[rho][rule] - 1)).toBeLessThan(0.3);
    }
  });
  it('are far too many by GCV at 0.3; inflated GCV, REML and leaving out lots of 8 points stay near the best', () => {
    const { gcv, gcv14, reml, lotCv, oracle } = found[0.3];
    expect(gcv).toBeGreaterThan(5 * oracle);
    for (const edf of [gcv14, reml, lotCv]) expect(Math.abs(edf / oracle - 1)).toBeLessThan(0.5);
  });
  it('are too many by all but leaving out lots at 0.6, in the order GCV, inflated GCV, REML', () => {
    const { gcv, gcv14, reml, lotCv, oracle } = found[0.6];
    expect(gcv).toBeGreaterThan(1.5 * gcv14);
    expect(gcv14).toBeGreaterThan(1.5 * reml);
    expect(reml).toBeGreaterThan(3 * oracle);
    expect(Math.abs(lotCv / oracle - 1)).toBeLessThan(0.5);
  });
});
