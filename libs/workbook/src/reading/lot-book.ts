import type { LotSummary, ParsedReading } from '../types';
import { ownText } from './findings';

/** A lot as met, with what is needed to ask about its spelling. */
export interface LotEntry {
  summary: LotSummary;
  /** Where its number stood first. */
  sheet: string;
  row: number;
  rows: number;
}

/** The lots and channels met so far, with their counts. */
export class LotBook {
  private readonly lots = new Map<string, LotEntry & { lastRow: number }>();
  private readonly channels = new Map<number, number>();
  readings = 0;

  /** @param agreed spellings of lot numbers and the number that is meant */
  constructor(private readonly agreed: Readonly<Record<string, string>> = {}) {}

  /** The number that is meant by a spelling, as agreed. */
  meant(spelling: string): string {
    return Object.hasOwn(this.agreed, spelling) ? this.agreed[spelling] : spelling;
  }

  /** Whether a spelling has been spoken of. */
  isAgreed(spelling: string): boolean {
    return Object.hasOwn(this.agreed, spelling);
  }

  /** The lot's number as a text of its own, so that no piece of the file is kept for it. */
  own(lot: string): string {
    return this.lots.get(lot)?.summary.number ?? ownText(lot);
  }

  productOf(lot: string): string | null | undefined {
    return this.lots.get(lot)?.summary.product;
  }

  add({ lot, product, at, channelId, sheet, row }: ParsedReading): void {
    this.readings += 1;
    this.channels.set(channelId, (this.channels.get(channelId) ?? 0) + 1);
    const known = this.lots.get(lot);
    if (!known) {
      const summary = { number: lot, product, readings: 1, firstAt: at, lastAt: at };
      this.lots.set(lot, { summary, sheet, row, rows: 1, lastRow: row });
      return;
    }
    const { summary } = known;
    summary.readings += 1;
    summary.product ??= product;
    if (at < summary.firstAt) summary.firstAt = at;
    if (at > summary.lastAt) summary.lastAt = at;
    if (known.lastRow !== row) known.rows += 1;
    known.lastRow = row;
  }

  entries(): LotEntry[] {
    return [...this.lots.values()];
  }

  /** In order of their first reading. */
  listLots(): LotSummary[] {
    return this.entries()
      .map((entry) => entry.summary)
      .sort((a, b) => a.firstAt - b.firstAt);
  }

  listChannels(): { channelId: number; readings: number }[] {
    return [...this.channels].map(([channelId, readings]) => ({ channelId, readings }));
  }
}
