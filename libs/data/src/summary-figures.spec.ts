import type { Measure, SummaryContent, WeekFigures } from '@app/contracts';
import { findSummaryPlant, getSummaryContent, type SummaryPlant } from './summary-facts';
import { weekStartingOn } from './summary-week';
import { openPlantDatabase, type PlantDatabase } from './testing/plant-database';
import { insertManyWeeks } from './testing/summary-week-rows';

/**
 * The second way: one question a figure, lot by lot, with the week told apart by PostgreSQL's own zone rules
 * (`at time zone`, `date_trunc('week', …)`) instead of by bounds.
 */
const IN_WEEK = (at: string) => `date_trunc('week', ${at} at time zone p.time_zone) = cast(:monday as timestamp)`;
const WEEK_END = `((cast(:monday as timestamp) + interval '7 days') at time zone p.time_zone)`;
const SCORES = `(select count(*) from lot_channels lc where lc.lot_id = l.id and lc.count > 0)`;
const SCORED = `(select count(*) from verdicts v where v.lot_id = l.id and v.is_current and v.control_state <> 'not_scored')`;
const OPEN = `exists (select 1 from holds h where h.lot_id = l.id and h.opened_at < ${WEEK_END} and not exists (select 1 from decision_holds x
  join decisions d on d.id = x.decision_id where x.hold_id = h.id and d.decided_at < ${WEEK_END}))`;

const CONDITIONS = {
  measured: `${IN_WEEK('l.ends_at')} and ${SCORES} > 0`,
  scored: `${IN_WEEK('l.ends_at')} and ${SCORED} > 0`,
  notFullyScored: `${IN_WEEK('l.ends_at')} and ${SCORES} > ${SCORED}`,
  held: `exists (select 1 from holds h where h.lot_id = l.id and ${IN_WEEK('h.opened_at')})`,
  stillOpen: OPEN,
};

const ZONES: [string, string][] = [
  ['Europe/London', '2026-03-23'],
  ['America/New_York', '2026-10-26'],
  ['Australia/Lord_Howe', '2026-03-30'],
];

describe.each(ZONES)('the figures of a week in %s across a change of the clocks', (zone, startsOn) => {
  let place: PlantDatabase;
  let plant: SummaryPlant;
  let content: SummaryContent;
  beforeAll(async () => {
    place = await openPlantDatabase();
    await place.db('plants').where({ id: place.plant.id }).update({ time_zone: zone, currency: 'EUR' });
    plant = (await findSummaryPlant(place.db, place.plant.id)) as SummaryPlant;
    const week = weekStartingOn(startsOn, zone);
    await insertManyWeeks(
      place.db,
      place.plant,
      new Date(week.from.getTime() - 8 * 86_400_000),
      startsOn.length + zone.length,
    );
    content = await getSummaryContent(place.db, plant, week);
  }, 60_000);
  afterAll(() => place.close());

  const lotsWhere = async (condition: string, lineId: number | null, monday = startsOn) =>
    (
      await place.db.raw(
        `select l.id, l.quantity, l.quantity_unit as unit, l.quantity * q.value_per_unit as value from lots l join lines n on n.id = l.line_id
         join plants p on p.id = n.plant_id join products q on q.id = l.product_id
         where n.plant_id = :plantId and (l.line_id = :lineId or cast(:lineId as bigint) is null) and ${condition}`,
        { plantId: plant.id, lineId, monday },
      )
    ).rows as { quantity: number | null; unit: string | null; value: number | null }[];

  /** Added up in the test. */
  function added(lots: { quantity: number | null; unit: string | null; value: number | null }[]): Measure {
    const amounts: Record<string, number> = {};
    for (const { quantity, unit } of lots)
      if (quantity !== null) amounts[unit ?? ''] = (amounts[unit ?? ''] ?? 0) + quantity;
    const valued = lots.filter(({ value }) => value !== null);
    return {
      lots: lots.length,
      quantities: Object.keys(amounts)
        .sort()
        .map((unit) => ({ unit, amount: amounts[unit] })),
      lotsWithoutQuantity: lots.filter(({ quantity }) => quantity === null).length,
      value:
        valued.length === 0
          ? null
          : {
              amount: expect.closeTo(
                valued.reduce((sum, { value }) => sum + (value ?? 0), 0),
                6,
              ),
              currency: 'EUR',
              lotsWithout: lots.length - valued.length,
            },
    };
  }

  async function compare(figures: WeekFigures, lineId: number | null, monday = startsOn): Promise<void> {
    for (const kind of ['measured', 'scored', 'held', 'stillOpen'] as const)
      expect([kind, figures[kind]]).toEqual([kind, added(await lotsWhere(CONDITIONS[kind], lineId, monday))]);
    expect(figures.notFullyScored).toBe((await lotsWhere(CONDITIONS.notFullyScored, lineId, monday)).length);
  }

  it('are those of the rows, counted one by one, of each line and of the plant, and of the week before', async () => {
    const before = new Date(new Date(startsOn).getTime() - 7 * 86_400_000).toISOString().slice(0, 10);
    await compare(content.total.week, null);
    await compare(content.total.lastWeek as WeekFigures, null, before);
    expect(content.lines).toHaveLength(2);
    for (const { line, week, lastWeek } of content.lines) {
      await compare(week, line.id);
      await compare(lastWeek as WeekFigures, line.id, before);
    }
    expect(content.total.week.measured.lots).toBeGreaterThan(20);
    expect(content.total.week.stillOpen.lots).toBeGreaterThan(2);
  });

  it('of what was decided are those of the signed parts', async () => {
    const signed = (
      await place.db.raw(
        `select t.disposition, l.id as lot, t.quantity, l.quantity_unit as unit, t.quantity * q.value_per_unit as value from decision_parts t
         join decisions d on d.id = t.decision_id join plants p on p.id = d.plant_id join holds h on h.id = t.hold_id
         join lots l on l.id = h.lot_id join products q on q.id = l.product_id where ${IN_WEEK('d.decided_at')}`,
        { monday: startsOn },
      )
    ).rows as { disposition: string; quantity: number | null; unit: string | null; value: number | null }[];
    const kinds = [...new Set(signed.map(({ disposition }) => disposition))].sort();
    expect(content.total.week.decided.map(({ disposition }) => disposition).sort()).toEqual(kinds);
    for (const { disposition, ...measure } of content.total.week.decided)
      expect(measure).toEqual(added(signed.filter((part) => part.disposition === disposition)));
    expect(kinds.length).toBeGreaterThan(1);
  });

  it('of what waits by age add up to all that waits, and each hold has the age that its instant gives', () => {
    const { stillOpen, stillOpenByAge } = content.total.week;
    expect(stillOpenByAge.map(({ fromHours, toHours }) => [fromHours, toHours])).toEqual([
      [0, 8],
      [8, 24],
      [24, 72],
      [72, null],
    ]);
    expect(stillOpenByAge.reduce((sum, { lots }) => sum + lots, 0)).toBe(stillOpen.lots);
    expect(content.openHolds.count).toBe(stillOpen.lots);
    const end = new Date(content.week.to).getTime();
    for (const { fromHours, toHours, lots } of stillOpenByAge)
      expect(
        content.openHolds.holds.filter(({ openedAt }) => {
          const hours = (end - new Date(openedAt).getTime()) / 3_600_000;
          return hours >= fromHours && (toHours === null || hours < toHours);
        }),
      ).toHaveLength(lots);
  });

  it('of what removing the slow movement changed are those of the verdicts, lot by lot', async () => {
    const verdicts = await place.db('verdicts').where({ is_current: true }).select<
      {
        lot_id: number;
        control_state: string;
        constant_state: string;
      }[]
    >('lot_id', 'control_state', 'constant_state');
    const lots = (
      await place.db.raw(`select l.id from lots l join plants p on true where ${IN_WEEK('l.ends_at')}`, {
        monday: startsOn,
      })
    ).rows as { id: number }[];
    const isOutside = (lot: number, by: 'control_state' | 'constant_state') =>
      verdicts.some(
        (verdict) =>
          verdict.lot_id === lot && verdict.control_state !== 'not_scored' && verdict[by] === 'outside_control_limits',
      );
    const { onlyPlan, onlyUnadjusted } = content.changedByBaseline;
    const ids = ({ lots: listed }: typeof onlyPlan) => listed.map(({ lot }) => lot.id).sort((a, b) => a - b);
    const wanted = (by: 'control_state' | 'constant_state', not: 'control_state' | 'constant_state') =>
      lots
        .filter(({ id }) => isOutside(id, by) && !isOutside(id, not))
        .map(({ id }) => id)
        .sort((a, b) => a - b);
    expect(ids(onlyPlan)).toEqual(wanted('control_state', 'constant_state'));
    expect(ids(onlyUnadjusted)).toEqual(wanted('constant_state', 'control_state'));
    expect([onlyPlan.count, onlyUnadjusted.count]).toEqual([ids(onlyPlan).length, ids(onlyUnadjusted).length]);
    expect(onlyPlan.count * onlyUnadjusted.count).toBeGreaterThan(0);
    const held = await place.db('holds').select<{ lot_id: number; state: string }[]>('lot_id', 'state');
    for (const { lot, hold } of onlyPlan.lots)
      expect(hold?.state ?? null).toBe(held.find(({ lot_id }) => lot_id === lot.id)?.state ?? null);
  });

  it('of lots without a score are one a lot, channel and reason', async () => {
    const { rows } = await place.db.raw<{ rows: { name: string; reason: string }[] }>(
      `select c.name, coalesce((select v.not_scored_reason from verdicts v where v.lot_id = l.id and v.channel_id = c.id and v.is_current), 'not_judged') as reason
       from lots l join lot_channels lc on lc.lot_id = l.id join channels c on c.id = lc.channel_id join plants p on p.id = c.plant_id
       where ${IN_WEEK('l.ends_at')} and not exists (select 1 from verdicts v where v.lot_id = l.id and v.channel_id = c.id and v.is_current
         and v.control_state <> 'not_scored')`,
      { monday: startsOn },
    );
    const counted = new Map<string, number>();
    for (const { name, reason } of rows) counted.set(`${name} ${reason}`, (counted.get(`${name} ${reason}`) ?? 0) + 1);
    expect(Object.fromEntries(content.notScored.map((row) => [`${row.channel.name} ${row.reason}`, row.lots]))).toEqual(
      Object.fromEntries(counted),
    );
  });
});
