/** The golden section's share, (3 - sqrt 5) / 2. */
const GOLDEN = 0.3819660112501051;

/** A minimum of a function of one variable inside an interval. */
export interface Minimum {
  x: number;
  value: number;
  hasConverged: boolean;
}

/**
 * Brent's method for a local minimum inside [low, high]: golden sections, with parabolas where they help (Brent 1973, Algorithms for Minimization
 * without Derivatives, ch. 5). Values may be +Infinity. The ends themselves are approached, never evaluated.
 * @param f function to minimise @param tolerance absolute, on x, > 0 @param maxEvaluations default 60
 */
export function minimiseInside(
  f: (x: number) => number,
  low: number,
  high: number,
  tolerance: number,
  maxEvaluations = 60,
): Minimum {
  let x = low + GOLDEN * (high - low);
  let fx = f(x);
  let w = x;
  let fw = fx;
  let v = x;
  let fv = fx;
  let step = 0;
  let before = 0;
  for (let k = 1; k < maxEvaluations; k++) {
    const middle = 0.5 * (low + high);
    if (Math.abs(x - middle) <= 2 * tolerance - 0.5 * (high - low)) return { x, value: fx, hasConverged: true };
    const parabola = parabolaStep(x, fx, w, fw, v, fv);
    const isUsable =
      Math.abs(before) > tolerance &&
      Math.abs(parabola) < Math.abs(0.5 * before) &&
      x + parabola > low &&
      x + parabola < high;
    if (isUsable) {
      before = step;
      step = parabola;
      if (x + step - low < 2 * tolerance || high - x - step < 2 * tolerance) step = x < middle ? tolerance : -tolerance;
    } else {
      before = x < middle ? high - x : low - x;
      step = GOLDEN * before;
    }
    const u = x + (Math.abs(step) >= tolerance ? step : Math.sign(step) * tolerance);
    const fu = f(u);
    if (fu <= fx) {
      if (u < x) high = x;
      else low = x;
      v = w;
      fv = fw;
      w = x;
      fw = fx;
      x = u;
      fx = fu;
    } else {
      if (u < x) low = u;
      else high = u;
      if (fu <= fw || w === x) {
        v = w;
        fv = fw;
        w = u;
        fw = fu;
      } else if (fu <= fv || v === x || v === w) {
        v = u;
        fv = fu;
      }
    }
  }
  return { x, value: fx, hasConverged: false };
}

/** Step from x to the vertex of the parabola through three points; NaN (never usable) when there is none. */
function parabolaStep(x: number, fx: number, w: number, fw: number, v: number, fv: number): number {
  const r = (x - w) * (fx - fv);
  const q = (x - v) * (fx - fw);
  return ((x - v) * q - (x - w) * r) / (2 * (r - q));
}
