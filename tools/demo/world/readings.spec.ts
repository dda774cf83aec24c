import { createHash } from 'node:crypto';
import { DateTime } from 'luxon';
import { DEMO_SEED, describePlant, lotMeanSd, lotsOf, makeWorld, shiftReadings, truth } from '.';
import { ENDS_AT, lotDeviations } from './testing/lot-deviations';

const { lines } = describePlant();
const world = makeWorld(DEMO_SEED, ENDS_AT);
const { schedule } = world.truth;
const channels = lines.flatMap((line) => line.channels.map((channel) => [line.name, channel] as const));

function fingerprint(seed: number): string {
  const hash = createHash('sha256');
  for (const shift of schedule.shifts.slice(-9)) {
    for (const { name } of lines)
      hash.update(JSON.stringify([...shiftReadings(makeWorld(seed, ENDS_AT), name, shift)]));
  }
  return hash.digest('hex');
}

const counts = (line: string, shift: (typeof schedule.shifts)[number], from = world): Record<string, number> => {
  const found: Record<string, number> = {};
  for (const { channel } of shiftReadings(from, line, shift)) found[channel] = (found[channel] ?? 0) + 1;
  return found;
};

describe('the readings of the demo plant', () => {
  it('are the same bytes for the same seed and other ones for another', () => {
    expect(fingerprint(5)).toBe(fingerprint(5));
    expect(fingerprint(6)).not.toBe(fingerprint(5));
  });

  it('do not depend on which shifts were asked for before', () => {
    const alone = [...shiftReadings(makeWorld(DEMO_SEED, ENDS_AT), 'Slurry 3', schedule.shifts[77])];
    for (const shift of schedule.shifts.slice(70, 77)) for (const _ of shiftReadings(world, 'Slurry 3', shift));
    expect([...shiftReadings(world, 'Slurry 3', schedule.shifts[77])]).toEqual(alone);
  });

  it('number 40 a shift and channel, coat weight 480, in time order and within the shift', () => {
    for (const shift of [schedule.shifts[0], schedule.shifts[64], schedule.further[1]]) {
      expect(counts('Coater 2', shift)).toEqual({
        'Coat weight': 480,
        'Web thickness': 40,
        'Oven exit temperature': 40,
      });
      expect(counts('Calender 1', shift)).toEqual({ Thickness: 40, 'Nip force': 40 });
      expect(counts('Slurry 3', shift)).toEqual({ Viscosity: 40, pH: 40, Density: 40 });
      const times = [...shiftReadings(world, 'Coater 2', shift)].map(({ at }) => at);
      expect(times).toEqual([...times].sort((a, b) => a - b));
      expect(times[0]).toBe(shift.startsAt);
      expect(times[times.length - 1]).toBeLessThan(shift.endsAt);
    }
  });

  it.each([
    ['2026-04-06T06:00', 7, { 'Coat weight': 420, 'Web thickness': 35, 'Oven exit temperature': 35 }],
    ['2026-11-02T06:00', 9, { 'Coat weight': 540, 'Web thickness': 45, 'Oven exit temperature': 45 }],
  ])('keep their interval in the night in which the clocks change (six weeks to %s)', (end, hours, expected) => {
    const other = makeWorld(3, DateTime.fromISO(end, { zone: 'Europe/London' }).toSeconds());
    const night = other.truth.schedule.shifts.find((shift) => shift.endsAt - shift.startsAt === hours * 3600)!;
    expect(counts('Coater 2', night, other)).toEqual(expected);
  });

  it('lie in lots whose numbers occur once on the line, four a shift, each beginning where the last one ended', () => {
    for (const { name, products } of lines) {
      const lots = [...schedule.shifts, ...schedule.further].flatMap((shift) => lotsOf(DEMO_SEED, name, shift));
      expect(lots).toHaveLength(512);
      expect(new Set(lots.map(({ number }) => number)).size).toBe(512);
      expect(lots.slice(1).every((lot, index) => lot.startsAt === lots[index].endsAt)).toBe(true);
      const made = products.map(({ code }) => lots.filter(({ product }) => product === code).length);
      expect(Math.min(...made)).toBeGreaterThan(150);
      expect(lots.every(({ quantity }) => quantity > 0 && quantity % 10 === 0)).toBe(true);
    }
    const all = lines.flatMap(({ name }) => schedule.shifts.flatMap((shift) => lotsOf(DEMO_SEED, name, shift)));
    expect(new Set(all.map(({ number }) => number)).size).toBe(126 * 4 * 3);
  });

  it.each(channels)('on %s, $name: are multiples of the resolution', (line, { name, characteristic }) => {
    const { resolution } = characteristic;
    for (const { channel, value } of shiftReadings(world, line, schedule.shifts[50])) {
      if (channel === name) expect(Math.abs(value / resolution - Math.round(value / resolution))).toBeLessThan(1e-6);
    }
  });

  it.each(channels.flatMap(([line, channel]) => [DEMO_SEED, 1, 2].map((seed) => [line, channel.name, seed] as const)))(
    'on %s, %s, seed %i: lie inside specification in every lot that was not planted bad',
    (line, name, seed) => {
      const bad = new Set(
        truth(ENDS_AT)
          .badLots.filter((lot) => lot.line === line)
          .map(({ lot }) => lot),
      );
      const channel = lines.flatMap((each) => each.channels).find((each) => each.name === name)!;
      for (const { lot, product, smallest, largest } of lotDeviations(line, name, seed)) {
        const { nominal, lower, upper } = channel.specifications[product];
        if (bad.has(lot)) continue;
        expect(nominal + smallest).toBeGreaterThan(lower);
        expect(nominal + largest).toBeLessThan(upper);
      }
    },
  );

  it.each(channels)('on %s, $name: go on without a step where the product changes', (line, { name }) => {
    const lots = lotDeviations(line, name, DEMO_SEED);
    const { badLots, breaks } = world.truth;
    const isBad = (lot: string): boolean => badLots.some((bad) => bad.line === line && bad.lot === lot);
    const steps = lots.slice(1).flatMap((next, index) => {
      const before = lots[index];
      const crosses = breaks.some((each) => each.channel === name && each.at > before.at && each.at < next.at);
      return next.product === before.product || isBad(next.lot) || isBad(before.lot) || crosses
        ? []
        : [next.mean - before.mean];
    });
    const mean = steps.reduce((sum, step) => sum + step, 0) / steps.length;
    expect(steps.length).toBeGreaterThan(30);
    expect(Math.abs(mean)).toBeLessThan((4 * Math.SQRT2 * lotMeanSd(line, name)) / Math.sqrt(steps.length));
    expect(Math.max(...steps.map(Math.abs))).toBeLessThan(5 * Math.SQRT2 * lotMeanSd(line, name));
  });

  it('of a line and day take a few milliseconds', () => {
    const before = performance.now();
    let readings = 0;
    for (const shift of schedule.shifts) for (const _ of shiftReadings(world, 'Coater 2', shift)) readings += 1;
    expect(readings).toBe(126 * 560);
    expect((performance.now() - before) / 42).toBeLessThan(50);
  });
});
