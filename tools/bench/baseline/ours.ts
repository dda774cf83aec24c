import { type BaselineFit, chooseAndFit, fitSmoothingSpline, type LotScores, type Observations } from '@app/baseline';

/** The fixed penalty: that of a drift period of this share of the window (half the amplitude of such a wave passes; Silverman 1984). */
export const PERIOD_SHARE = 1 / 8;

/** lambda = (T / 2 pi)^4 * (sum w) / range for T = range * PERIOD_SHARE. */
export function fixedLambda({ t, weight }: Observations): number {
  const range = t[t.length - 1] - t[0];
  const total = weight.reduce((sum, w) => sum + w, 0);
  return ((range * PERIOD_SHARE) / (2 * Math.PI)) ** 4 * (total / range);
}

export interface ScoredFit {
  fit: BaselineFit;
  scores: LotScores;
}

/** The exact fit with leverages and bands, and every lot against the fit without it. */
export function fitAndScore(obs: Observations, lambda: number): ScoredFit {
  const fit = fitSmoothingSpline(obs, lambda);
  return { fit, scores: fit.scoreLots() };
}

/** The same with lambda chosen by generalised cross-validation. */
export function chooseFitAndScore(obs: Observations): ScoredFit {
  const { fit } = chooseAndFit(obs, { method: 'smoothing-spline', rule: 'gcv' });
  return { fit, scores: fit.scoreLots() };
}

/** Arrays of one double a point that a scored fit answers with: value, slope, curvature, standard error, leverage, deleted residual; by lot residual and variance. */
const OUTPUTS = 8;

/** The floor: reads time, value, weight and lot of each point once, and writes each output once. */
export function floorOf({ t, y, weight, lot }: Observations, outputs: () => Float64Array[]): () => number {
  return () => {
    let sum = 0;
    for (let i = 0; i < t.length; i++) sum += t[i] + y[i] + weight[i] + lot[i];
    for (const output of outputs()) output.set(y);
    return sum;
  };
}

/** Arrays for the outputs of n points. */
export const makeOutputs = (n: number) => Array.from({ length: OUTPUTS }, () => new Float64Array(n));
