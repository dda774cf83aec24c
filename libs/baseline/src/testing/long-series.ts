import type { Observations } from '../observations';
import { lcg } from './lcg';

/** The series of tools/reference/quad_spline.c, double for double; each point a lot of its own. */
export function longSeries(n: number): Observations {
  const uniform = lcg(20240229);
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
  const lot = new Int32Array(n);
  for (let i = 0; i < n; i++) lot[i] = i;
  return { t, y, weight, lot, pulls: new Uint8Array(n).fill(1) };
}
