import type { Observations } from '../observations';
import { lcg } from './lcg';

/** Observations from plain arrays; every lot pulls unless `idle` names it. */
export function observations(
  t: number[],
  y: number[],
  lot?: number[],
  weight?: number[],
  idle: number[] = [],
): Observations {
  const lots = lot ?? t.map((_, i) => i);
  const pulls = new Uint8Array(lots.reduce((a, b) => Math.max(a, b), 0) + 1).fill(1);
  for (const j of idle) pulls[j] = 0;
  return {
    t: Float64Array.from(t),
    y: Float64Array.from(y),
    weight: Float64Array.from(weight ?? t.map(() => 1)),
    lot: Int32Array.from(lots),
    pulls,
  };
}

/** An uneven, weighted, wavy series of n points whose lots are given by a rule; reproducible. */
export function wavySeries(
  n: number,
  seed: number,
  lotOf: (i: number) => number = (i) => i,
  idle: number[] = [],
): Observations {
  const uniform = lcg(seed);
  const t: number[] = [];
  let at = 0;
  for (let i = 0; i < n; i++) {
    t.push(at);
    at += 0.2 + uniform();
  }
  const y = t.map((x) => 3 + 0.1 * x + Math.sin((6 * x) / t[n - 1]) + uniform() - 0.5);
  const weight = t.map(() => 0.5 + 2 * uniform());
  return observations(
    t,
    y,
    t.map((_, i) => lotOf(i)),
    weight,
    idle,
  );
}

/** The same observations with points of no weight at more times, in a last lot that does not pull; `at` are their indices. */
export function withIdlePoints(obs: Observations, times: number[]): { obs: Observations; at: number[] } {
  const idle = obs.pulls.length;
  const points = [
    ...Array.from(obs.t, (t, i) => ({ t, y: obs.y[i], weight: obs.weight[i], lot: obs.lot[i] })),
    ...times.map((t) => ({ t, y: 0, weight: 1, lot: idle })),
  ].sort((p, q) => p.t - q.t || p.lot - q.lot);
  return {
    obs: {
      t: Float64Array.from(points, (p) => p.t),
      y: Float64Array.from(points, (p) => p.y),
      weight: Float64Array.from(points, (p) => p.weight),
      lot: Int32Array.from(points, (p) => p.lot),
      pulls: Float64Array.of(...obs.pulls, 0),
    },
    at: times.map((t) => points.findIndex((p) => p.t === t && p.lot === idle)),
  };
}

/** The same observations with every lot's factor given by a rule. */
export function withFactors(obs: Observations, factor: (lot: number) => number): Observations {
  return { ...obs, pulls: Float64Array.from({ length: obs.pulls.length }, (_, lot) => factor(lot)) };
}
