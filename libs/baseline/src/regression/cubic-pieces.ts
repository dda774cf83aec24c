import type { BaselinePoint, PiecewiseCubic } from '../baseline-fit';

/** Cubics for a polynomial of degree 4 or 5: each misses it by (h/2)^4 / 4! of its fourth derivative at most. */
const PIECES_OF_QUINTIC = 1024;

/**
 * A curve as cubics between breaks. Up to degree 3 the pieces are the curve itself: value, slope and curvature at the left break, and the change of
 * curvature, which is exact however short the piece. Beyond, they take value and slope at both ends (Hermite).
 * @param curve evaluates the curve, from `from` to `to` (s)
 * @param inner breaks between the two, s, increasing
 * @param degree of the curve between breaks
 */
export function cubicPieces(
  curve: { at(t: number): BaselinePoint },
  from: number,
  to: number,
  inner: number[],
  degree: number,
): PiecewiseCubic {
  const breaks =
    degree > 3
      ? Float64Array.from({ length: PIECES_OF_QUINTIC + 1 }, (_, k) => from + ((to - from) * k) / PIECES_OF_QUINTIC)
      : Float64Array.of(from, ...inner, to);
  const m = breaks.length - 1;
  breaks[m] = to;
  const coefficients = new Float64Array(4 * m);
  let left = curve.at(breaks[0]);
  for (let k = 0; k < m; k++) {
    const right = curve.at(breaks[k + 1]);
    const h = breaks[k + 1] - breaks[k];
    coefficients[4 * k] = left.value;
    coefficients[4 * k + 1] = left.slope;
    if (degree > 3) {
      const chord = (right.value - left.value) / h;
      coefficients[4 * k + 2] = (3 * chord - 2 * left.slope - right.slope) / h;
      coefficients[4 * k + 3] = (left.slope + right.slope - 2 * chord) / h / h;
    } else {
      coefficients[4 * k + 2] = left.curvature / 2;
      coefficients[4 * k + 3] = (right.curvature - left.curvature) / (6 * h);
    }
    left = right;
  }
  return { breaks, coefficients };
}
