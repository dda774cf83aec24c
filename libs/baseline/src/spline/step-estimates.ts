import type { StepEstimates } from '../baseline-fit';
import { STATE_SIZE } from './information-state';
import type { FilteredSeries } from './filtered-series';

/** Where the baseline follows a step but for this share of what either side knows, the estimate has no digits. */
const FOLLOWED = 1e-12;

/**
 * The step that begins at each point, by generalised least squares with the baseline free to follow: estimate x' A y / x' A x and standard error
 * 1/sqrt(x' A x), A = W (I - S), x = 0 before the point and 1 from it on.
 *
 * Earlier points say of the state z = (g, g') just before the point that L z = h, the point and all later ones say L' (z + (delta, 0)) = h'. So the
 * difference of the two opinions, L'^-1 h' - L^-1 h, is (delta, 0) with covariance L^-1 + L'^-1, and the information on delta is the first entry of
 * (L^-1 + L'^-1)^-1 = L (L + L')^-1 L' = (|L'| L + |L| L') / |L + L'| (2 x 2 matrices): a sum of non-negative terms, exact where
 * sum w - x' W S x has no digits. The numerator is the costate h' - L' z = L z - h = sum of w (y - g) from the point on, from the side with the smaller terms.
 * Whatever lies before is as good a step of the opposite sign, since A 1 = 0. O(n).
 */
export function stepEstimates({ series, forward, backward }: FilteredSeries): StepEstimates {
  const { n, pull, r, weightScale } = series;
  const estimate = new Float64Array(n);
  const standardError = new Float64Array(n).fill(Infinity);
  for (let k = 0, i = 0; k < n; k++, i += STATE_SIZE) {
    const w = pull[k];
    const a = forward[i];
    const b = forward[i + 1];
    const c = forward[i + 2];
    const det = forward[i + 3];
    const ab = backward[i] + w;
    const bb = backward[i + 1];
    const cb = backward[i + 2];
    const detb = backward[i + 3] + w * cb;
    const h0 = forward[i + 4];
    const h0b = backward[i + 4] + w * r[k];
    const h1 = forward[i + 5] - backward[i + 5];
    const s = 1 / (det + detb + a * cb + ab * c + 2 * b * bb);
    const information = (det * ab + detb * a) * s;
    if (!(information > FOLLOWED * Math.min(a, ab))) continue;
    const value = ((c + cb) * (h0 + h0b) + (b - bb) * h1) * s;
    const slope = ((a + ab) * h1 + (b - bb) * (h0 + h0b)) * s;
    // Backward states speak of (g, -g').
    const before = Math.abs(a * value) + Math.abs(b * slope) + Math.abs(h0);
    const after = Math.abs(ab * value) + Math.abs(bb * slope) + Math.abs(h0b);
    const costate = before < after ? a * value - b * slope - h0 : h0b - ab * value - bb * slope;
    estimate[k] = costate / information;
    standardError[k] = 1 / Math.sqrt(information * weightScale);
  }
  return { estimate, standardError };
}
