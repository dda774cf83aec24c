import { DEMO_SEED, demoBreaks, describePlant, lotMeanSd, makeWorld, movementAt, shiftReadings, truth } from '.';
import { distanceFromNeighbours, ENDS_AT, individualsChart, lotDeviations } from './testing/lot-deviations';

const DAY = 86400;
const SEEDS = [DEMO_SEED, 1, 2];
const planted = truth(ENDS_AT);
const last = planted.schedule.shifts[125];
const weightSd = lotMeanSd('Coater 2', 'Coat weight');
const breaksOf = (line: string, channel: string): number[] =>
  planted.breaks.filter((each) => each.line === line && each.channel === channel).map(({ at }) => at);
const badLot = (channel: string, isIn: (shift: number) => boolean) =>
  planted.badLots.find((bad) => bad.channel === channel && isIn(bad.shift.index))!;
const scoreOf = (line: string, channel: string, lot: string, seed: number): number =>
  distanceFromNeighbours(lotDeviations(line, channel, seed), lot, breaksOf(line, channel)) / lotMeanSd(line, channel);

describe('what is planted in the demo plant', () => {
  it('names three declared breaks: the window wiped twice, the viscometer adjusted once', () => {
    expect(demoBreaks(ENDS_AT)).toEqual(planted.breaks);
    expect(planted.breaks.map(({ line, channel, kind }) => `${line}/${channel}/${kind}`)).toEqual([
      'Coater 2/Coat weight/adjustment',
      'Slurry 3/Viscosity/adjustment',
      'Coater 2/Coat weight/adjustment',
    ]);
    const people = describePlant().people.filter(({ role }) => role === 'engineer' || role === 'quality_manager');
    for (const { at, who, reason } of planted.breaks) {
      expect(people.map(({ email }) => email)).toContain(who);
      expect(reason.length).toBeGreaterThan(20);
      expect(at).toBeGreaterThan(planted.schedule.startsAt);
      expect(at).toBeLessThan(last.startsAt);
    }
  });

  it('puts breaks between two readings, just before a lot begins', () => {
    for (const { at, line } of planted.breaks) {
      const shift = planted.schedule.shifts.find(({ startsAt, endsAt }) => at > startsAt && at < endsAt)!;
      const readings = [...shiftReadings(makeWorld(DEMO_SEED, ENDS_AT), line, shift)];
      const before = readings.filter((reading) => reading.at < at).pop()!;
      const after = readings.find((reading) => reading.at >= at)!;
      expect([at - before.at > 0, after.at - at]).toEqual([true, 30]);
      expect(Number(after.lot)).toBe(Number(before.lot) + 1);
    }
  });

  it.each(breaksOf('Coater 2', 'Coat weight'))('lets dirt lift coat weight until it is wiped off at %i', (at) => {
    const dirt = planted.movements.find(({ cause }) => cause === 'dirt on the window')!;
    expect(dirt.valueAt(at - 12 * DAY)).toBe(0);
    expect(dirt.valueAt(at) / weightSd).toBeGreaterThan(3.9);
    expect(dirt.valueAt(at) / weightSd).toBeLessThan(6.1);
    expect(dirt.valueAt(at + 60)).toBe(0);
    const lots = lotDeviations('Coater 2', 'Coat weight', DEMO_SEED);
    const meanOf = (from: number, to: number): number => {
      const some = lots.filter((lot) => lot.at > from && lot.at < to);
      return some.reduce((sum, lot) => sum + lot.mean, 0) / some.length;
    };
    expect((meanOf(at - DAY, at) - meanOf(at, at + DAY)) / weightSd).toBeGreaterThan(2.5);
  });

  it('lets the source decay slowly through all six weeks, whether the window is wiped or not', () => {
    const decay = planted.movements.find(({ cause }) => cause === 'source decay')!;
    const values = Array.from({ length: 43 }, (_, day) => decay.valueAt(planted.schedule.startsAt + day * DAY));
    expect(values.slice(1).every((value, day) => value > values[day])).toBe(true);
    expect(values[42] / weightSd).toBeCloseTo(2, 9);
  });

  it.each(['Web thickness', 'Oven exit temperature'])('swings %s once a day, highest in the afternoon', (channel) => {
    const lots = lotDeviations('Coater 2', channel, DEMO_SEED).slice(0, 500);
    const isAfternoon = (at: number): boolean => Math.abs(((at % DAY) - 15 * 3600) / 3600) < 4;
    const isNight = (at: number): boolean => Math.abs(((at % DAY) - 3 * 3600) / 3600) < 4;
    const bad = planted.badLots.map(({ lot }) => lot);
    const mean = (isIn: (at: number) => boolean): number => {
      const some = lots.filter((lot) => isIn(lot.at) && !bad.includes(lot.lot));
      return some.reduce((sum, lot) => sum + lot.mean, 0) / some.length;
    };
    expect((mean(isAfternoon) - mean(isNight)) / lotMeanSd('Coater 2', channel)).toBeGreaterThan(0.7);
  });

  it.each(SEEDS)(
    'hides a bad lot in the drift: 8 SDs from its neighbours, inside a constant chart (seed %i)',
    (seed) => {
      const { lot, isOutsideSpecification } = badLot('Coat weight', (shift) => shift < 100);
      const lots = lotDeviations('Coater 2', 'Coat weight', seed);
      const { centre, halfWidth } = individualsChart(lots);
      expect(isOutsideSpecification).toBe(false);
      expect(scoreOf('Coater 2', 'Coat weight', lot, seed)).toBeLessThan(-8);
      expect(Math.abs(lots.find((each) => each.lot === lot)!.mean - centre)).toBeLessThan(halfWidth);
    },
  );

  it.each(SEEDS)('holds good lots back by the constant chart in the drift that hides it (seed %i)', (seed) => {
    const lots = lotDeviations('Coater 2', 'Coat weight', seed);
    const { centre, halfWidth } = individualsChart(lots);
    const outside = lots.slice(0, 504).filter(({ mean }) => Math.abs(mean - centre) > halfWidth);
    expect(outside.length).toBeGreaterThan(50);
  });

  it.each(SEEDS)(
    'has two bad lots in the last shift, one by its score alone, one outside specification (seed %i)',
    (seed) => {
      const inLast = planted.badLots.filter(({ shift }) => shift.index === 125);
      expect(
        inLast.map(({ line, channel, isOutsideSpecification }) => [line, channel, isOutsideSpecification]),
      ).toEqual([
        ['Coater 2', 'Coat weight', false],
        ['Coater 2', 'Web thickness', true],
      ]);
      for (const { line, channel, lot } of inLast)
        expect(Math.abs(scoreOf(line, channel, lot, seed))).toBeGreaterThan(5);
    },
  );

  it.each(SEEDS)('shifts calender thickness for good, by less than a single lot would show (seed %i)', (seed) => {
    const { line, channel, at, sizeInLotSds } = planted.processShift;
    const lots = lotDeviations(line, channel, seed);
    const days = (from: number, to: number): number => {
      const some = lots.filter((lot) => lot.at > at + from * DAY && lot.at < at + to * DAY);
      return some.reduce((sum, lot) => sum + lot.mean, 0) / some.length;
    };
    expect(sizeInLotSds).toBeLessThan(3);
    expect((days(0, 3) - days(-3, 0)) / lotMeanSd(line, channel)).toBeGreaterThan(1.5);
    expect((days(5, 8) - days(-3, 0)) / lotMeanSd(line, channel)).toBeGreaterThan(1.5);
    expect(planted.breaks.some((each) => each.line === line)).toBe(false);
    expect(movementAt(planted, line, channel, at + 60, 'gauge')).toBe(0);
  });

  it.each(SEEDS)('says rightly of every bad lot whether it is outside specification (seed %i)', (seed) => {
    for (const { line, channel, lot, isOutsideSpecification } of planted.badLots) {
      const { product, smallest, largest } = lotDeviations(line, channel, seed).find((each) => each.lot === lot)!;
      const channels = describePlant().lines.find(({ name }) => name === line)!.channels;
      const { nominal, lower, upper } = channels.find(({ name }) => name === channel)!.specifications[product];
      expect(nominal + smallest < lower - 1e-9 || nominal + largest > upper + 1e-9).toBe(isOutsideSpecification);
    }
  });

  it('plants a lot that is outside specification in single readings while its mean is like its neighbours', () => {
    const { lot, strays } = badLot('pH', () => true);
    expect(strays).toHaveLength(2);
    for (const seed of SEEDS) expect(Math.abs(scoreOf('Slurry 3', 'pH', lot, seed))).toBeLessThan(2);
  });

  it('leaves the first twenty days free of bad lots, for reference lots', () => {
    expect(Math.min(...planted.badLots.map(({ shift }) => shift.index))).toBeGreaterThan(60);
  });

  it('gives each newcomer shift one bad lot', () => {
    expect(planted.badLots.filter(({ shift }) => shift.index > 125).map(({ shift }) => shift.index)).toEqual([
      126, 127,
    ]);
  });

  it.each([Date.UTC(2026, 3, 6, 5), Date.UTC(2026, 10, 2, 14), Date.UTC(2026, 6, 1, 21)])(
    'finds its places in six weeks that end at another time (%i)',
    (milliseconds) => {
      const other = truth(milliseconds / 1000);
      expect(other.badLots.map(({ lot }) => lot)).toEqual(planted.badLots.map(({ lot }) => lot));
      expect(other.schedule.shifts[125].endsAt).toBe(milliseconds / 1000);
      for (const { at } of other.breaks) expect(Number.isInteger(at)).toBe(true);
    },
  );
});
