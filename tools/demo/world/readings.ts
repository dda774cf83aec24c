import { lotsOf } from './lots';
import { drawsFor, type Draws } from './random';
import { modelOf } from './scatter';
import { truth, type DemoTruth, type PlantedLot } from './truth';
import type { DemoChannel, DemoLot, DemoReading, DemoShift } from './types';

const SHIFT_SECONDS = 28800;

/** The demo's readings are a function of the seed and of the end of the six weeks, and of nothing else. */
export interface DemoWorld {
  seed: number;
  truth: DemoTruth;
}

/** Seed of the demo as it is installed. */
export const DEMO_SEED = 2417;

/** @param seed any integer. @param endsAt end of the six weeks, s; a shift change. */
export function makeWorld(seed: number, endsAt: number): DemoWorld {
  return { seed, truth: truth(endsAt) };
}

interface ChannelInLot {
  draws: Draws;
  nominal: number;
  effect: number;
  planted: PlantedLot | undefined;
  taken: number;
}

function roundTo(resolution: number): (value: number) => number {
  const decimals = Math.max(0, Math.ceil(-Math.log10(resolution)));
  const steps = Math.round(1 / resolution);
  return (value) => Number((Math.round(value * steps) / steps).toFixed(decimals));
}

/** A channel's way of giving one reading after another; the lot's own effect is drawn when the lot begins. */
function reader(world: DemoWorld, line: string, channel: DemoChannel): (lot: DemoLot, at: number) => number {
  const scatter = modelOf(line).scatter[channel.name];
  const mine = <T extends { line: string; channel: string }>(item: T): boolean =>
    item.line === line && item.channel === channel.name;
  const movements = world.truth.movements.filter(mine);
  const badLots = world.truth.badLots.filter(mine);
  const round = roundTo(channel.characteristic.resolution);
  let current: (ChannelInLot & { lot: DemoLot }) | undefined;
  return (lot, at) => {
    if (current?.lot !== lot) {
      const draws = drawsFor(`${world.seed}/${line}/${channel.name}/${lot.number}`);
      const planted = badLots.find((bad) => bad.lot === lot.number);
      const own = scatter.betweenLots * draws.normal();
      const { nominal } = channel.specifications[lot.product];
      const effect = planted && planted.strays.length === 0 ? planted.size : planted ? 0 : own;
      current = { lot, draws, planted, nominal, effect, taken: 0 };
    }
    current.taken += 1;
    const { nominal, effect, planted, taken } = current;
    let value = nominal + effect + scatter.betweenReadings * current.draws.normal();
    for (const movement of movements) value += movement.valueAt(at);
    value += planted?.strays.find((stray) => stray.reading === taken)?.size ?? 0;
    return round(value);
  };
}

/** The readings of a line in a shift, in time order, at equal times in the order of the line's channels. */
export function* shiftReadings(world: DemoWorld, line: string, shift: DemoShift): Generator<DemoReading> {
  const { channels } = modelOf(line).line;
  const lots = lotsOf(world.seed, line, shift);
  const gauges = channels.map((channel) => ({
    channel,
    interval: SHIFT_SECONDS / channel.readingsPerShift,
    read: reader(world, line, channel),
  }));
  const tick = Math.min(...gauges.map((gauge) => gauge.interval));
  let position = 0;
  for (let elapsed = 0; shift.startsAt + elapsed < shift.endsAt; elapsed += tick) {
    const at = shift.startsAt + elapsed;
    while (at >= lots[position].endsAt) position += 1;
    const lot = lots[position];
    for (const { channel, interval, read } of gauges) {
      if (elapsed % interval !== 0) continue;
      const { number, product, quantity } = lot;
      yield { at, lot: number, product, quantity, channel: channel.name, value: read(lot, at) };
    }
  }
}
