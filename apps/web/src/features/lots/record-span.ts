const DAY_MS = 86_400_000;

/** The stretch of a channel's record to look at for one lot: three days before it and one after. */
export function recordSpanAround(lot: { startsAt: string; endsAt: string }): { from: number; to: number } {
  return { from: Date.parse(lot.startsAt) - 3 * DAY_MS, to: Date.parse(lot.endsAt) + DAY_MS };
}
