import type { SummaryContent, SummaryListItem } from '@app/contracts';
import { findRow, type Queryable, rows, type Transaction } from './database';

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

/** The newest week of the plant that has a summary. */
export async function findNewestSummaryWeek(db: Queryable, plantId: number): Promise<string | null> {
  const row = await findRow<{ startsOn: string | null }>(
    db,
    `select to_char(max(week_starts_on), 'YYYY-MM-DD') as "startsOn" from summaries where plant_id = :plantId`,
    { plantId },
  );
  return row?.startsOn ?? null;
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
