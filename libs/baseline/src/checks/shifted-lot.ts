import { Matrix, solve } from 'ml-matrix';

/**
 * Share of a lot's shift that the smoothing spline swallows when the lot stays in the fit, for continuous observation in white noise: g solves
 * b^4 g'''' + g = y, b = T / 2 pi (Silverman 1984, Ann. Statist. 12:898), y = 1 over the lot and 0 elsewhere; the share is the mean of g over the lot.
 * @param period T in lot lengths, > 0
 */
export function interiorShare(period: number): number {
  const k = (Math.SQRT2 * Math.PI) / period;
  // Kernel (k / sqrt 2) exp(-k|u|) sin(k|u| + pi/4) against the overlap 1 - |u| of the lot with itself, by Simpson's rule.
  const f = (u: number) => 2 * (1 - u) * (k / Math.SQRT2) * Math.exp(-k * u) * Math.sin(k * u + Math.PI / 4);
  const cells = 2000;
  let total = f(0) + f(1);
  for (let i = 1; i < cells; i++) total += f(i / cells) * (i % 2 === 1 ? 4 : 2);
  return total / (3 * cells);
}

/**
 * The same for the newest lot, [-1, 0], with nothing after it: g'' = g''' = 0 at 0, g -> 0 far back, and g, g', g'', g''' continuous at -1.
 * Outside g = e^(kv)(c0 cos kv + c1 sin kv) with v = t + 1, inside g = 1 + e^(kt)(c2 cos kt + c3 sin kt) + e^(-kv)(c4 cos kv + c5 sin kv).
 */
export function newestShare(period: number): number {
  const k = (Math.SQRT2 * Math.PI) / period;
  /** Derivatives 0 .. 3, in units of k, of e^(sx) cos x and e^(sx) sin x at x: the next of (p, q) in e^(sx)(p cos x + q sin x) is (s p + q, s q - p). */
  const mode = (s: number, isSine: boolean, x: number): number[] => {
    let [p, q] = isSine ? [0, 1] : [1, 0];
    return [0, 1, 2, 3].map(() => {
      const value = Math.exp(s * x) * (p * Math.cos(x) + q * Math.sin(x));
      [p, q] = [s * p + q, s * q - p];
      return value;
    });
  };
  const outside = [mode(1, false, 0), mode(1, true, 0)];
  const growing = (x: number) => [mode(1, false, x), mode(1, true, x)];
  const falling = (x: number) => [mode(-1, false, x), mode(-1, true, x)];
  const start = [...growing(-k), ...falling(0)];
  const end = [...growing(0), ...falling(k)];
  const rows = [0, 1, 2, 3].map((d) => [...outside.map((m) => m[d]), ...start.map((m) => -m[d])]);
  for (const d of [2, 3]) rows.push([0, 0, ...end.map((m) => m[d])]);
  const c = solve(new Matrix(rows), Matrix.columnVector([1, 0, 0, 0, 0, 0])).to1DArray();
  // Integral of g'''' over the lot is its g''' at the end (0) minus at the start: mean g = 1 - b^4 (g'''(0) - g'''(-1)), and 4 b^4 k^4 = 1.
  const third = start.reduce((sum, m, i) => sum + c[2 + i] * m[3], 0);
  return 1 + third / (4 * k);
}
