import type { DemoLine } from '../types';

/** How the readings of a channel scatter, as standard deviations in the characteristic's unit. */
export interface ChannelScatter {
  betweenLots: number;
  /** Between the readings of one lot: product and gauge together. */
  betweenReadings: number;
  /** Half of the daily swing's height; 0 for none. */
  swingAmplitude: number;
}

/** A line as the plant knows it, and beside it what only the generator knows. */
export interface LineModel {
  line: DemoLine;
  /** By channel name. */
  scatter: Record<string, ChannelScatter>;
  /** Product of each shift, repeated: 0 or 1 for the line's first or second product. */
  campaign: string;
  /** Quantity of a lot of two hours. */
  quantityPerLot: number;
}
