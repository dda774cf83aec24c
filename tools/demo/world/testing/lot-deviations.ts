import { lineNamed, makeWorld, shiftReadings, type DemoWorld } from '..';

/** 06:00 by the plant's clock on Monday 2 March 2026. */
export const ENDS_AT = Date.UTC(2026, 2, 2, 6) / 1000;

/** One lot on one channel, as deviations from the product's nominal value. */
export interface LotDeviation {
  lot: string;
  product: string;
  at: number;
  mean: number;
  smallest: number;
  largest: number;
}

const cache = new Map<string, Map<string, LotDeviation[]>>();

function collect(world: DemoWorld, line: string): Map<string, LotDeviation[]> {
  const { schedule } = world.truth;
  const { channels } = lineNamed(line);
  const groups = new Map<
    string,
    { lot: string; product: string; channel: string; values: number[]; times: number[] }
  >();
  for (const shift of [...schedule.shifts, ...schedule.further]) {
    for (const { lot, product, channel, value, at } of shiftReadings(world, line, shift)) {
      const key = `${channel}/${lot}`;
      const group = groups.get(key) ?? { lot, product, channel, values: [], times: [] };
      group.values.push(value - channels.find(({ name }) => name === channel)!.specifications[product].nominal);
      group.times.push(at);
      groups.set(key, group);
    }
  }
  const mean = (values: number[]): number => values.reduce((sum, value) => sum + value, 0) / values.length;
  const byChannel = new Map<string, LotDeviation[]>(channels.map(({ name }) => [name, []]));
  for (const { lot, product, channel, values, times } of groups.values()) {
    byChannel.get(channel)!.push({
      lot,
      product,
      at: mean(times),
      mean: mean(values),
      smallest: Math.min(...values),
      largest: Math.max(...values),
    });
  }
  return byChannel;
}

/** All lots of a channel, the further shifts included, in time order. */
export function lotDeviations(line: string, channel: string, seed: number, endsAt = ENDS_AT): LotDeviation[] {
  const key = `${seed}/${endsAt}/${line}`;
  if (!cache.has(key)) cache.set(key, collect(makeWorld(seed, endsAt), line));
  return cache.get(key)!.get(channel)!;
}

/** Value at `at` of the least-squares line through the given lots. */
function lineThrough(lots: LotDeviation[], at: number): number {
  const meanAt = lots.reduce((sum, lot) => sum + lot.at, 0) / lots.length;
  const mean = lots.reduce((sum, lot) => sum + lot.mean, 0) / lots.length;
  let top = 0;
  let bottom = 0;
  for (const lot of lots) {
    top += (lot.at - meanAt) * (lot.mean - mean);
    bottom += (lot.at - meanAt) ** 2;
  }
  return mean + (top / bottom) * (at - meanAt);
}

/** Distance of a lot from the line through the other lots within a day of it and between the same breaks. */
export function distanceFromNeighbours(lots: LotDeviation[], number: string, breaksAt: number[]): number {
  const lot = lots.find((candidate) => candidate.lot === number)!;
  const segmentOf = (at: number): number => breaksAt.filter((breakAt) => breakAt < at).length;
  const neighbours = lots.filter(
    (other) => other !== lot && Math.abs(other.at - lot.at) < 86400 && segmentOf(other.at) === segmentOf(lot.at),
  );
  return lot.mean - lineThrough(neighbours, lot.at);
}

/** Mean of the first hundred lots and 3·MR̄/1.128 of them: control limits of an individuals chart (ISO 7870-2). */
export function individualsChart(lots: LotDeviation[]): { centre: number; halfWidth: number } {
  const reference = lots.slice(0, 100).map(({ mean }) => mean);
  const centre = reference.reduce((sum, mean) => sum + mean, 0) / reference.length;
  const ranges = reference.slice(1).map((mean, index) => Math.abs(mean - reference[index]));
  return { centre, halfWidth: (3 * ranges.reduce((sum, range) => sum + range, 0)) / ranges.length / 1.128 };
}
