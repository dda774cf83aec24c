import { findRow, type Queryable, rows, type Transaction } from './database';

export interface PlantSetUpRow {
  id: number;
  plantId: number;
  name: string;
  timeZone: string;
  /** Instants were read in the zone: it stays. */
  mayChangeTimeZone: boolean;
  currency: string | null;
  engineerMayRelease: boolean;
  reminderManagerHours: number;
  reminderDirectorHours: number;
  allowanceNoticeShare: number;
  allowanceCapShare: number;
}

const SELECT = `
  select p.id, p.id as "plantId", p.name, p.time_zone as "timeZone", p.currency, p.engineer_may_release as "engineerMayRelease",
    p.reminder_manager_hours as "reminderManagerHours", p.reminder_director_hours as "reminderDirectorHours",
    p.allowance_notice_share as "allowanceNoticeShare", p.allowance_cap_share as "allowanceCapShare",
    not exists (select 1 from intakes i where i.plant_id = p.id and i.state <> 'refused')
      and not exists (select 1 from lots o where o.plant_id = p.id) as "mayChangeTimeZone"
  from plants p where p.id = :id`;

export function findPlantSetUp(db: Queryable, id: number): Promise<PlantSetUpRow | undefined> {
  return findRow<PlantSetUpRow>(db, SELECT, { id });
}

/** The same, locked until the transaction ends. */
export function findPlantSetUpForUpdate(tx: Transaction, id: number): Promise<PlantSetUpRow | undefined> {
  return findRow<PlantSetUpRow>(tx, `${SELECT} for update of p`, { id });
}

export async function insertPlant(
  tx: Transaction,
  plant: { name: string; timeZone: string; currency: string | null; createdAt: Date; administratorId: number },
): Promise<number> {
  const [{ id }] = await rows<{ id: number }>(
    tx,
    `insert into plants (name, time_zone, currency, created_at) values (:name, :timeZone, :currency, :createdAt) returning id`,
    plant,
  );
  await tx('memberships').insert({ plant_id: id, person_id: plant.administratorId, role: 'administrator' });
  return id;
}

export async function updatePlantSetUp(
  tx: Transaction,
  id: number,
  changes: Partial<Omit<PlantSetUpRow, 'id' | 'plantId' | 'mayChangeTimeZone'>>,
): Promise<void> {
  await tx('plants').where({ id }).update({
    name: changes.name,
    time_zone: changes.timeZone,
    currency: changes.currency,
    engineer_may_release: changes.engineerMayRelease,
    reminder_manager_hours: changes.reminderManagerHours,
    reminder_director_hours: changes.reminderDirectorHours,
    allowance_notice_share: changes.allowanceNoticeShare,
    allowance_cap_share: changes.allowanceCapShare,
  });
}

/** The zone as the database spells it; undefined when it knows none of the name. */
export async function findTimeZone(db: Queryable, name: string): Promise<string | undefined> {
  const found = await findRow<{ name: string }>(
    db,
    'select name from pg_timezone_names where lower(name) = lower(:name) limit 1',
    { name },
  );
  return found?.name;
}

/** Whether the person administers any plant. */
export async function isAdministrator(db: Queryable, personId: number): Promise<boolean> {
  const found = await findRow(
    db,
    `select 1 from memberships where person_id = :personId and role = 'administrator' limit 1`,
    { personId },
  );
  return found !== undefined;
}

/**
 * Waits until no workbook's readings are being stored on these lines, and keeps it so until the transaction ends: what is worked out again
 * from stored readings misses none that are on their way.
 */
export async function lockStoring(tx: Transaction, lineIds: number[]): Promise<void> {
  for (const lineId of [...new Set(lineIds)].sort((a, b) => a - b))
    await tx.raw(`select pg_advisory_xact_lock(hashtext('store readings'), cast(:lineId as integer))`, { lineId });
}
