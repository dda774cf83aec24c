import type { LotListItem, Page, SummaryContent, WeekFigures } from '@app/contracts';
import { findSummaryPlant, getSummaryContent, type PlantWeek, type SummaryPlant, weekStartingOn } from '@app/data';
import { filtersIn, lotsPath } from '../../apps/web/src/features/lots/filters';
import { type Figure, figureLink } from '../../apps/web/src/features/summary/figure-links';
import { insertManyWeeks } from '../../libs/data/src/testing/summary-week-rows';
import { startTestApp, type TestApp } from '../support/app';
import { signIn } from '../support/factories/people';
import { insertIntake, insertLot, insertReadings } from '../support/factories/lots';
import { insertPlant, type TestPlant } from '../support/factories/plant';

const HOUR = 3_600_000;

const ZONES: [string, string][] = [
  ['Europe/London', '2026-03-23'],
  ['America/New_York', '2026-10-26'],
  ['Australia/Lord_Howe', '2026-03-30'],
];

describe.each(ZONES)(
  'the lots behind the figures of a week in %s across a change of the clocks',
  (timeZone, startsOn) => {
    let app: TestApp;
    let place: TestPlant;
    let plant: SummaryPlant;
    let week: PlantWeek;
    let content: SummaryContent;
    let director: { authorization: string };
    beforeAll(async () => {
      app = await startTestApp();
      place = await insertPlant(app.database);
      await app.database('plants').where({ id: place.id }).update({ time_zone: timeZone, currency: 'EUR' });
      plant = (await findSummaryPlant(app.database, place.id)) as SummaryPlant;
      week = weekStartingOn(startsOn, timeZone);
      await insertManyWeeks(app.database, place, new Date(week.from.getTime() - 8 * 24 * HOUR), startsOn.length);
      const intakeId = await insertIntake(app.database, place);
      for (const [number, at] of [
        ['cross-in', week.from],
        ['cross-out', week.to],
      ] as const) {
        const lot = await insertLot(app.database, place, { number, startsAt: new Date(at.getTime() - HOUR) });
        await app
          .database('lots')
          .where({ id: lot.id })
          .update({ ends_at: new Date(at.getTime() + HOUR) });
        await insertReadings(app.database, place, { channel: place.channels[0], lot, intakeId }, [60, 60.1]);
      }
      content = await getSummaryContent(app.database, plant, week);
      director = await signIn(app, 'director@marrowby.example');
    }, 60_000);
    afterAll(() => app.close());

    /** As the page of lots reads the address that the figure leads to. */
    async function behind(figure: Figure, lineId: number | null): Promise<Page<LotListItem>> {
      const filters = filtersIn(new URL(figureLink(figure, lineId, startsOn), 'http://ebbline.example').searchParams);
      const path = lotsPath(filters, { id: plant.id, timeZone });
      return (await app.http.get(`/api${path}`).set(director).expect(200)).body as Page<LotListItem>;
    }
    const countOf = async (figure: Figure, lineId: number | null) => (await behind(figure, lineId)).total;

    async function compare(figures: WeekFigures, lineId: number | null): Promise<void> {
      const listed = {
        measured: await countOf('measured', lineId),
        scored: await countOf('scored', lineId),
        notFullyScored: await countOf('notFullyScored', lineId),
        held: await countOf('held', lineId),
        stillOpen: await countOf('stillOpen', lineId),
      };
      const { measured, scored, notFullyScored, held, stillOpen } = figures;
      expect(listed).toEqual({
        measured: measured.lots,
        scored: scored.lots,
        notFullyScored,
        held: held.lots,
        stillOpen: stillOpen.lots,
      });
      for (const { disposition, lots } of figures.decided)
        expect([disposition, await countOf({ disposition }, lineId)]).toEqual([disposition, lots]);
    }

    it('are as many as the figure says, of the plant and of each line', async () => {
      await compare(content.total.week, null);
      for (const { line, week: figures } of content.lines) await compare(figures, line.id);
      const { measured, scored, notFullyScored, held, decided, stillOpen } = content.total.week;
      for (const count of [measured.lots, scored.lots, notFullyScored, held.lots, decided.length, stillOpen.lots])
        expect(count).toBeGreaterThan(1);
    });

    it('without a score are those of the channel and of the reason', async () => {
      expect(content.notScored.length).toBeGreaterThan(2);
      for (const row of content.notScored)
        expect([row.channel.name, row.reason, await countOf(row, row.line.id)]).toEqual([
          row.channel.name,
          row.reason,
          row.lots,
        ]);
    });

    it('have the lot that ran into the week, and not the one that ran out of it', async () => {
      const numbers = (await behind('measured', place.lines[0].id)).items.map(({ number }) => number);
      expect(numbers).toContain('cross-in');
      expect(numbers).not.toContain('cross-out');
    });
  },
);
