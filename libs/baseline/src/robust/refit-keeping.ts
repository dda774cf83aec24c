import { BaselineError } from '../baseline-error';
import type { BaselineFit } from '../baseline-fit';
import type { Observations } from '../observations';

type Refit = (obs: Observations) => BaselineFit;

/**
 * Refits with the factors; where the lots left determine no baseline, set-down lots are kept in full (their factor becomes 1 and they join `kept`): one at a time
 * the lot that completes the baseline among those of smallest |z|, which leaves as few bad lots in it as can be. All lots together determine one, so any
 * BaselineError means that these do not (knots beyond the last pulling lot included).
 * @param factor by lot; changed where lots are kept @param z score of each lot
 * @throws BaselineError as refit, where even all lots determine nothing
 */
export function refitKeeping(
  obs: Observations,
  refit: Refit,
  factor: Float64Array,
  z: Float64Array,
  kept: Set<number>,
): BaselineFit {
  const nearestFirst = Array.from(factor.keys())
    .filter((j) => factor[j] === 0 && obs.pulls[j] > 0)
    .sort((a, b) => Math.abs(z[a]) - Math.abs(z[b]) || a - b);
  /** The fit with the first m of the set-down lots in full. */
  const withFirst = (m: number) => {
    const pulls = Float64Array.from(obs.pulls, (pull, j) => pull * factor[j]);
    for (let k = 0; k < m; k++) pulls[nearestFirst[k]] = obs.pulls[nearestFirst[k]];
    return refit({ ...obs, pulls });
  };
  for (let most = nearestFirst.length; ;) {
    try {
      return withFirst(0);
    } catch (error) {
      if (most === 0 || !(error instanceof BaselineError)) throw error;
    }
    let few = 0;
    let enough = most;
    while (enough - few > 1) {
      const middle = (few + enough) >> 1;
      if (determines(() => withFirst(middle))) enough = middle;
      else few = middle;
    }
    const needed = nearestFirst[enough - 1];
    factor[needed] = 1;
    kept.add(needed);
    most = enough - 1;
  }
}

function determines(run: () => unknown): boolean {
  try {
    run();
    return true;
  } catch (error) {
    if (error instanceof BaselineError) return false;
    throw error;
  }
}
