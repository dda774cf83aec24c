import type { Observations } from '@app/baseline';
import { measure, median } from './clock';
import { shareOfRange } from './curves';
import { type Exactness, measureExactness } from './exactness';
import { chooseFitAndScore, fitAndScore, fixedLambda, floorOf, makeOutputs } from './ours';
import { longSeries } from '../../../libs/baseline/src/testing/long-series';
import type { Yardstick } from './yardsticks';

export interface RouteFigures {
  seconds: number[];
  median: number;
  edf?: number;
  /** Largest difference from our fit at the same rule, as a share of our fit's range. */
  difference?: number;
}

export interface SizeFigures {
  n: number;
  lambda: number;
  /** By route: ours-fixed, ours-gcv, floor, floor-fresh, r-fixed, r-gcv, r-all-fixed, r-all-gcv, scipy-fixed; those of missing programs are absent. */
  routes: Record<string, RouteFigures>;
  exactness?: Exactness;
}

/** Every route at one size, one after the other. */
export function measureSize(n: number, repeats: number, yardsticks: Yardstick[], quadReference: string): SizeFigures {
  const series = longSeries(n);
  const lambda = fixedLambda(series);
  const routes: Record<string, RouteFigures> = {};
  const fitted = ours(series, lambda, repeats, routes);
  for (const yardstick of yardsticks) {
    for (const [name, route] of yardstick.run(series, lambda, repeats) ?? []) {
      const own = fitted[name.endsWith('-gcv') ? 'ours-gcv' : 'ours-fixed'];
      const { seconds, edf } = route;
      routes[name] = { seconds, median: median(seconds), edf, difference: shareOfRange(route.fitted, own) };
    }
  }
  return { n, lambda, routes, exactness: measureExactness(quadReference, series) };
}

function ours(series: Observations, lambda: number, repeats: number, routes: Record<string, RouteFigures>) {
  const n = series.t.length;
  const outputs = makeOutputs(n);
  const floors = { floor: () => outputs, 'floor-fresh': () => makeOutputs(n) };
  for (const [name, make] of Object.entries(floors)) {
    const { seconds, median } = measure(repeats, floorOf(series, make));
    routes[name] = { seconds, median };
  }
  const fitted: Record<string, Float64Array> = {};
  const runs = {
    'ours-fixed': () => fitAndScore(series, lambda),
    'ours-gcv': () => chooseFitAndScore(series),
  };
  for (const [name, run] of Object.entries(runs)) {
    const timing = measure(repeats, run);
    routes[name] = { seconds: timing.seconds, median: timing.median, edf: timing.last.fit.edf };
    fitted[name] = timing.last.fit.fitted;
  }
  return fitted;
}
