import { type Answerer, type SummaryContent, summaryHeadline, summaryQuestions } from '@app/contracts';
import { findRow, type Queryable, rows } from './database';
import { listSummaryChangedLots } from './summary-changed-lots';
import { type FigureRow, figuresOf, listSummaryFigures } from './summary-figures';
import { listSummaryGauges } from './summary-gauges';
import { listSummaryIntakes } from './summary-intakes';
import { listSummaryNotScored } from './summary-not-scored';
import { listSummaryOpenHolds } from './summary-open-holds';
import { type PlantWeek, weekBefore } from './summary-week';
import { ofWeek } from './summary-weeks-sql';

export interface SummaryPlant {
  id: number;
  plantId: number;
  name: string;
  timeZone: string;
  currency: string | null;
  managerHours: number;
  directorHours: number;
}

const PLANT = `select id, id as "plantId", name, time_zone as "timeZone", currency, reminder_manager_hours as "managerHours",
  reminder_director_hours as "directorHours" from plants`;

export function findSummaryPlant(db: Queryable, plantId: number): Promise<SummaryPlant | undefined> {
  return findRow<SummaryPlant>(db, `${PLANT} where id = :plantId`, { plantId });
}

export function listSummaryPlants(db: Queryable): Promise<SummaryPlant[]> {
  return rows<SummaryPlant>(db, `${PLANT} order by id`);
}

/** When the plant's first reading was taken; null without any. */
export async function findFirstReadingAt(db: Queryable, plantId: number): Promise<Date | null> {
  const row = await findRow<{ at: Date | null }>(
    db,
    `select min(f.first_at) as at from channels c
     cross join lateral (select first_at from lot_channels where channel_id = c.id and first_at is not null order by first_at limit 1) f
     where c.plant_id = :plantId`,
    { plantId },
  );
  return row?.at ?? null;
}

/** Everything that is told of a plant's week, as the database has it now. One consistent view needs a repeatable-read transaction. */
export async function getSummaryContent(db: Queryable, plant: SummaryPlant, week: PlantWeek): Promise<SummaryContent> {
  const last = weekBefore(week, plant.timeZone);
  const weeks = { week, last };
  const firstReadingAt = await findFirstReadingAt(db, plant.id);
  const hasLastWeek = firstReadingAt !== null && firstReadingAt < week.from;
  const ageLimits = [...new Set([plant.managerHours, plant.directorHours, 3 * plant.directorHours])];
  const found = await listSummaryFigures(db, plant.id, weeks, ageLimits);
  const bothWeeks = (of: FigureRow[]) => {
    const shape = { ageLimits, currency: plant.currency };
    return {
      week: figuresOf(ofWeek(of, 0), shape),
      lastWeek: hasLastWeek ? figuresOf(ofWeek(of, 1), shape) : null,
    };
  };
  const facts = {
    plant: { id: plant.id, name: plant.name, timeZone: plant.timeZone, currency: plant.currency },
    week: { startsOn: week.startsOn, from: week.from.toISOString(), to: week.to.toISOString() },
    reminderHours: { manager: plant.managerHours, director: plant.directorHours },
    total: bothWeeks(found),
    lines: (await listSummaryLines(db, plant.id, week.to)).map((line) => ({
      line,
      ...bothWeeks(found.filter((row) => row.lineId === line.id)),
    })),
    openHolds: await listSummaryOpenHolds(db, plant.id, week),
    changedByBaseline: await listSummaryChangedLots(db, plant.id, weeks, hasLastWeek),
    gauges: await listSummaryGauges(db, plant.id, weeks),
    notScored: await listSummaryNotScored(db, plant.id, weeks),
    intakes: await listSummaryIntakes(db, plant.id, week),
  };
  const whatToAsk = summaryQuestions(facts, await listAnswerers(db, plant.id));
  return { ...facts, headline: summaryHeadline(facts), whatToAsk };
}

/** Lines of the plant: those in use, and those that a lot of theirs still speaks of. */
function listSummaryLines(db: Queryable, plantId: number, at: Date): Promise<{ id: number; name: string }[]> {
  return rows(
    db,
    `select id, name from lines where plant_id = :plantId and (retired_at is null or retired_at >= cast(:at as timestamptz) - interval '14 days'
       or exists (select 1 from holds h where h.line_id = lines.id and h.state = 'open')) order by name`,
    { plantId, at },
  );
}

function listAnswerers(db: Queryable, plantId: number): Promise<Answerer[]> {
  return rows<Answerer>(
    db,
    `select p.name, m.role, array(select a.line_id::int from line_assignments a where a.plant_id = m.plant_id and a.person_id = p.id
       order by a.line_id) as "lineIds"
     from memberships m join people p on p.id = m.person_id where m.plant_id = :plantId and p.disabled_at is null order by p.name, m.role`,
    { plantId },
  );
}
