import type { LotSummary, ParsedReading } from '../types';
import { ownText } from './findings';

/** The lots and channels met so far, with their counts. */
export class LotBook {
  private readonly lots = new Map<string, LotSummary>();
  private readonly channels = new Map<number, number>();
  readings = 0;

  /** The lot's number as a text of its own, so that no piece of the file is kept for it. */
  own(lot: string): string {
    return this.lots.get(lot)?.number ?? ownText(lot);
  }

  productOf(lot: string): string | null | undefined {
    return this.lots.get(lot)?.product;
  }

  add({ lot, product, at, channelId }: ParsedReading): void {
    this.readings += 1;
    this.channels.set(channelId, (this.channels.get(channelId) ?? 0) + 1);
    const known = this.lots.get(lot);
    if (!known) {
      this.lots.set(lot, { number: lot, product, readings: 1, firstAt: at, lastAt: at });
      return;
    }
    known.readings += 1;
    known.product ??= product;
    if (at < known.firstAt) known.firstAt = at;
    if (at > known.lastAt) known.lastAt = at;
  }

  /** In order of their first reading. */
  listLots(): LotSummary[] {
    return [...this.lots.values()].sort((a, b) => a.firstAt - b.firstAt);
  }

  listChannels(): { channelId: number; readings: number }[] {
    return [...this.channels].map(([channelId, readings]) => ({ channelId, readings }));
  }
}
