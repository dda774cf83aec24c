import type { SummaryContent, SummaryListItem } from '@app/contracts';
import { findRow, type Queryable, rows, type Transaction } from './database';
import { findFirstReadingAt, type SummaryPlant } from './summary-facts';
import { dueWeeks, type PlantWeek } from './summary-week';

export interface SummaryRow {
  id: number;
  plantId: number;
  weekStartsOn: string;
  version: number;
  madeAt: Date;
  content: SummaryContent;
}

const SELECT = `select id, plant_id as "plantId", to_char(week_starts_on, 'YYYY-MM-DD') as "weekStartsOn", version, made_at as "madeAt", content
  from summaries`;

export function findSummary(db: Queryable, id: number): Promise<SummaryRow | undefined> {
  return findRow<SummaryRow>(db, `${SELECT} where id = :id`, { id });
}

/** The newest version of each week, newest week first. */
export async function listSummaries(db: Queryable, plantId: number): Promise<SummaryListItem[]> {
  const found = await rows<Omit<SummaryListItem, 'madeAt'> & { madeAt: Date }>(
    db,
    `select distinct on (week_starts_on) id, to_char(week_starts_on, 'YYYY-MM-DD') as "weekStartsOn", version, made_at as "madeAt",
       content ->> 'headline' as headline
     from summaries where plant_id = :plantId order by week_starts_on desc, version desc`,
    { plantId },
  );
  return found.map((row) => ({ ...row, madeAt: row.madeAt.toISOString() }));
}

/** Every version of one week, newest first. */
export function listSummaryVersions(
  db: Queryable,
  plantId: number,
  weekStartsOn: string,
): Promise<{ id: number; version: number; madeAt: Date }[]> {
  return rows(
    db,
    `select id, version, made_at as "madeAt" from summaries where plant_id = :plantId and week_starts_on = :weekStartsOn order by version desc`,
    { plantId, weekStartsOn },
  );
}

/** Mondays of the weeks that have a summary, oldest first. */
export async function listSummaryWeeksTold(db: Queryable, plantId: number): Promise<string[]> {
  const found = await rows<{ startsOn: string }>(
    db,
    `select distinct to_char(week_starts_on, 'YYYY-MM-DD') as "startsOn" from summaries where plant_id = :plantId order by 1`,
    { plantId },
  );
  return found.map((row) => row.startsOn);
}

/** A year of missed weeks is caught up. */
const MOST_WEEKS = 53;

/** The weeks of the plant that are due now, oldest first: the newest one, and those that were missed. */
export async function listDueSummaryWeeks(
  db: Queryable,
  { id: plantId, timeZone }: Pick<SummaryPlant, 'id' | 'timeZone'>,
  at: Date,
): Promise<PlantWeek[]> {
  const toldStartsOn = await listSummaryWeeksTold(db, plantId);
  return dueWeeks(at, timeZone, { toldStartsOn, firstReadingAt: await findFirstReadingAt(db, plantId) }, MOST_WEEKS);
}

export interface SummaryUnderWayRow {
  jobId: number;
  weekStartsOn: string;
  state: 'owed' | 'failed';
  /** When it was asked for, or given up. */
  since: Date;
  attempts: number;
  /** False: it was due, and is owed again by itself. */
  isAsked: boolean;
  /** Of one that was given up, a sentence. */
  why: string | null;
}

/** Of each week the summary that is being made, or that was given up since the week's newest version. */
export function listSummariesUnderWay(db: Queryable, plantId: number): Promise<SummaryUnderWayRow[]> {
  return rows<SummaryUnderWayRow>(
    db,
    `with newest as (
       select distinct on (subject ->> 'weekStartsOn') id, subject ->> 'weekStartsOn' as week, state, owed_since, ended_at, attempts,
         subject ->> 'askedBy' is not null as is_asked
       from owed_jobs where plant_id = :plantId and name = 'weekly-summary' order by subject ->> 'weekStartsOn', id desc
     )
     select n.id as "jobId", n.week as "weekStartsOn", n.state, coalesce(n.ended_at, n.owed_since) as since, n.attempts, n.is_asked as "isAsked",
       (select e.after ->> 'why' from audit_entries e where e.plant_id = :plantId and e.action = 'fail-summary' and e.at = n.ended_at
          and e.after ->> 'weekStartsOn' = n.week order by e.id desc limit 1) as why
     from newest n
     where n.state = 'owed' or n.state = 'failed' and not exists (
       select 1 from summaries s where s.plant_id = :plantId and s.week_starts_on = cast(n.week as date) and s.made_at >= n.ended_at)
     order by n.week desc`,
    { plantId },
  );
}

/** Mondays of the weeks whose summary was given up since: they are not owed again before a person asks, or a while has passed. */
export async function listSummaryWeeksGivenUp(db: Queryable, plantId: number, since: Date): Promise<string[]> {
  const found = await rows<{ startsOn: string }>(
    db,
    `select subject ->> 'weekStartsOn' as "startsOn" from owed_jobs
     where plant_id = :plantId and name = 'weekly-summary' and state = 'failed' and ended_at > :since`,
    { plantId, since },
  );
  return found.map((row) => row.startsOn);
}

/** The week's newest version; 0 without any. */
export async function getSummaryVersion(db: Queryable, plantId: number, weekStartsOn: string): Promise<number> {
  const row = await findRow<{ version: number }>(
    db,
    `select coalesce(max(version), 0)::int as version from summaries where plant_id = :plantId and week_starts_on = :weekStartsOn`,
    { plantId, weekStartsOn },
  );
  return row?.version ?? 0;
}

/** Freezes a week as this version. Two writers of the same version break `summaries_version_key`: the later one tries again. */
export async function insertSummary(tx: Transaction, summary: Omit<SummaryRow, 'id'>): Promise<number> {
  const [row] = await rows<{ id: number }>(
    tx,
    `insert into summaries (plant_id, week_starts_on, version, content, made_at)
     values (:plantId, :weekStartsOn, :version, :content, :madeAt) returning id`,
    { ...summary, content: JSON.stringify(summary.content) },
  );
  return row.id;
}
