import type { Observations } from '@app/baseline';
import { lcg } from '../../../libs/baseline/src/testing/lcg';

const SEED = 20240229;

/** Points about every twelve minutes, unevenly; a slow wave of +-0.8 in noise of standard deviation 0.5, with uneven weights. Every point is its own lot. */
export function longSeries(n: number): Observations {
  const uniform = lcg(SEED);
  const t = new Float64Array(n);
  const y = new Float64Array(n);
  const weight = new Float64Array(n);
  for (let i = 0; i < n; i++) {
    const u = uniform();
    t[i] = i > 0 ? t[i - 1] + 600 + 300 * u : 1700000000;
    const s = i / (n - 1);
    const u1 = uniform();
    const u2 = uniform();
    const u3 = uniform();
    y[i] = 40 + 8 * s * (1 - s) * (1 - 2 * s) + (u1 + u2 + u3 - 1.5);
    weight[i] = 0.5 + uniform();
  }
  return inLots({ t, y, weight }, n, (i) => i);
}

/** The same points in other lots. */
export function inLots(
  points: Pick<Observations, 't' | 'y' | 'weight'>,
  lotCount: number,
  lotOf: (point: number) => number,
): Observations {
  const { t, y, weight } = points;
  return {
    t,
    y,
    weight,
    lot: Int32Array.from(t, (_, i) => lotOf(i)),
    pulls: new Uint8Array(lotCount).fill(1),
  };
}
