import { ControlError, requireFinite } from './control-error';
import type { VarianceEstimate } from './variance-estimate';

/**
 * Variance of what is left beside a slow movement, without fitting it: each value is compared with the straight line through
 * its two neighbours, ε = a y₍ᵢ₋₁₎ + b y₍ᵢ₊₁₎ − yᵢ with a = (t₍ᵢ₊₁₎ − tᵢ) / (t₍ᵢ₊₁₎ − t₍ᵢ₋₁₎), b = 1 − a (Gasser, Sroka & Jennen-Steinmetz
 * 1986, Biometrika 73, 625–633). With known variances vᵢ added to a common σ²,
 * E ε² = σ² (a² + b² + 1) + a² v₍ᵢ₋₁₎ + b² v₍ᵢ₊₁₎ + vᵢ, hence σ² = Σ (ε² − known part) / Σ (a² + b² + 1).
 * A movement that is straight over three values does not enter; one of amplitude A and period P adds A² (1 − cos(2π spacing / P))² / 3:
 * 0.0005 A² at 22 spacings, 0.03 A² at 8. Plain successive differences would add A² (1 − cos(2π spacing / P)) / 2, 0.02 A² at 22 spacings and
 * 0.15 A² at 8, and so swallow the slow movement.
 *
 * @param at times, s, strictly increasing within a triple (triples that are not are passed over)
 * @param values in the unit
 * @param known variance vᵢ ≥ 0 of each value that is already accounted for, unit squared
 * @throws ControlError non-finite, bad-argument
 * @example pseudoResidualVariance([0, 1, 2], [0, 3, 0], [0, 0, 0]).variance // 6
 */
export function pseudoResidualVariance(
  at: ArrayLike<number>,
  values: ArrayLike<number>,
  known: ArrayLike<number>,
): VarianceEstimate {
  for (const list of [at, values, known]) requireFinite(list, 0);
  if (at.length !== values.length || known.length !== values.length)
    throw new ControlError('bad-argument', 'Times, values and known variances are of one length.');
  let squares = 0;
  let divisor = 0;
  let terms = 0;
  for (let i = 1; i + 1 < at.length; i += 1) {
    const span = at[i + 1] - at[i - 1];
    const a = (at[i + 1] - at[i]) / span;
    if (!(a > 0 && a < 1)) continue;
    const b = 1 - a;
    const epsilon = a * values[i - 1] + b * values[i + 1] - values[i];
    squares += epsilon * epsilon - (a * a * known[i - 1] + b * b * known[i + 1] + known[i]);
    divisor += a * a + b * b + 1;
    terms += 1;
  }
  if (terms === 0) return { variance: 0, wasNegative: false, terms };
  const estimate = squares / divisor;
  return { variance: Math.max(estimate, 0), wasNegative: estimate < 0, terms };
}
