/** One level stretch of a line that moves in steps, over [from, to] in epoch ms. */
export interface Step {
  from: number;
  to: number;
  value: number;
}

/**
 * The level stretches of a limit that each lot states for itself: neighbouring lots with the same value share one stretch,
 * which then covers the gap between them; a lot without the limit ends it.
 */
export function stepsOf(lots: readonly { startsAt: number; endsAt: number; value: number | null }[]): Step[] {
  const steps: Step[] = [];
  let isOpen = false;
  for (const lot of lots) {
    if (lot.value === null) {
      isOpen = false;
      continue;
    }
    const last = steps[steps.length - 1];
    if (isOpen && last.value === lot.value) last.to = Math.max(last.to, lot.endsAt);
    else steps.push({ from: lot.startsAt, to: lot.endsAt, value: lot.value });
    isOpen = true;
  }
  return steps;
}

/** The value in force at the newest stretch that begins before `to` and ends after `from`: where the line's word goes. */
export function lastStepWithin(steps: readonly Step[], from: number, to: number): Step | undefined {
  return steps.findLast((step) => step.from <= to && step.to >= from);
}
