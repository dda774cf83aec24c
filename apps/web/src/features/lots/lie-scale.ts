import type { VerdictView } from '@app/contracts';

/** A linear scale over every finite value that the drawing shows, with a little air at both ends. */
export function lieScale(verdict: VerdictView, width: number, air: number): ((value: number) => number) | null {
  const values = [
    verdict.lotMean,
    verdict.baseline,
    verdict.controlLow,
    verdict.controlHigh,
    verdict.lowerSpecification,
    verdict.upperSpecification,
    verdict.constant.low,
    verdict.constant.high,
  ].filter((value): value is number => value !== null && Number.isFinite(value));
  if (verdict.lotMean === null || !Number.isFinite(verdict.lotMean) || values.length < 2) return null;
  const [low, high] = [Math.min(...values), Math.max(...values)];
  if (!(high > low)) return null;
  return (value) => air + ((value - low) / (high - low)) * (width - 2 * air);
}
