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
  const pulls = new Uint8Array(Math.max(...lots) + 1).fill(1);
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
